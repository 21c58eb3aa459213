import type { Hold } from '../../services/contracts/parts';
import { isoOf, select, sqlTimeOf, type Reading } from '../work';
import { partIdsBelow } from './lots';

type Stored = Omit<Hold, 'target' | 'held' | 'recall'> & { targetKind: 'part' | 'lot'; targetId: string; targetName: string };

const query = `SELECT h.id, h.number, h.target_kind AS targetKind, h.target_id AS targetId, h.reason, a.name AS placedBy, ${isoOf('h.placed_at')} AS placedAt,
  b.name AS liftedBy, ${isoOf('h.lifted_at')} AS liftedAt, h.lifted_reason AS liftedReason,
  CASE h.target_kind WHEN 'part' THEN (SELECT p.serial FROM parts p WHERE p.id = h.target_id) ELSE (SELECT CONCAT(l.kind, ' ', l.number) FROM lots l WHERE l.id = h.target_id) END AS targetName
  FROM holds h JOIN accounts a ON a.id = h.placed_by LEFT JOIN accounts b ON b.id = h.lifted_by`;

/** Ids of the parts a hold reaches. */
export function partsUnder(reading: Reading, target: { readonly kind: 'part' | 'lot'; readonly id: string }): Promise<string[]> {
  return target.kind === 'part' ? Promise.resolve([target.id]) : partIdsBelow(reading, target.id);
}

/** Released or shipped parts among these, with their certificates: what a hold must recall. */
export function recallOf(reading: Reading, partIds: readonly string[]): Promise<Hold['recall']> {
  if (partIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    `SELECT p.id AS part, p.serial, c.number AS certificate, k.name AS customer FROM release_parts rp JOIN parts p ON p.id = rp.part_id
     JOIN certificates c ON c.release_id = rp.release_id JOIN customers k ON k.id = c.customer_id WHERE p.id IN (?) ORDER BY p.serial`,
    [partIds],
  );
}

async function toHold(reading: Reading, row: Stored): Promise<Hold> {
  const { targetKind, targetId, targetName, ...rest } = row;
  const target = { kind: targetKind, id: targetId, name: targetName };
  const ids = await partsUnder(reading, target);
  return { ...rest, target, held: ids.length, recall: await recallOf(reading, ids) };
}

export async function holdById(reading: Reading, holdId: string): Promise<Hold | undefined> {
  const [row] = await select<Stored>(reading, `${query} WHERE h.id = ?`, [holdId]);
  return row && toHold(reading, row);
}

/** Holds newest first before a key. */
export async function listHolds(
  reading: Reading,
  open: boolean | null,
  limit: number,
  before: readonly [string, string] | null,
): Promise<Hold[]> {
  const where = ['1 = 1'];
  const values: unknown[] = [];
  if (open !== null) where.push(open ? 'h.lifted_at IS NULL' : 'h.lifted_at IS NOT NULL');
  if (before) {
    where.push('h.placed_at <= ? AND (h.placed_at < ? OR h.id < ?)');
    values.push(sqlTimeOf(before[0]), sqlTimeOf(before[0]), before[1]);
  }
  const rows = await select<Stored>(
    reading,
    `${query} WHERE ${where.join(' AND ')} ORDER BY h.placed_at DESC, h.id DESC LIMIT ?`,
    [...values, limit],
  );
  const holds: Hold[] = [];
  for (const row of rows) holds.push(await toHold(reading, row));
  return holds;
}

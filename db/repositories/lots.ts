import type { z } from 'zod';
import type { RequirementState } from '../../services/contracts/common';
import type { Lot, lotKind, lotRef, LotStory } from '../../services/contracts/parts';
import { table } from '../models/table';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

interface LotRow {
  id: string;
  kind: z.output<typeof lotKind>;
  number: string;
  quantity: number;
  attributes: Record<string, string>;
  version: number;
  createdBy: string;
  createdAt: string;
}

export const lots = table<LotRow>('lots', {
  id: 'uuid',
  kind: 'text',
  number: 'text',
  quantity: 'int',
  attributes: 'json',
  version: 'int',
  createdBy: 'uuid',
  createdAt: 'time',
});

interface ParentRow {
  lotId: string;
  parentId: string;
  fromAt: string;
}

export const lotParents = table<ParentRow>('lot_parents', { lotId: 'uuid', parentId: 'uuid', fromAt: 'time' }, [
  'lotId',
  'parentId',
]);

type Ref = z.output<typeof lotRef>;

/** Lots below a lot (itself first), by edges; depth is bounded so that a wrong edge cannot loop for ever. */
export const belowLot = `WITH RECURSIVE below (id, depth) AS (
  SELECT CAST(? AS UUID), 0 UNION SELECT e.lot_id, b.depth + 1 FROM below b JOIN lot_parents e ON e.parent_id = b.id WHERE b.depth < 12)`;

/** Lots above a lot (itself first). */
export const aboveLot = `WITH RECURSIVE above (id, depth) AS (
  SELECT CAST(? AS UUID), 0 UNION SELECT e.parent_id, a.depth + 1 FROM above a JOIN lot_parents e ON e.lot_id = a.id WHERE a.depth < 12)`;

const columns = `l.id, l.kind, l.number, l.quantity, l.attributes, ${isoOf('l.created_at')} AS createdAt`;

type Stored = Omit<Lot, 'attributes' | 'held' | 'partCount' | 'parents' | 'children'> & { attributes: string };

/** Which of these lots a hold reaches: on the lot itself or on one it came from. */
async function heldAmong(reading: Reading, ids: readonly string[]): Promise<Set<string>> {
  const rows = await select<{ start: string }>(
    reading,
    `WITH RECURSIVE above (start, id, depth) AS (
       SELECT id, id, 0 FROM lots WHERE id IN (?) UNION SELECT a.start, e.parent_id, a.depth + 1 FROM above a JOIN lot_parents e ON e.lot_id = a.id WHERE a.depth < 12)
     SELECT DISTINCT a.start FROM above a JOIN holds h ON h.target_kind = 'lot' AND h.target_id = a.id AND h.lifted_at IS NULL`,
    [ids],
  );
  return new Set(rows.map(({ start }) => start));
}

/** How many parts came from each of these lots, through whatever lies between. */
async function partCountsOf(reading: Reading, ids: readonly string[]): Promise<Map<string, number>> {
  const rows = await select<{ start: string; count: number }>(
    reading,
    `WITH RECURSIVE below (start, id, depth) AS (
       SELECT id, id, 0 FROM lots WHERE id IN (?) UNION SELECT b.start, e.lot_id, b.depth + 1 FROM below b JOIN lot_parents e ON e.parent_id = b.id WHERE b.depth < 12)
     SELECT b.start, COUNT(DISTINCT p.id) AS count FROM below b JOIN parts p ON p.cluster_id = b.id GROUP BY b.start`,
    [ids],
  );
  return new Map(rows.map(({ start, count }) => [start, count]));
}

async function toLots(reading: Reading, rows: readonly Stored[]): Promise<Omit<Lot, 'parents' | 'children'>[]> {
  if (rows.length === 0) return [];
  const ids = rows.map(({ id }) => id);
  const held = await heldAmong(reading, ids);
  const counts = await partCountsOf(reading, ids);
  return rows.map((row) => ({
    ...row,
    attributes: JSON.parse(row.attributes) as Record<string, string>,
    held: held.has(row.id),
    partCount: counts.get(row.id) ?? 0,
  }));
}

/** Lots newest first before a key, filtered by kind and by the start of the number. */
export async function listLots(
  reading: Reading,
  filter: { readonly kind?: string | undefined; readonly number?: string | undefined },
  limit: number,
  before: readonly [string, string] | null,
): Promise<Omit<Lot, 'parents' | 'children'>[]> {
  const where: string[] = ['1 = 1'];
  const values: unknown[] = [];
  if (filter.kind) {
    where.push('l.kind = ?');
    values.push(filter.kind);
  }
  if (filter.number) {
    where.push('l.number LIKE ?');
    values.push(`${filter.number.replace(/[\\%_]/g, '\\$&')}%`);
  }
  if (before) {
    where.push('l.created_at <= ? AND (l.created_at < ? OR l.id < ?)');
    values.push(sqlTimeOf(before[0]), sqlTimeOf(before[0]), before[1]);
  }
  const rows = await select<Stored>(
    reading,
    `SELECT ${columns} FROM lots l WHERE ${where.join(' AND ')} ORDER BY l.created_at DESC, l.id DESC LIMIT ?`,
    [...values, limit],
  );
  return toLots(reading, rows);
}

export async function lotById(reading: Reading, lotId: string): Promise<Lot | undefined> {
  const row = await selectOne<Stored>(reading, `SELECT ${columns} FROM lots l WHERE l.id = ?`, [lotId]);
  const [lot] = row ? await toLots(reading, [row]) : [];
  if (!lot) return undefined;
  const parents = await select<Ref>(
    reading,
    'SELECT l.id, l.kind, l.number FROM lot_parents e JOIN lots l ON l.id = e.parent_id WHERE e.lot_id = ? ORDER BY l.kind, l.number',
    [lotId],
  );
  const children = await select<Ref>(
    reading,
    'SELECT l.id, l.kind, l.number FROM lot_parents e JOIN lots l ON l.id = e.lot_id WHERE e.parent_id = ? ORDER BY l.kind, l.number LIMIT 500',
    [lotId],
  );
  return { ...lot, parents, children };
}

/** Clusters by id or number. */
export async function clusterByKey(
  reading: Reading,
  key: string,
): Promise<{ id: string; number: string; quantity: number } | undefined> {
  return selectOne(
    reading,
    `SELECT id, number, quantity FROM lots WHERE kind = 'cluster' AND (number = ? OR CAST(id AS CHAR) = ?)`,
    [key, key.toLowerCase()],
  );
}

/** A lot and everything it came from, nearest first. */
export async function lotsAbove(reading: Reading, lotId: string): Promise<(Ref & { depth: number })[]> {
  return select(
    reading,
    `${aboveLot} SELECT l.id, l.kind, l.number, MIN(a.depth) AS depth FROM above a JOIN lots l ON l.id = a.id GROUP BY l.id, l.kind, l.number ORDER BY depth, l.kind, l.number`,
    [lotId],
  );
}

/** Ids of the parts that came from a lot or any lot below it. */
export async function partIdsBelow(reading: Reading, lotId: string): Promise<string[]> {
  const rows = await select<{ id: string }>(
    reading,
    `${belowLot} SELECT p.id FROM parts p WHERE p.cluster_id IN (SELECT id FROM below) ORDER BY p.id`,
    [lotId],
  );
  return rows.map(({ id }) => id);
}

/** Requirements of all parts downstream of a lot, counted by state. */
export async function progressBelow(reading: Reading, lotId: string): Promise<LotStory['progress']> {
  const rows = await select<{ state: RequirementState; count: number }>(
    reading,
    `${belowLot} SELECT r.state, COUNT(*) AS count FROM part_requirements r JOIN parts p ON p.id = r.part_id WHERE p.cluster_id IN (SELECT id FROM below) GROUP BY r.state`,
    [lotId],
  );
  return Object.fromEntries(rows.map(({ state, count }) => [state, count]));
}

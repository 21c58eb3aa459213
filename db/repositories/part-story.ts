import type { Part } from '../../services/contracts/parts';
import { isoOf, select, selectOne, type Reading } from '../work';

type Requirement = Part['requirements'][number];

/** Signed inspections of a part by id, and its live drafts by requirement. */
export async function inspectionsAndDrafts(
  reading: Reading,
  partId: string,
): Promise<{
  inspections: Map<string, NonNullable<Requirement['inspection']>>;
  drafts: Map<string, NonNullable<Requirement['draft']>>;
}> {
  const signed = await select<NonNullable<Requirement['inspection']>>(
    reading,
    `SELECT i.id, i.number, i.verdict, a.name AS signedBy, ${isoOf('i.signed_at')} AS signedAt FROM inspections i JOIN accounts a ON a.id = i.signed_by WHERE i.part_id = ?`,
    [partId],
  );
  const open = await select<NonNullable<Requirement['draft']> & { requirementId: string }>(
    reading,
    `SELECT d.id, d.requirement_id AS requirementId, a.name AS openedBy, ${isoOf('d.changed_at')} AS changedAt FROM inspection_drafts d JOIN accounts a ON a.id = d.opened_by WHERE d.part_id = ? AND d.live = 1`,
    [partId],
  );
  return {
    inspections: new Map(signed.map((one) => [one.id, one])),
    drafts: new Map(open.map(({ requirementId, ...one }) => [requirementId, one])),
  };
}

/** The other parts of the cluster. */
export function siblingsOf(reading: Reading, clusterId: string, partId: string): Promise<Part['siblings']> {
  return select(
    reading,
    'SELECT id, serial, position, state FROM parts WHERE cluster_id = ? AND id <> ? ORDER BY serial LIMIT 500',
    [clusterId, partId],
  );
}

export function findingsOfPart(reading: Reading, partId: string): Promise<Part['findings']> {
  return select(
    reading,
    `SELECT number, state, summary, ${isoOf('opened_at')} AS openedAt FROM findings WHERE part_id = ? ORDER BY opened_at DESC`,
    [partId],
  );
}

/** Open holds on the part or on any of its lots, and open suspect lists over its records. */
export function holdsOver(reading: Reading, partId: string, lotIds: readonly string[]): Promise<Part['holds']> {
  return select(
    reading,
    `SELECT h.id, h.number, h.reason, CASE h.target_kind WHEN 'part' THEN 'part' ELSE (SELECT CONCAT(l.kind, ' ', l.number) FROM lots l WHERE l.id = h.target_id) END AS target,
       ${isoOf('h.placed_at')} AS placedAt
     FROM holds h WHERE h.lifted_at IS NULL AND ((h.target_kind = 'part' AND h.target_id = ?) OR (h.target_kind = 'lot' AND h.target_id IN (?)))
     UNION ALL SELECT g.id, s.number, s.reason, s.named AS target, ${isoOf('s.opened_at')} AS placedAt FROM suspect_inspections y JOIN suspect_groups g ON g.id = y.group_id AND g.closed_at IS NULL
       JOIN suspect_lists s ON s.id = g.list_id WHERE y.part_id = ? AND y.rests = 1 GROUP BY s.id ORDER BY placedAt`,
    [partId, lotIds.length > 0 ? lotIds : [partId], partId],
  );
}

export function certificatesOfPart(reading: Reading, partId: string): Promise<Part['certificates']> {
  return select(
    reading,
    `SELECT c.number, c.state, ${isoOf('c.signed_at')} AS signedAt FROM release_parts rp JOIN certificates c ON c.release_id = rp.release_id WHERE rp.part_id = ? ORDER BY c.signed_at DESC`,
    [partId],
  );
}

export async function shipmentOfPart(reading: Reading, partId: string): Promise<string | null> {
  const row = await selectOne<{ number: string }>(
    reading,
    `SELECT s.number FROM shipment_parts sp JOIN shipments s ON s.id = sp.shipment_id WHERE sp.part_id = ? ORDER BY sp.added_at DESC LIMIT 1`,
    [partId],
  );
  return row?.number ?? null;
}

import type { Trace } from '../../services/contracts/trace';
import { isoOf, select, type Reading } from '../work';
import { aboveLot } from './lots';

type Traced = Trace['inspections'][number];
type Row = Omit<Traced, 'people' | 'equipment' | 'evidence' | 'ended'> & {
  record: Buffer;
  endedKind: string | null;
  endedReason: string | null;
  endedAt: string | null;
};

/** Signed inspections of a part, oldest first, with the people of their acts as the signed record names them, equipment and files. */
export async function tracedInspections(reading: Reading, partId: string): Promise<Traced[]> {
  const rows = await select<Row>(
    reading,
    `SELECT i.id, i.number, q.operation, q.title, i.verdict, a.name AS signedBy, ${isoOf('i.signed_at')} AS signedAt, i.technique, i.record_digest AS recordDigest, i.record,
       e.kind AS endedKind, e.reason AS endedReason, ${isoOf('e.ended_at')} AS endedAt
     FROM inspections i JOIN requirements q ON q.id = i.requirement_id JOIN accounts a ON a.id = i.signed_by LEFT JOIN inspection_ends e ON e.inspection_id = i.id WHERE i.part_id = ? ORDER BY i.signed_at, i.id`,
    [partId],
  );
  const ids = rows.map(({ id }) => id);
  if (ids.length === 0) return [];
  const equipment = await select<{ inspectionId: string; number: string }>(
    reading,
    'SELECT u.inspection_id AS inspectionId, e.number FROM inspection_equipment u JOIN equipment e ON e.id = u.equipment_id WHERE u.inspection_id IN (?) ORDER BY e.number',
    [ids],
  );
  const files = await select<Traced['evidence'][number] & { inspectionId: string }>(
    reading,
    'SELECT l.inspection_id AS inspectionId, v.id, v.name, v.kind, v.sha256 FROM inspection_evidence l JOIN evidence v ON v.id = l.evidence_id WHERE l.inspection_id IN (?) ORDER BY l.linked_at, v.id',
    [ids],
  );
  return rows.map(({ record, endedKind, endedReason, endedAt, ...row }) => {
    const { acts } = JSON.parse(record.toString('utf8')) as { acts: { person: { name: string } | null }[] };
    return {
      ...row,
      ended: endedKind !== null && endedAt !== null ? { kind: endedKind, reason: endedReason ?? '', at: endedAt } : null,
      people: [...new Set(acts.flatMap(({ person }) => (person ? [person.name] : [])))],
      equipment: equipment.filter(({ inspectionId }) => inspectionId === row.id).map(({ number }) => number),
      evidence: files.filter(({ inspectionId }) => inspectionId === row.id).map(({ inspectionId: _, ...file }) => file),
    };
  });
}

type TracedFinding = Trace['findings'][number];

/** Findings of a part with every decision on them, oldest first. */
export async function tracedFindings(reading: Reading, partId: string): Promise<TracedFinding[]> {
  const rows = await select<Omit<TracedFinding, 'dispositions'> & { id: string }>(
    reading,
    `SELECT f.id, f.number, f.state, f.verdict, f.summary, a.name AS openedBy, ${isoOf('f.opened_at')} AS openedAt, ${isoOf('f.closed_at')} AS closedAt
     FROM findings f JOIN accounts a ON a.id = f.opened_by WHERE f.part_id = ? ORDER BY f.opened_at, f.id`,
    [partId],
  );
  const decisions = await select<TracedFinding['dispositions'][number] & { findingId: string }>(
    reading,
    `SELECT s.finding_id AS findingId, s.decision, s.reason, s.sentence, a.name AS decidedBy, ${isoOf('s.decided_at')} AS decidedAt
     FROM dispositions s JOIN findings f ON f.id = s.finding_id JOIN accounts a ON a.id = s.decided_by WHERE f.part_id = ? ORDER BY s.finding_id, s.seq`,
    [partId],
  );
  return rows.map(({ id, ...row }) => ({
    ...row,
    dispositions: decisions.filter(({ findingId }) => findingId === id).map(({ findingId: _, ...decision }) => decision),
  }));
}

/** Holds, open and lifted, on a part or on any of its lots, oldest first. */
export function tracedHolds(reading: Reading, partId: string, lotIds: readonly string[]): Promise<Trace['holds']> {
  return select(
    reading,
    `SELECT h.number, CASE h.target_kind WHEN 'part' THEN 'part' ELSE (SELECT CONCAT(l.kind, ' ', l.number) FROM lots l WHERE l.id = h.target_id) END AS target, h.reason,
       a.name AS placedBy, ${isoOf('h.placed_at')} AS placedAt, b.name AS liftedBy, ${isoOf('h.lifted_at')} AS liftedAt, h.lifted_reason AS liftedReason
     FROM holds h JOIN accounts a ON a.id = h.placed_by LEFT JOIN accounts b ON b.id = h.lifted_by
     WHERE (h.target_kind = 'part' AND h.target_id = ?) OR (h.target_kind = 'lot' AND h.target_id IN (?)) ORDER BY h.placed_at, h.id`,
    [partId, lotIds.length > 0 ? lotIds : [partId]],
  );
}

type TracedLot = Trace['genealogy'][number];

/** The lots above a cluster (itself first), each with the lots it was made from. */
export async function genealogyOf(reading: Reading, clusterId: string): Promise<TracedLot[]> {
  const rows = await select<Omit<TracedLot, 'attributes' | 'parents'> & { attributes: string }>(
    reading,
    `${aboveLot} SELECT l.id, l.kind, l.number, MIN(a.depth) AS depth, l.quantity, l.attributes, ${isoOf('l.created_at')} AS createdAt
     FROM above a JOIN lots l ON l.id = a.id GROUP BY l.id, l.kind, l.number, l.quantity, l.attributes, l.created_at ORDER BY depth, l.kind, l.number`,
    [clusterId],
  );
  const edges = await select<{ lotId: string; parentId: string }>(
    reading,
    `${aboveLot} SELECT DISTINCT e.lot_id AS lotId, e.parent_id AS parentId FROM above a JOIN lot_parents e ON e.lot_id = a.id`,
    [clusterId],
  );
  return rows.map(({ attributes, ...row }) => ({
    ...row,
    attributes: JSON.parse(attributes) as Record<string, string>,
    parents: edges.filter(({ lotId }) => lotId === row.id).map(({ parentId }) => parentId),
  }));
}

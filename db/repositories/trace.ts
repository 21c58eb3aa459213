import type { Trace } from '../../services/contracts/trace';
import { isoOf, select, type Reading } from '../work';

type Traced = Trace['inspections'][number];
type Row = Omit<Traced, 'people' | 'equipment' | 'evidence'> & { record: Buffer };

/** Signed inspections of a part, oldest first, with the people of their acts as the signed record names them, equipment and files. */
export async function tracedInspections(reading: Reading, partId: string): Promise<Traced[]> {
  const rows = await select<Row>(
    reading,
    `SELECT i.id, i.number, q.operation, q.title, i.verdict, a.name AS signedBy, ${isoOf('i.signed_at')} AS signedAt, i.technique, i.record_digest AS recordDigest, i.record, e.kind AS ended
     FROM inspections i JOIN requirements q ON q.id = i.requirement_id JOIN accounts a ON a.id = i.signed_by LEFT JOIN inspection_ends e ON e.inspection_id = i.id WHERE i.part_id = ? ORDER BY i.signed_at`,
    [partId],
  );
  const ids = rows.map(({ id }) => id);
  if (ids.length === 0) return [];
  const equipment = await select<{ inspectionId: string; number: string }>(
    reading,
    'SELECT u.inspection_id AS inspectionId, e.number FROM inspection_equipment u JOIN equipment e ON e.id = u.equipment_id WHERE u.inspection_id IN (?)',
    [ids],
  );
  const files = await select<{ inspectionId: string; id: string; name: string; sha256: string }>(
    reading,
    'SELECT l.inspection_id AS inspectionId, v.id, v.name, v.sha256 FROM inspection_evidence l JOIN evidence v ON v.id = l.evidence_id WHERE l.inspection_id IN (?)',
    [ids],
  );
  return rows.map(({ record, ...row }) => {
    const { acts } = JSON.parse(record.toString('utf8')) as { acts: { person: { name: string } | null }[] };
    return {
      ...row,
      people: [...new Set(acts.flatMap(({ person }) => (person ? [person.name] : [])))],
      equipment: equipment.filter(({ inspectionId }) => inspectionId === row.id).map(({ number }) => number),
      evidence: files.filter(({ inspectionId }) => inspectionId === row.id).map(({ id, name, sha256 }) => ({ id, name, sha256 })),
    };
  });
}

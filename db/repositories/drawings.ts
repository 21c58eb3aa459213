import type { Drawing } from '../../services/contracts/plans';
import { table } from '../models/table';
import { select, selectOne, type Reading } from '../work';

interface DrawingRow {
  id: string;
  number: string;
  title: string;
  customerId: string;
  version: number;
  createdAt: string;
}

export const drawings = table<DrawingRow>('drawings', {
  id: 'uuid',
  number: 'text',
  title: 'text',
  customerId: 'uuid',
  version: 'int',
  createdAt: 'time',
});

interface RevisionRow {
  id: string;
  drawingId: string;
  revision: string;
  note: string | null;
  createdAt: string;
}

export const drawingRevisions = table<RevisionRow>('drawing_revisions', {
  id: 'uuid',
  drawingId: 'uuid',
  revision: 'text',
  note: 'text',
  createdAt: 'time',
});

interface Joined {
  id: string;
  number: string;
  title: string;
  customerId: string;
  customerCode: string;
  customerName: string;
  revisionId: string | null;
  revision: string | null;
  planId: string | null;
  issue: number | null;
  state: Drawing['revisions'][number]['plans'][number]['state'] | null;
}

function gather(rows: readonly Joined[]): Drawing[] {
  const found = new Map<string, Drawing>();
  for (const row of rows) {
    let one = found.get(row.id);
    if (!one) {
      one = {
        id: row.id,
        number: row.number,
        title: row.title,
        customer: { id: row.customerId, code: row.customerCode, name: row.customerName },
        revisions: [],
      };
      found.set(row.id, one);
    }
    if (row.revisionId === null || row.revision === null) continue;
    let revision = one.revisions.find(({ id }) => id === row.revisionId);
    if (!revision) one.revisions.push((revision = { id: row.revisionId, revision: row.revision, plans: [] }));
    if (row.planId !== null && row.issue !== null && row.state !== null)
      revision.plans.push({ id: row.planId, issue: row.issue, state: row.state });
  }
  return [...found.values()];
}

const joined = `SELECT d.id, d.number, d.title, c.id AS customerId, c.code AS customerCode, c.name AS customerName, r.id AS revisionId, r.revision, p.id AS planId, p.issue, p.state
  FROM drawings d JOIN customers c ON c.id = d.customer_id LEFT JOIN drawing_revisions r ON r.drawing_id = d.id LEFT JOIN plan_issues p ON p.drawing_revision_id = r.id`;

/** Drawings by number after a key, with revisions and plan issues, at most `limit`. */
export async function listDrawings(reading: Reading, limit: number, after: string): Promise<Drawing[]> {
  const rows = await select<Joined>(
    reading,
    `${joined} WHERE d.id IN (SELECT id FROM (SELECT id FROM drawings WHERE number > ? ORDER BY number LIMIT ?) page) ORDER BY d.number, r.created_at DESC, p.issue DESC`,
    [after, limit],
  );
  return gather(rows);
}

export async function drawingByNumber(reading: Reading, number: string): Promise<Drawing | undefined> {
  return gather(
    await select<Joined>(reading, `${joined} WHERE d.number = ? ORDER BY r.created_at DESC, p.issue DESC`, [number]),
  )[0];
}

/** A customer by id or code. */
export async function customerByKey(
  reading: Reading,
  key: string,
): Promise<{ id: string; code: string; name: string } | undefined> {
  return selectOne(reading, 'SELECT id, code, name FROM customers WHERE code = ? OR CAST(id AS CHAR) = ?', [
    key,
    key.toLowerCase(),
  ]);
}

import type { z } from 'zod';
import type { disposition, Finding, FindingSummary } from '../../services/contracts/findings';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

interface Stored {
  id: string;
  number: string;
  state: FindingSummary['state'];
  verdict: string;
  summary: string;
  openedAt: string;
  openedBy: string;
  partId: string;
  serial: string;
  partNumber: string;
  planId: string;
  customerId: string;
  requirementId: string;
  key: string;
  title: string;
  operation: string;
  method: string;
  inspectionId: string | null;
}

const query = `SELECT f.id, f.number, f.state, f.verdict, f.summary, ${isoOf('f.opened_at')} AS openedAt, a.name AS openedBy, f.part_id AS partId, p.serial, d.number AS partNumber,
  p.plan_issue_id AS planId, f.customer_id AS customerId, f.requirement_id AS requirementId, q.\`key\`, q.title, q.operation, q.method, f.inspection_id AS inspectionId
  FROM findings f JOIN parts p ON p.id = f.part_id JOIN drawings d ON d.id = p.drawing_id JOIN requirements q ON q.id = f.requirement_id JOIN accounts a ON a.id = f.opened_by`;

export type FindingRow = Stored;

export function toSummary(row: Stored): FindingSummary {
  return {
    number: row.number,
    state: row.state,
    part: { id: row.partId, serial: row.serial, partNumber: row.partNumber },
    requirement: { key: row.key, title: row.title, operation: row.operation, method: row.method },
    verdict: row.verdict,
    summary: row.summary,
    openedAt: row.openedAt,
    openedBy: row.openedBy,
  };
}

export function findingByNumber(reading: Reading, number: string): Promise<Stored | undefined> {
  return selectOne<Stored>(reading, `${query} WHERE f.number = ?`, [number]);
}

/** Findings oldest first after a key; those of a state, or all that are not closed. */
export function listFindings(
  reading: Reading,
  state: string | undefined,
  limit: number,
  after: readonly [string, string] | null,
): Promise<Stored[]> {
  const where = [state ? 'f.state = ?' : `f.state <> 'closed'`];
  const values: unknown[] = state ? [state] : [];
  if (after) {
    where.push('f.opened_at >= ? AND (f.opened_at > ? OR f.id > ?)');
    values.push(sqlTimeOf(after[0]), sqlTimeOf(after[0]), after[1]);
  }
  return select<Stored>(reading, `${query} WHERE ${where.join(' AND ')} ORDER BY f.opened_at, f.id LIMIT ?`, [...values, limit]);
}

/** Inspections of the same requirement of the part, oldest first. */
export function historyOf(
  reading: Reading,
  partId: string,
  requirementId: string,
): Promise<(Finding['history'][number] & { signedById: string })[]> {
  return select(
    reading,
    `SELECT i.id, i.number, i.verdict, a.name AS signedBy, i.signed_by AS signedById, ${isoOf('i.signed_at')} AS signedAt FROM inspections i JOIN accounts a ON a.id = i.signed_by
     WHERE i.part_id = ? AND i.requirement_id = ? ORDER BY i.signed_at`,
    [partId, requirementId],
  );
}

export async function dispositionsOf(reading: Reading, findingId: string): Promise<z.output<typeof disposition>[]> {
  const rows = await select<Omit<z.output<typeof disposition>, 'repeat'> & { repeat: string }>(
    reading,
    `SELECT s.decision, s.reason, s.repeat_keys AS \`repeat\`, s.scheme, a.name AS decidedBy, ${isoOf('s.decided_at')} AS decidedAt, s.sentence FROM dispositions s JOIN accounts a ON a.id = s.decided_by
     WHERE s.finding_id = ? ORDER BY s.seq`,
    [findingId],
  );
  return rows.map((row) => ({ ...row, repeat: JSON.parse(row.repeat) as string[] }));
}

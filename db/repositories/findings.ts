import type { z } from 'zod';
import type { disposition, Finding, FindingSummary } from '../../services/contracts/findings';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';
import { readingsOfInspection } from './inspections';

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
  partState: string;
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

const query = `SELECT f.id, f.number, f.state, f.verdict, f.summary, ${isoOf('f.opened_at')} AS openedAt, a.name AS openedBy, f.part_id AS partId, p.serial, p.state AS partState, d.number AS partNumber,
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

/** Where a finding stands in the list: undecided ones first. */
export function rankOf(row: Stored): 0 | 1 {
  return row.state === 'open' ? 0 : 1;
}

interface FindingKey {
  readonly rank: number;
  readonly openedAt: string;
  readonly id: string;
}

const rank = `(f.state <> 'open')`;

/** Findings after a key, undecided ones first, each oldest first; those of a state, or all that are not closed. */
export function listFindings(
  reading: Reading,
  state: string | undefined,
  limit: number,
  after: FindingKey | null,
): Promise<Stored[]> {
  const where = [state ? 'f.state = ?' : `f.state <> 'closed'`];
  const values: unknown[] = state ? [state] : [];
  if (after) {
    const at = sqlTimeOf(after.openedAt);
    where.push(`(${rank} > ? OR (${rank} = ? AND (f.opened_at > ? OR (f.opened_at = ? AND f.id > ?))))`);
    values.push(after.rank, after.rank, at, at, after.id);
  }
  return select<Stored>(reading, `${query} WHERE ${where.join(' AND ')} ORDER BY ${rank}, f.opened_at, f.id LIMIT ?`, [
    ...values,
    limit,
  ]);
}

/** Readings and relevant indications of an inspection that were not accepted, in the order they were recorded. */
export async function failedIn(reading: Reading, inspectionId: string): Promise<Finding['failed']> {
  const readings = await readingsOfInspection(reading, inspectionId);
  const indications = await select<Finding['failed']['indications'][number]>(
    reading,
    `SELECT label, type, view, CAST(length_mm AS CHAR) AS lengthMm, CAST(width_mm AS CHAR) AS widthMm, verdict FROM inspection_indications
     WHERE inspection_id = ? AND relevant = 1 AND verdict <> 'accept' ORDER BY seq`,
    [inspectionId],
  );
  return { readings: readings.filter(({ verdict }) => verdict !== 'accept'), indications };
}

export function evidenceOf(reading: Reading, inspectionId: string): Promise<Finding['evidence']> {
  return select(
    reading,
    `SELECT e.id, e.name, e.kind, l.role, l.view FROM inspection_evidence l JOIN evidence e ON e.id = l.evidence_id WHERE l.inspection_id = ? ORDER BY l.linked_at, e.id`,
    [inspectionId],
  );
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

/** How often a kind of rework was ordered on a part. */
export async function reworkCycles(reading: Reading, partId: string, kind: string): Promise<number> {
  const row = await selectOne<{ cycles: number }>(
    reading,
    `SELECT COUNT(*) AS cycles FROM dispositions s JOIN findings f ON f.id = s.finding_id WHERE f.part_id = ? AND s.decision = 'rework' AND s.scheme = ?`,
    [partId, kind],
  );
  return row?.cycles ?? 0;
}

export interface Followed {
  readonly id: string;
  readonly number: string;
  readonly serial: string;
  /** The last decision on it. */
  readonly decision: string | null;
  readonly firstSigner: string | null;
  readonly requirementState: string;
  /** Who signed the inspection that now stands for the requirement, when it is another than the finding's. */
  readonly laterSigner: string | null;
  readonly laterNumber: string | null;
}

/** Findings of a part that wait for their follow-up, with how their requirement stands. */
export function awaitingFollowUp(reading: Reading, partId: string): Promise<Followed[]> {
  return select(
    reading,
    `SELECT f.id, f.number, p.serial, r.state AS requirementState, i.signed_by AS firstSigner, n.signed_by AS laterSigner, n.number AS laterNumber,
       (SELECT s.decision FROM dispositions s WHERE s.finding_id = f.id ORDER BY s.seq DESC LIMIT 1) AS decision
     FROM findings f JOIN parts p ON p.id = f.part_id JOIN part_requirements r ON r.part_id = f.part_id AND r.requirement_id = f.requirement_id
     LEFT JOIN inspections i ON i.id = f.inspection_id LEFT JOIN inspections n ON n.id = r.inspection_id AND NOT (n.id <=> f.inspection_id)
     WHERE f.part_id = ? AND f.state = 'awaiting-follow-up' ORDER BY f.id`,
    [partId],
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

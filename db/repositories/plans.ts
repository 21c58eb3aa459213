import type { z } from 'zod';
import { planContent, type Plan, type PlanContent, type planState } from '../../services/contracts/plan-content';
import { table } from '../models/table';
import { execute, isoOf, select, selectOne, type Reading, type Work } from '../work';

export interface PlanIssueRow {
  id: string;
  drawingRevisionId: string;
  issue: number;
  state: z.output<typeof planState>;
  content: PlanContent;
  contentDigest: string;
  preparedBy: string;
  preparedAt: string;
  checkedBy: string | null;
  checkedAt: string | null;
  approvedBy: string | null;
  approvedAt: string | null;
  endedBy: string | null;
  endedAt: string | null;
  endedReason: string | null;
  version: number;
}

export const planIssues = table<PlanIssueRow>('plan_issues', {
  id: 'uuid',
  drawingRevisionId: 'uuid',
  issue: 'int',
  state: 'text',
  content: 'json',
  contentDigest: 'text',
  preparedBy: 'uuid',
  preparedAt: 'time',
  checkedBy: 'uuid',
  checkedAt: 'time',
  approvedBy: 'uuid',
  approvedAt: 'time',
  endedBy: 'uuid',
  endedAt: 'time',
  endedReason: 'text',
  version: 'int',
});

export interface RequirementRow {
  id: string;
  planIssueId: string;
  position: number;
  key: string;
  operation: string;
  title: string;
  method: string;
  technique: string | null;
  content: PlanContent['route'][number];
}

export const requirements = table<RequirementRow>('requirements', {
  id: 'uuid',
  planIssueId: 'uuid',
  position: 'int',
  key: 'text',
  operation: 'text',
  title: 'text',
  method: 'text',
  technique: 'text',
  content: 'json',
});

interface Stored {
  id: string;
  drawing: string;
  title: string;
  revision: string;
  issue: number;
  state: Plan['state'];
  version: number;
  content: string;
  customerId: string;
  preparedBy: string;
  preparedName: string;
  preparedAt: string;
  checkedBy: string | null;
  checkedName: string | null;
  checkedAt: string | null;
  approvedBy: string | null;
  approvedName: string | null;
  approvedAt: string | null;
  endedBy: string | null;
  endedName: string | null;
  endedAt: string | null;
  endedReason: string | null;
}

const query = `SELECT p.id, d.number AS drawing, d.title, r.revision, p.issue, p.state, p.version, p.content, d.customer_id AS customerId,
  p.prepared_by AS preparedBy, a1.name AS preparedName, ${isoOf('p.prepared_at')} AS preparedAt,
  p.checked_by AS checkedBy, a2.name AS checkedName, ${isoOf('p.checked_at')} AS checkedAt,
  p.approved_by AS approvedBy, a3.name AS approvedName, ${isoOf('p.approved_at')} AS approvedAt,
  p.ended_by AS endedBy, a4.name AS endedName, ${isoOf('p.ended_at')} AS endedAt, p.ended_reason AS endedReason
  FROM plan_issues p JOIN drawing_revisions r ON r.id = p.drawing_revision_id JOIN drawings d ON d.id = r.drawing_id
  LEFT JOIN accounts a1 ON a1.id = p.prepared_by LEFT JOIN accounts a2 ON a2.id = p.checked_by
  LEFT JOIN accounts a3 ON a3.id = p.approved_by LEFT JOIN accounts a4 ON a4.id = p.ended_by`;

function person(id: string | null, name: string | null, at: string | null) {
  return id !== null && at !== null ? { id, name: name ?? '', at } : null;
}

function toPlan(row: Stored): Plan {
  const content = planContent.parse(JSON.parse(row.content));
  return {
    ...content,
    id: row.id,
    drawing: row.drawing,
    title: row.title,
    revision: row.revision,
    issue: row.issue,
    state: row.state,
    version: row.version,
    prepared: person(row.preparedBy, row.preparedName, row.preparedAt),
    checked: person(row.checkedBy, row.checkedName, row.checkedAt),
    approved: person(row.approvedBy, row.approvedName, row.approvedAt),
    ended: person(row.endedBy, row.endedName, row.endedAt),
    endedReason: row.endedReason,
  };
}

export async function planById(reading: Reading, planId: string): Promise<Plan | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE p.id = ?`, [planId]);
  return row && toPlan(row);
}

/** Plan issues of a drawing, newest revision and issue first. */
export async function plansOfDrawing(reading: Reading, drawingNumber: string): Promise<Plan[]> {
  const rows = await select<Stored>(reading, `${query} WHERE d.number = ? ORDER BY r.created_at DESC, p.issue DESC LIMIT 200`, [
    drawingNumber,
  ]);
  return rows.map(toPlan);
}

/** The route of a plan issue that is checked or approved, in order. */
export async function requirementsOfPlan(reading: Reading, planId: string): Promise<RequirementRow[]> {
  const rows = await select<Omit<RequirementRow, 'content'> & { content: string }>(
    reading,
    'SELECT id, plan_issue_id AS planIssueId, position, `key`, operation, title, method, technique, content FROM requirements WHERE plan_issue_id = ? ORDER BY position',
    [planId],
  );
  return rows.map((row) => ({ ...row, content: JSON.parse(row.content) as RequirementRow['content'] }));
}

export async function requirementById(reading: Reading, requirementId: string): Promise<RequirementRow | undefined> {
  const row = await selectOne<Omit<RequirementRow, 'content'> & { content: string }>(
    reading,
    'SELECT id, plan_issue_id AS planIssueId, position, `key`, operation, title, method, technique, content FROM requirements WHERE id = ?',
    [requirementId],
  );
  return row && { ...row, content: JSON.parse(row.content) as RequirementRow['content'] };
}

/** Did this person write any of the issue's content: prepared it, or saved the draft at any time? By the journal. */
export async function wrotePlan(reading: Reading, planId: string, accountId: string): Promise<boolean> {
  const row = await selectOne(
    reading,
    `SELECT 1 AS wrote FROM events WHERE subject_kind = 'plan' AND subject_id = ? AND kind IN ('plan-drafted', 'plan-changed') AND actor_id = ? LIMIT 1`,
    [planId, accountId],
  );
  return row !== undefined;
}

/** Takes the drawing revision of an issue, so that its issues are approved one after the other. */
export async function takeRevisionOfPlan(work: Work, planId: string): Promise<void> {
  await execute(
    work,
    'UPDATE drawings d JOIN drawing_revisions r ON r.drawing_id = d.id JOIN plan_issues p ON p.drawing_revision_id = r.id SET d.version = d.version + 1 WHERE p.id = ?',
    [planId],
  );
}

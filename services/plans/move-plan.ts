import { newId } from '@/db/identity';
import { execute, select, selectOne, sqlTimeOf, type Work } from '@/db/work';
import { insertAll, update } from '@/db/models/table';
import { planById, planIssues, requirements, takeRevisionOfPlan, wrotePlan } from '@/db/repositories/plans';
import type { Actor } from '@/services/contracts/actor';
import { contentOf, type Plan, type PlanContent } from '@/services/contracts/plan-content';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { planContentDigest } from './plan-content-digest';
import { keyOfRequirement, planFaults } from '@/services/contracts/plan-faults';

type By = Work & { readonly actor: Actor };

/** The moves a plan issue can make; what is not here is refused. */
const moves = {
  change: { from: ['draft'] },
  check: { from: ['draft'] },
  approve: { from: ['checked'] },
  withdraw: { from: ['checked', 'approved'] },
} as const;

async function takePlan(work: By, planId: string, move: keyof typeof moves): Promise<Plan> {
  await execute(work, 'UPDATE plan_issues SET version = version + 1 WHERE id = ?', [planId]);
  const plan = await planById(work, planId);
  if (!plan) throw notFound('Plan issue');
  const allowed: readonly string[] = moves[move].from;
  if (!allowed.includes(plan.state))
    throw new Problem(
      'state-refused',
      `Plan issue ${String(plan.issue)} is ${plan.state}; only ${allowed.join(' or ')} can make this move.`,
    );
  return plan;
}

async function answered(work: By, plan: Plan, details: Record<string, unknown>): Promise<Recorded<Plan>> {
  const answer = await planById(work, plan.id);
  if (!answer) throw notFound('Plan issue');
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"` },
    events: [
      {
        subject: { kind: 'plan', id: plan.id },
        details: { drawing: plan.drawing, revision: plan.revision, issue: plan.issue, ...details },
      },
    ],
  };
}

/** Replaces a draft's content; `ifMatch` must be the version that was read. */
export async function changePlan(work: By, planId: string, body: PlanContent, ifMatch: number | null): Promise<Recorded<Plan>> {
  if (ifMatch === null) throw new Problem('version-needed', 'Send If-Match with the version you read.');
  const plan = await takePlan(work, planId, 'change');
  if (plan.version - 1 !== ifMatch)
    throw new Problem('changed-meanwhile', 'Somebody saved this draft since you read it.', [], {
      present: contentOf(plan),
      version: plan.version - 1,
    });
  const content = contentOf(body);
  await update(work, planIssues, { content, contentDigest: planContentDigest(content) }, { id: planId });
  return answered(work, plan, { digest: planContentDigest(content) });
}

function refuseFaults(plan: Plan): void {
  const faults = planFaults(contentOf(plan));
  if (faults.length > 0)
    throw new Problem(
      'invalid-input',
      `The plan has ${String(faults.length)} fault(s): ${faults.map(({ path, message }) => `${path} ${message}`).join('; ')}`,
      faults,
    );
}

/** An issue that was overtaken by a newer approved one would take its place under the older number. */
async function refuseOvertaken(work: By, plan: Plan): Promise<void> {
  const newer = await selectOne<{ issue: number }>(
    work,
    `SELECT o.issue FROM plan_issues o JOIN plan_issues n ON n.drawing_revision_id = o.drawing_revision_id WHERE n.id = ? AND o.issue > n.issue AND o.state = 'approved'`,
    [plan.id],
  );
  if (newer)
    throw new Problem(
      'state-refused',
      `Issue ${String(newer.issue)} of this drawing revision is approved already; issue ${String(plan.issue)} comes too late.`,
    );
}

const wroteIt = async (work: By, plan: Plan): Promise<boolean> =>
  plan.prepared?.id === work.actor.id || (await wrotePlan(work, plan.id, work.actor.id));

/** A second person states that the draft reads the drawing rightly. */
export async function checkPlan(work: By, planId: string): Promise<Recorded<Plan>> {
  const plan = await takePlan(work, planId, 'check');
  if (await wroteIt(work, plan))
    throw new Problem('not-permitted', 'A plan issue is checked by a second person, not by anybody who wrote any of it.');
  refuseFaults(plan);
  await update(work, planIssues, { state: 'checked', checkedBy: work.actor.id, checkedAt: work.now }, { id: planId });
  return answered(work, plan, {});
}

/** Approves a checked issue: the route becomes requirement rows, an earlier approved issue of the revision is superseded. */
export async function approvePlan(work: By, planId: string): Promise<Recorded<Plan>> {
  await takeRevisionOfPlan(work, planId);
  const plan = await takePlan(work, planId, 'approve');
  if (await wroteIt(work, plan)) throw new Problem('not-permitted', 'Nobody approves a plan issue of which they wrote any.');
  refuseFaults(plan);
  await refuseOvertaken(work, plan);
  await update(work, planIssues, { state: 'approved', approvedBy: work.actor.id, approvedAt: work.now }, { id: planId });
  const earlier = await select<{ id: string }>(
    work,
    `SELECT o.id FROM plan_issues o JOIN plan_issues n ON n.drawing_revision_id = o.drawing_revision_id WHERE n.id = ? AND o.id <> n.id AND o.state = 'approved'`,
    [planId],
  );
  for (const { id } of earlier) {
    await execute(
      work,
      `UPDATE plan_issues SET state = 'superseded', ended_by = ?, ended_at = ?, ended_reason = 'superseded by a newer issue', version = version + 1 WHERE id = ?`,
      [work.actor.id, sqlTimeOf(work.now), id],
    );
  }
  await insertAll(
    work,
    requirements,
    plan.route.map((row, position) => ({
      id: newId(),
      planIssueId: planId,
      position,
      key: keyOfRequirement(row),
      operation: row.operation,
      title: row.title,
      method: row.method,
      technique: row.technique ?? null,
      content: row,
    })),
  );
  return answered(work, plan, { superseded: earlier.map(({ id }) => id), digest: planContentDigest(contentOf(plan)) });
}

/** Withdraws an issue because it was wrong; records judged by it stay and become suspect. */
export async function withdrawPlan(work: By, planId: string, reason: string): Promise<Recorded<Plan>> {
  const plan = await takePlan(work, planId, 'withdraw');
  await update(
    work,
    planIssues,
    { state: 'withdrawn-for-error', endedBy: work.actor.id, endedAt: work.now, endedReason: reason },
    { id: planId },
  );
  return answered(work, plan, { reason });
}

import { newId } from '@/db/identity';
import { execute, selectOne, type Work } from '@/db/work';
import { insert } from '@/db/models/table';
import { drawingByNumber } from '@/db/repositories/drawings';
import { planById, planIssues } from '@/db/repositories/plans';
import type { Actor } from '@/services/contracts/actor';
import { contentOf, type Plan, type PlanContent } from '@/services/contracts/plan-content';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { planContentDigest } from './plan-content-digest';

/** Starts the next plan issue of a drawing's revision (the newest unless named) as a draft. */
export async function draftPlan(
  work: Work & { readonly actor: Actor },
  number: string,
  body: PlanContent & { readonly revision?: string | undefined },
): Promise<Recorded<Plan>> {
  const drawing = await drawingByNumber(work, number);
  if (!drawing) throw notFound(`Drawing ${number}`);
  const revision =
    body.revision === undefined ? drawing.revisions[0] : drawing.revisions.find((one) => one.revision === body.revision);
  if (!revision)
    throw new Problem('invalid-input', 'revision: is not a revision of this drawing', [
      { path: 'revision', message: 'is not a revision of this drawing' },
    ]);
  // The drawing's row is written first: two drafts at once get two issue numbers.
  await execute(work, 'UPDATE drawings SET version = version + 1 WHERE id = ?', [drawing.id]);
  const last = await selectOne<{ issue: number | null }>(
    work,
    'SELECT MAX(issue) AS issue FROM plan_issues WHERE drawing_revision_id = ?',
    [revision.id],
  );
  const planId = newId();
  const content = contentOf(body);
  await insert(work, planIssues, {
    id: planId,
    drawingRevisionId: revision.id,
    issue: (last?.issue ?? 0) + 1,
    state: 'draft',
    content,
    contentDigest: planContentDigest(content),
    preparedBy: work.actor.id,
    preparedAt: work.now,
    version: 1,
  });
  const answer = await planById(work, planId);
  if (!answer) throw new Error('the plan just written is not there');
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"` },
    events: [
      {
        subject: { kind: 'plan', id: planId },
        also: [{ kind: 'drawing', id: drawing.id }],
        details: { drawing: number, revision: revision.revision, issue: answer.issue },
      },
    ],
  };
}

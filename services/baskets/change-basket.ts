import { takeRows } from '@/db/lock';
import { update } from '@/db/models/table';
import { basketById, basketParts, baskets, membersOf, type Basket, type BasketMember } from '@/db/repositories/baskets';
import { draftById, saveDraft } from '@/db/repositories/drafts';
import { planById, requirementById } from '@/db/repositories/plans';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketAnswer, changeBasket as contract } from '@/services/contracts/baskets';
import type { BodyOf } from '@/services/contracts/operation';
import { planRequirement } from '@/services/contracts/plan-content';
import { windowsOfRequirement } from '@/services/contracts/plan-windows';
import { notFound } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { cleanContent } from './clean-content';
import { refuseEndedBasket, refuseOthers, takeBasket } from './own-basket';
import { readBasket } from './read-basket';
import { processOf } from './set-up';

type By = Work & { readonly actor: Actor };

/** Parts in the basket as scanned: nobody has touched their drafts since the basket wrote them. */
function cleanMembers(members: readonly BasketMember[]): BasketMember[] {
  return members.filter(
    ({ live, draftState, draftVersion, presentVersion }) => live && draftState === 'draft' && draftVersion === presentVersion,
  );
}

/** Writes the basket's present set-up into the drafts of its clean parts. Call under their parts' rows and the basket's. */
export async function rewriteClean(work: By, basket: Basket, members: readonly BasketMember[]): Promise<void> {
  for (const member of cleanMembers(members)) {
    const draft = await draftById(work, member.draftId);
    const row = draft && (await requirementById(work, draft.requirementId));
    const plan = row && (await planById(work, row.planIssueId));
    if (!draft || !plan) throw notFound('Inspection');
    const asked = planRequirement.parse(row.content);
    const process = await processOf(work, basket, windowsOfRequirement(plan.criteria, asked.process));
    const content = cleanContent(asked, { ...basket, process }, member.scannedAt);
    const change = { content, shownReject: draft.shownReject, by: work.actor.id };
    // A bench that saved in this instant has marked the part: it keeps what it holds.
    if (!(await saveDraft(work, draft.id, member.draftVersion, change))) continue;
    await update(work, basketParts, { draftVersion: member.draftVersion + 1 }, { basketId: basket.id, draftId: member.draftId });
  }
}

/** Corrects set-up or count of an open basket. Problems: not-found, state-refused. */
export async function changeBasket(work: By, basketId: string, body: BodyOf<typeof contract>): Promise<Recorded<BasketAnswer>> {
  const known = await basketById(work, basketId);
  if (!known) throw notFound('Basket');
  refuseOthers(known, work.actor);
  const members = await membersOf(work, basketId);
  await takeRows(
    work,
    'parts',
    members.map(({ partId }) => partId),
  );
  const basket = await takeBasket(work, basketId);
  refuseOthers(basket, work.actor);
  refuseEndedBasket(basket);
  const change = {
    ...(body.countIn === undefined ? {} : { countIn: body.countIn }),
    ...(body.line === undefined ? {} : { line: body.line }),
    ...(body.process === undefined || basket.runId !== null ? {} : { process: body.process }),
    ...(body.acts === undefined ? {} : { acts: body.acts }),
  };
  if (Object.keys(change).length > 0) await update(work, baskets, change, { id: basketId });
  if (body.process !== undefined || body.acts !== undefined)
    await rewriteClean(work, { ...basket, ...change }, await membersOf(work, basketId));
  return {
    answer: await readBasket(work, basketId, work.now),
    events: [
      {
        subject: { kind: 'basket', id: basketId },
        details: {
          basket: basket.number,
          before: { countIn: basket.countIn, line: basket.line, process: basket.process, acts: basket.acts },
          changed: change,
        },
      },
    ],
  };
}

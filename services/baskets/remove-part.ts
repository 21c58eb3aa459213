import { takeRows } from '@/db/lock';
import { leaveBasket, memberOf } from '@/db/repositories/baskets';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketAnswer } from '@/services/contracts/baskets';
import { notFound } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { abandonInspection } from '@/services/inspections/abandon-inspection';
import { refuseEndedBasket, refuseOthers, takeBasket } from './own-basket';
import { readBasket } from './read-basket';

type By = Work & { readonly actor: Actor };

/** Gives up the draft of a part that is taken out; one that had ended at the bench stays as it is. Answers the draft's event. */
export async function giveUpDraft(
  work: By,
  member: { readonly draftId: string; readonly draftState: string },
  reason: string,
): Promise<Recorded<unknown>['events']> {
  if (member.draftState !== 'draft') return [];
  const { events } = await abandonInspection(work, member.draftId, reason);
  return events.map((event) => ({ ...event, kind: 'inspection-abandoned' as const }));
}

/** Takes a part out of an open basket, with the reason. Problems: not-found, state-refused. */
export async function removePart(work: By, basketId: string, partId: string, reason: string): Promise<Recorded<BasketAnswer>> {
  await takeRows(work, 'parts', [partId]);
  const basket = await takeBasket(work, basketId);
  refuseOthers(basket, work.actor);
  refuseEndedBasket(basket);
  const member = await memberOf(work, basketId, partId);
  if (!member) throw notFound('Part in this basket');
  const given = await giveUpDraft(work, member, reason);
  await leaveBasket(work, basketId, member.draftId, work.actor.id, reason);
  return {
    answer: await readBasket(work, basketId, work.now),
    events: [
      ...given,
      {
        subject: { kind: 'basket', id: basketId },
        also: [{ kind: 'part', id: partId }],
        details: { basket: basket.number, serial: member.serial, reason },
      },
    ],
  };
}

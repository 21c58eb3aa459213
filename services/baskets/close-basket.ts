import { takeRows } from '@/db/lock';
import { endBasket, leaveBasket, membersOf } from '@/db/repositories/baskets';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketAnswer } from '@/services/contracts/baskets';
import type { Recorded } from '@/services/http/route';
import { refuseEndedBasket, refuseOthers, takeBasket } from './own-basket';
import { readBasket } from './read-basket';
import { giveUpDraft } from './remove-part';

type By = Work & { readonly actor: Actor };

/** Gives up an open basket: every draft in it is given up and kept. Problems: not-found, state-refused. */
export async function closeBasket(work: By, basketId: string, reason: string): Promise<Recorded<BasketAnswer>> {
  const before = await membersOf(work, basketId);
  await takeRows(
    work,
    'parts',
    before.map(({ partId }) => partId),
  );
  const basket = await takeBasket(work, basketId);
  refuseOthers(basket, work.actor);
  refuseEndedBasket(basket);
  const events: Recorded<unknown>['events'][number][] = [];
  for (const member of (await membersOf(work, basketId)).filter(({ live }) => live)) {
    events.push(...(await giveUpDraft(work, member, reason)));
    await leaveBasket(work, basketId, member.draftId, work.actor.id, reason);
  }
  await endBasket(work, basketId, 'closed');
  return {
    answer: await readBasket(work, basketId, work.now),
    events: [...events, { subject: { kind: 'basket', id: basketId }, details: { basket: basket.number, reason } }],
  };
}

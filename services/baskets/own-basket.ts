import { takeRows } from '@/db/lock';
import { basketById, type Basket } from '@/db/repositories/baskets';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { notFound, Problem } from '@/services/http/problem';

/** Takes a basket's row and reads it; call after the rows of its parts are taken. Problem not-found. */
export async function takeBasket(work: Work, basketId: string): Promise<Basket> {
  await takeRows(work, 'baskets', [basketId]);
  const basket = await basketById(work, basketId);
  if (!basket) throw notFound('Basket');
  return basket;
}

/** A basket belongs to one evaluator: nobody else scans into it or signs it. Problem state-refused. */
export function refuseOthers(basket: Basket, actor: Pick<Actor, 'id'>): void {
  if (basket.evaluatorId !== actor.id)
    throw new Problem(
      'state-refused',
      `Basket ${basket.number} belongs to ${basket.evaluator}. Split it to go on with the parts that are left.`,
      [],
      { why: 'not-yours' },
    );
}

/** A signed or closed basket changes no more. Problem state-refused. */
export function refuseEndedBasket(basket: Basket): void {
  if (basket.state !== 'open')
    throw new Problem('state-refused', `Basket ${basket.number} is ${basket.state}; it takes no further change.`, [], {
      why: 'ended',
    });
}

import { newId, nextNumber } from '@/db/identity';
import { insert, update } from '@/db/models/table';
import { inspects } from '@/db/repositories/accounts';
import { baskets, type Basket } from '@/db/repositories/baskets';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketAnswer, splitBasket as contract } from '@/services/contracts/baskets';
import type { BodyOf } from '@/services/contracts/operation';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { judgingKind } from './clean-content';
import { refuseEndedBasket, takeBasket } from './own-basket';
import { readBasket } from './read-basket';

type By = Work & { readonly actor: Actor };

function wrong(path: string, message: string): Problem {
  return new Problem('invalid-input', `${path}: ${message}`, [{ path, message }]);
}

/** Who goes on: anyone may take what is left; only the evaluator hands it to somebody else. */
async function nextEvaluator(work: By, basket: Basket, to: string | undefined): Promise<string> {
  const next = to ?? work.actor.id;
  if (next === basket.evaluatorId) throw wrong('to', 'is the evaluator of this basket already');
  if (next !== work.actor.id && basket.evaluatorId !== work.actor.id)
    throw new Problem('state-refused', `Only ${basket.evaluator} hands this basket to somebody else; you may take it yourself.`);
  if (next !== work.actor.id && !(await inspects(work, next))) throw wrong('to', 'is not a person who inspects');
  return next;
}

/**
 * Splits a basket at a shift change: the scanned parts stay with who inspected them, the rest go on in a new basket with
 * the same set-up. The judging act's time is the scan's, so it is not carried over. Problems: invalid-input, state-refused.
 */
export async function splitBasket(work: By, basketId: string, body: BodyOf<typeof contract>): Promise<Recorded<BasketAnswer>> {
  const basket = await takeBasket(work, basketId);
  refuseEndedBasket(basket);
  const evaluatorId = await nextEvaluator(work, basket, body.to);
  const left = basket.countIn - basket.scanned - basket.out;
  if (left < 1)
    throw new Problem('state-refused', `All ${String(basket.countIn)} parts of basket ${basket.number} are accounted for.`);
  const count = body.count ?? left;
  if (count > left) throw wrong('count', `${String(left)} parts are not yet inspected`);
  const id = newId();
  const number = await nextNumber(work, 'B');
  const kind = judgingKind(basket.method);
  await insert(work, baskets, {
    id,
    number,
    drawingId: basket.drawingId,
    requirementKey: basket.requirementKey,
    operation: basket.operation,
    title: basket.title,
    method: basket.method,
    technique: basket.technique,
    line: basket.line,
    runId: basket.runId,
    process: basket.process,
    acts: basket.acts.map((act) => (act.kind === kind ? { ...act, person: null, at: null } : act)),
    countIn: count,
    state: 'open',
    evaluatorId,
    splitFrom: basketId,
    openedBy: work.actor.id,
    openedAt: work.now,
    endedAt: null,
    version: 1,
  });
  await update(work, baskets, { countIn: basket.countIn - count }, { id: basketId });
  const answer = await readBasket(work, id, work.now);
  return {
    answer,
    headers: { location: `/api/baskets/${id}` },
    events: [
      {
        subject: { kind: 'basket', id: basketId },
        also: [{ kind: 'basket', id }],
        details: { basket: basket.number, into: number, evaluator: answer.evaluator, count, stays: basket.countIn - count },
      },
    ],
  };
}

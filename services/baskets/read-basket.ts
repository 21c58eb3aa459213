import {
  basketById,
  basketsBefore,
  basketsSplitFrom,
  membersOf,
  signatureOf,
  type Basket,
  type BasketMember,
} from '@/db/repositories/baskets';
import { databaseNow, type Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketAnswer, BasketPart, BasketSummary, listBaskets as listContract } from '@/services/contracts/baskets';
import { judgeDraft } from '@/services/contracts/live-judgement';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { basketSentence } from '@/services/contracts/signing-sentence';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';
import { askEngine } from '@/services/inspections/ask-engine';
import { judgingSource, loadCase } from '@/services/inspections/load-case';
import { judgeSetUp, operationOf, processOf } from './set-up';

/** A basket as lists show it. */
export function summaryOf(basket: Basket): BasketSummary {
  const { id, number, state, partNumber, partTitle, line, runId, runNumber, runStanding, evaluatorId } = basket;
  return {
    id,
    number,
    state,
    partNumber,
    title: partTitle,
    requirement: {
      key: basket.requirementKey,
      operation: basket.operation,
      title: basket.title,
      method: basket.method,
      technique: basket.technique,
    },
    line,
    run:
      runId !== null && runNumber !== null && runStanding !== null
        ? { id: runId, number: runNumber, standing: runStanding }
        : null,
    counts: { in: basket.countIn, scanned: basket.scanned, out: basket.out },
    evaluator: { id: evaluatorId, name: basket.evaluator },
    openedAt: basket.openedAt,
    endedAt: basket.endedAt,
  };
}

function markOf(member: BasketMember): BasketPart['mark'] {
  if (!member.live) return 'taken-out';
  if (member.draftState === 'abandoned') return 'given-up';
  if (member.draftState === 'signed') return member.draftVersion === 0 ? 'signed' : 'signed-apart';
  return member.presentVersion === member.draftVersion ? 'clean' : 'marked';
}

/** One row; a marked draft is judged as the bench would. */
export async function describeMember(reading: Reading, member: BasketMember, now: string): Promise<BasketPart> {
  const mark = markOf(member);
  let verdict = member.verdict;
  if (mark === 'marked') {
    const inspection = await loadCase(reading, member.draftId, now);
    const source = await judgingSource(reading, inspection, inspection.draft.content);
    verdict = judgeDraft(source, askEngine).evaluation?.verdictSoFar ?? 'not-evaluable';
  }
  return {
    part: member.partId,
    serial: member.serial,
    revision: member.revision,
    planIssue: member.planIssue,
    inspection: member.draftId,
    number: member.number,
    scannedAt: member.scannedAt,
    mark,
    held: member.held,
    verdict,
    reason: member.outReason,
  };
}

/** What one signature would say of the basket as it stands. */
export function sentenceOf(basket: Basket, name: string, count: number): string {
  const { number, partNumber, operation, title } = basket;
  return basketSentence({ name, basket: number, partNumber, operation, title, count });
}

/** Everything the page of a basket needs. Problem not-found. */
export async function readBasket(reading: Reading, basketId: string, at?: string): Promise<BasketAnswer> {
  const basket = await basketById(reading, basketId);
  if (!basket) throw notFound('Basket');
  const now = at ?? (await databaseNow(reading));
  const operation = await operationOf(reading, basket.partNumber, basket.requirementKey);
  const windows = operation?.windows ?? [];
  const process = await processOf(reading, basket, windows);
  const parts: BasketPart[] = [];
  for (const member of await membersOf(reading, basketId)) parts.push(await describeMember(reading, member, now));
  return {
    ...summaryOf(basket),
    version: basket.version,
    process,
    acts: basket.acts,
    windows: [...windows],
    setUp: operation
      ? judgeSetUp(operation, basket, process)
      : { void: false, judged: [], faults: [{ path: 'requirement', message: 'no approved plan issue asks for it any more' }] },
    splitFrom: basket.splitFrom !== null ? { id: basket.splitFrom, number: basket.splitNumber ?? '' } : null,
    splitInto: await basketsSplitFrom(reading, basketId),
    parts,
    sentence: sentenceOf(basket, basket.evaluator, basket.scanned),
    signed: (await signatureOf(reading, basketId)) ?? null,
  };
}

/** Baskets, newest first. */
export async function listBaskets(
  reading: Reading & { readonly actor: Actor },
  query: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const before = partsOfKey(query.after, 2);
  const rows = await basketsBefore(
    reading,
    { state: query.state, evaluatorId: query.mine === 'true' ? reading.actor.id : undefined },
    before && [String(before[0]), String(before[1])],
    query.limit + 1,
  );
  return pageOf(rows, query.limit, ({ openedAt, id }) => [openedAt, id], summaryOf);
}

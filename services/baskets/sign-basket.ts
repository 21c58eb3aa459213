import { createHash, randomBytes } from 'node:crypto';
import { takeRows } from '@/db/lock';
import { insert, insertAll, update } from '@/db/models/table';
import {
  basketById,
  basketParts,
  basketSignatures,
  endBasket,
  membersOf,
  type Basket,
  type BasketMember,
} from '@/db/repositories/baskets';
import { runInspections } from '@/db/repositories/runs';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BasketSigned } from '@/services/contracts/baskets';
import { basketPartSentence } from '@/services/contracts/signing-sentence';
import { canonicalJson } from '@/services/engine/record/canonical';
import { notFound, Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import type { RecordParts } from '@/services/inspections/build-record';
import { loadCase } from '@/services/inspections/load-case';
import { refusePart } from '@/services/inspections/open-inspection';
import { signable, signChecked } from '@/services/inspections/sign-inspection';
import { isVoid } from '@/services/inspections/signing-reasons';
import { rewriteClean } from './change-basket';
import { refuseOthers, takeBasket } from './own-basket';
import { sentenceOf } from './read-basket';

type By = Work & { readonly actor: Actor };
type Checked = Omit<RecordParts, 'number'>;

const inBasket = ({ live, draftState }: BasketMember) => live && draftState === 'draft';

/** Reasons against the basket as a whole: what was counted, what was scanned, what was put in. */
function countReasons(basket: Basket, members: readonly BasketMember[], counted: number): FieldError[] {
  const reasons: FieldError[] = [];
  if (members.length === 0) reasons.push({ path: 'parts', message: 'no part is in the basket' });
  if (counted !== members.length)
    reasons.push({ path: 'count', message: `${String(counted)} were counted, ${String(members.length)} are scanned` });
  const accounted = members.length + basket.out;
  if (accounted !== basket.countIn)
    reasons.push({
      path: 'countIn',
      message: `${String(basket.countIn)} were put in; ${String(members.length)} scanned and ${String(basket.out)} out make ${String(accounted)}`,
    });
  return reasons;
}

/** Every reason against one part, told by its serial; its checked record when there is none. */
async function checkMember(work: By, basket: Basket, member: BasketMember, sentence: string): Promise<Checked | FieldError[]> {
  try {
    const inspection = await loadCase(work, member.draftId, work.now);
    refusePart(inspection.part);
    const checked = await signable(work, inspection, (subject) => basketPartSentence(sentence, subject));
    // A technique's window may be narrower than the plan's: then the engine has not voided the inspection, the run has.
    if (basket.runStanding === 'void' && !isVoid(checked.evaluation))
      return [{ path: member.serial, message: `run ${basket.runNumber ?? ''} is void; the part is processed again` }];
    return checked;
  } catch (error) {
    return reasonsOf(error, member.serial);
  }
}

function reasonsOf(error: unknown, serial: string): FieldError[] {
  if (!(error instanceof Problem) || !['not-signable', 'state-refused'].includes(error.code)) throw error;
  if (error.errors.length === 0) return [{ path: serial, message: error.message }];
  return error.errors.map(({ path, message }) => ({ path: `${serial}.${path}`, message }));
}

function refuse(reasons: readonly FieldError[]): never {
  const shown = reasons.slice(0, 12).map(({ path, message }) => `${path}: ${message}`);
  throw new Problem('not-signable', `${String(reasons.length)} reason(s): ${shown.join('; ')}`, reasons);
}

/** Takes parts, run, basket and drafts in that order, each in id order, and reads what may be signed. */
async function takeAll(work: By, basketId: string): Promise<{ basket: Basket; members: BasketMember[] }> {
  const known = await basketById(work, basketId);
  if (!known) throw notFound('Basket');
  refuseOthers(known, work.actor);
  const before = (await membersOf(work, basketId)).filter(inBasket);
  await takeRows(
    work,
    'parts',
    before.map(({ partId }) => partId),
  );
  if (known.runId !== null) await takeRows(work, 'runs', [known.runId]);
  const basket = await takeBasket(work, basketId);
  if (basket.state !== 'open')
    throw new Problem('state-refused', `Basket ${basket.number} is ${basket.state} already.`, [], { why: 'ended' });
  // What a run says now counts; clean drafts follow it, marked ones are judged by it at the bench.
  if (basket.runId !== null) await rewriteClean(work, basket, await membersOf(work, basketId));
  const members = (await membersOf(work, basketId)).filter(inBasket);
  const taken = new Set(before.map(({ partId }) => partId));
  if (members.some(({ partId }) => !taken.has(partId)))
    throw new Problem('state-refused', 'A part was scanned while you signed. Look at the count again.', [], {
      why: 'scanned-meanwhile',
    });
  await takeRows(
    work,
    'inspection_drafts',
    members.map(({ draftId }) => draftId),
  );
  return { basket, members };
}

async function writeAll(work: By, checked: readonly Checked[]): Promise<Awaited<ReturnType<typeof signChecked>>[]> {
  const signed: Awaited<ReturnType<typeof signChecked>>[] = [];
  for (const one of checked) {
    try {
      signed.push(await signChecked(work, one));
    } catch (error) {
      refuse(reasonsOf(error, one.inspection.part.serial));
    }
  }
  return signed;
}

/** The canonical bytes of what the one signature covered. */
function basketRecord(work: By, basket: Basket, sentence: string, inspections: BasketSigned['inspections']): Buffer {
  const { id, number, partNumber, requirementKey, operation, title, method, technique, line, runNumber } = basket;
  const record = {
    schema: 1,
    kind: 'basket',
    id,
    number,
    partNumber,
    requirement: { key: requirementKey, operation, title, method, technique },
    line,
    run: runNumber,
    process: basket.process,
    acts: basket.acts,
    counts: { in: basket.countIn, scanned: inspections.length, out: basket.out },
    opened: { by: basket.openedBy, at: basket.openedAt },
    inspections: inspections.map(({ serial, inspection, number: signed, verdict }) => ({
      serial,
      inspection,
      number: signed,
      verdict,
    })),
    sentence,
    signer: { id: work.actor.id, name: work.actor.name },
    signedAt: work.now,
    nonce: randomBytes(16).toString('hex'),
  };
  return Buffer.from(canonicalJson(JSON.parse(JSON.stringify(record))), 'utf8');
}

async function keepSignature(
  work: By,
  basket: Basket,
  sentence: string,
  inspections: BasketSigned['inspections'],
): Promise<string> {
  const record = basketRecord(work, basket, sentence, inspections);
  const recordDigest = createHash('sha256').update(record).digest('hex');
  await insert(work, basketSignatures, {
    basketId: basket.id,
    count: inspections.length,
    sentence,
    record,
    recordDigest,
    signedBy: work.actor.id,
    signedAt: work.now,
  });
  for (const { inspection } of inspections)
    await update(work, basketParts, { draftVersion: 0 }, { basketId: basket.id, draftId: inspection });
  if (basket.runId !== null)
    await insertAll(
      work,
      runInspections,
      inspections.map(({ inspection, part }) => ({ runId: basket.runId ?? '', inspectionId: inspection, partId: part })),
    );
  if (!(await endBasket(work, basket.id, 'signed')))
    throw new Problem('state-refused', `Basket ${basket.number} was ended meanwhile.`);
  return recordDigest;
}

/**
 * One signature for every part in the basket: each draft is checked by the reasons of a single signature, all are told
 * at once by serial, then all records are written or none. Problems: not-found, state-refused, not-signable.
 */
export async function signBasket(work: By, basketId: string, counted: number): Promise<Recorded<BasketSigned>> {
  const { basket, members } = await takeAll(work, basketId);
  const reasons = countReasons(basket, members, counted);
  const sentence = sentenceOf(basket, work.actor.name, members.length);
  const checked: Checked[] = [];
  for (const member of members) {
    const found = await checkMember(work, basket, member, sentence);
    if (Array.isArray(found)) reasons.push(...found);
    else checked.push(found);
  }
  if (reasons.length > 0) refuse(reasons);
  const signed = await writeAll(work, checked);
  const inspections = signed.map(({ answer }, place) => {
    const part = checked[place]?.inspection.part;
    const { inspection, number, verdict, findings } = answer;
    return { serial: part?.serial ?? '', part: part?.id ?? '', inspection, number, verdict, findings };
  });
  const recordDigest = await keepSignature(work, basket, sentence, inspections);
  return {
    answer: { basket: basketId, number: basket.number, sentence, count: inspections.length, inspections },
    headers: { location: `/api/baskets/${basketId}` },
    events: [
      ...signed.flatMap(({ events }) =>
        events.map((event) => ({ ...event, kind: event.kind ?? ('inspection-signed' as const) })),
      ),
      {
        subject: { kind: 'basket', id: basketId },
        also: inspections.map(({ part }) => ({ kind: 'part', id: part })),
        details: {
          number: basket.number,
          sentence,
          recordDigest,
          counts: { in: basket.countIn, scanned: inspections.length, out: basket.out },
          inspections: inspections.map(({ serial, number, verdict }) => ({ serial, number, verdict })),
        },
      },
    ],
  };
}

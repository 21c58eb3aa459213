import { insert } from '@/db/models/table';
import { basketById, basketOfDraft, basketParts, leaveBasket, memberOf, type Basket } from '@/db/repositories/baskets';
import type { Draft } from '@/db/repositories/drafts';
import { partById, requirementsOfParts, type PartRequirement } from '@/db/repositories/parts';
import { planById, requirementById } from '@/db/repositories/plans';
import { partsWithSerial, type Candidate } from '@/db/repositories/scans';
import { takeRows } from '@/db/lock';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { mostParts, type ScanAnswer, type scanPart as contract } from '@/services/contracts/baskets';
import type { BodyOf } from '@/services/contracts/operation';
import { planRequirement } from '@/services/contracts/plan-content';
import { windowsOfRequirement } from '@/services/contracts/plan-windows';
import { readScan } from '@/services/contracts/scan-text';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { openDraft } from '@/services/inspections/open-inspection';
import { metStates } from '@/services/parts/recount-part';
import { cleanContent } from './clean-content';
import { refuseEndedBasket, refuseOthers, takeBasket } from './own-basket';
import { describeMember } from './read-basket';
import { processOf } from './set-up';

type By = Work & { readonly actor: Actor };

/** Why a scan was not taken; each has its own tone and word at the basket. */
type Why =
  | 'unknown'
  | 'wrong-part'
  | 'wrong-operation'
  | 'already-accepted'
  | 'undecided'
  | 'held'
  | 'elsewhere'
  | 'not-inspectable'
  | 'full';

function refusal(why: Why, message: string): Problem {
  return why === 'unknown'
    ? new Problem('invalid-input', message, [{ path: 'scan', message }], { why })
    : new Problem('state-refused', message, [{ path: 'scan', message }], { why });
}

/** The one part of the basket's part number with the scanned serial. */
async function scannedPart(work: By, basket: Basket, scan: string): Promise<Candidate> {
  const read = readScan(scan);
  const candidates = read ? await partsWithSerial(work, read.serial) : [];
  const named = candidates.filter(({ partNumber }) => read?.partNumber === null || partNumber === read?.partNumber);
  if (named.length === 0) throw refusal('unknown', `No part has the serial ${(read?.serial ?? scan).slice(0, 60)}.`);
  const own = named.find(({ drawingId }) => drawingId === basket.drawingId);
  if (own) return own;
  const other = named[0];
  throw refusal(
    'wrong-part',
    `${other?.serial ?? ''} is ${other?.partNumber ?? ''}; this basket holds ${basket.partNumber}. Put it where it belongs.`,
  );
}

/** The row of the part's route that the basket inspects. */
async function standingIn(work: By, basket: Basket, candidate: Candidate): Promise<PartRequirement> {
  const route = (await requirementsOfParts(work, [candidate.id])).get(candidate.id) ?? [];
  const standing = route.find(({ key }) => key === basket.requirementKey);
  if (standing?.method !== basket.method || standing.technique !== basket.technique)
    throw refusal(
      'wrong-operation',
      `The plan of ${candidate.serial} does not ask for ${basket.operation} ${basket.title} by ${basket.technique ?? 'no technique'}.`,
    );
  const named = `${basket.operation} ${basket.title}`;
  if (metStates.includes(standing.state))
    throw refusal(
      'already-accepted',
      `${candidate.serial} has met ${named} already. Inspect it again at its page, with the reason.`,
    );
  if (standing.state === 'rejected' || standing.state === 'awaiting-decision')
    throw refusal('undecided', `${candidate.serial} waits for a decision about ${named}. Keep it apart.`);
  return standing;
}

async function refuseState(work: By, { id, serial }: Candidate): Promise<void> {
  const part = await partById(work, id);
  if (part?.held) throw refusal('held', `${serial} is held. Keep it apart; a reviewer lifts the hold.`);
  if (part && !['serialised', 'in-process', 'finished', 'returned'].includes(part.state))
    throw refusal('not-inspectable', `${serial} is ${part.state}; it is not inspected any more.`);
}

async function elsewhere(work: By, serial: string, draft: Draft): Promise<Problem> {
  const other = await basketOfDraft(work, draft.id);
  return refusal(
    'elsewhere',
    other
      ? `${serial} is in basket ${other.number}. Take it out there first.`
      : `${serial} has an inspection open at the bench, by ${draft.changedName}. Sign it or give it up there.`,
  );
}

const longestWaitMs = 12 * 3600 * 1000;

/** How long a scan waited in the browser for the network, in milliseconds; 0 when it did not say. */
export function waitedMsOf(request: Request): number {
  const waited = Number(request.headers.get('scan-waited-ms') ?? '0');
  return Number.isInteger(waited) && waited > 0 ? Math.min(waited, longestWaitMs) : 0;
}

/** Database time less what the scan waited for the network, never before the basket was opened. */
function scannedAt(now: string, waitedMs: number, openedAt: string): string {
  if (waitedMs === 0) return now;
  const earlier = `${new Date(Date.parse(now) - waitedMs).toISOString().slice(0, 23)}000Z`;
  return earlier < openedAt ? openedAt : earlier;
}

async function cleanFor(work: By, basket: Basket, standing: PartRequirement, at: string) {
  const row = await requirementById(work, standing.requirementId);
  const plan = row && (await planById(work, row.planIssueId));
  if (!plan) throw notFound('Plan issue');
  const asked = planRequirement.parse(row.content);
  const process = await processOf(work, basket, windowsOfRequirement(plan.criteria, asked.process));
  return cleanContent(asked, { ...basket, process }, at);
}

/**
 * Puts one scanned part into the basket as inspected and clean: its draft is written, the bench can open it to mark.
 * Under the part's row and then the basket's, so fifty scans of one part at once count once.
 */
export async function scanPart(
  work: By,
  basketId: string,
  body: BodyOf<typeof contract>,
  waitedMs: number,
): Promise<Recorded<ScanAnswer>> {
  const known = await basketById(work, basketId);
  if (!known) throw notFound('Basket');
  refuseOthers(known, work.actor);
  const candidate = await scannedPart(work, known, body.scan);
  await takeRows(work, 'parts', [candidate.id]);
  const basket = await takeBasket(work, basketId);
  refuseOthers(basket, work.actor);
  const there = await memberOf(work, basketId, candidate.id);
  if (there && (there.draftState === 'draft' || basket.state !== 'open')) {
    const counts = { in: basket.countIn, scanned: basket.scanned, out: basket.out };
    const part = await describeMember(work, there, work.now);
    return { answer: { outcome: 'already', part, counts }, status: 200, events: [] };
  }
  refuseEndedBasket(basket);
  if (basket.scanned >= mostParts) throw refusal('full', `A basket takes ${String(mostParts)} parts. Open another.`);
  await refuseState(work, candidate);
  const standing = await standingIn(work, basket, candidate);
  const at = scannedAt(work.now, waitedMs, basket.openedAt);
  const opened = await openDraft(
    work,
    { subject: { part: candidate.id }, requirement: standing.requirementId },
    await cleanFor(work, basket, standing, at),
  );
  if (opened.live) throw await elsewhere(work, candidate.serial, opened.live);
  if (there) await leaveBasket(work, basketId, there.draftId, work.actor.id, 'given up at the bench');
  await insert(work, basketParts, {
    basketId,
    partId: candidate.id,
    draftId: opened.draftId,
    draftVersion: 1,
    live: 1,
    scan: body.scan,
    scannedAt: at,
  });
  return answerAdded(work, basketId, candidate, opened.events, waitedMs);
}

async function answerAdded(
  work: By,
  basketId: string,
  { id, serial }: Candidate,
  opening: Recorded<unknown>['events'],
  waitedMs: number,
): Promise<Recorded<ScanAnswer>> {
  const [basket, member] = [await basketById(work, basketId), await memberOf(work, basketId, id)];
  if (!basket || !member) throw new Error('the part just scanned is not there');
  return {
    answer: {
      outcome: 'added',
      part: await describeMember(work, member, work.now),
      counts: { in: basket.countIn, scanned: basket.scanned, out: basket.out },
    },
    events: [
      ...opening.map((event) => ({ ...event, kind: 'inspection-opened' as const })),
      {
        subject: { kind: 'basket', id: basketId },
        also: [{ kind: 'part', id }],
        details: { basket: basket.number, serial, scannedAt: member.scannedAt, waitedMs },
      },
    ],
  };
}

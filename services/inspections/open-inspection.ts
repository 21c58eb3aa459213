import { newId } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { insert, update } from '@/db/models/table';
import { drafts, liveDraft, type Draft } from '@/db/repositories/drafts';
import { partById, partRequirements, requirementsOfParts, type PartRequirement, type PartSummary } from '@/db/repositories/parts';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { inspectionContent, type InspectionContent } from '@/services/contracts/inspection-content';
import type { InspectionAnswer, RepeatReason } from '@/services/contracts/inspections';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { recountPart } from '@/services/parts/recount-part';
import { describeInspection } from './describe-inspection';

interface Asked {
  readonly subject: { readonly part: string };
  readonly requirement: string;
  readonly repeatReason?: RepeatReason | undefined;
}

/** Part states in which inspection goes on. */
const inspectable: readonly string[] = ['serialised', 'in-process', 'finished', 'returned'];

/** Refuses a part that is past inspection, or held. Also asked again when signing. */
export function refusePart(part: PartSummary): void {
  if (!inspectable.includes(part.state))
    throw new Problem('state-refused', `Serial ${part.serial} is ${part.state}; it cannot be inspected.`);
  if (part.held) throw new Problem('state-refused', `Serial ${part.serial} is held; a reviewer has to lift the hold first.`);
}

function refuseRequirement(standing: PartRequirement, repeat: RepeatReason | undefined): void {
  const named = `${standing.operation} ${standing.title}`;
  switch (standing.state) {
    case 'rejected':
    case 'awaiting-decision':
      throw new Problem(
        'state-refused',
        `${named} was found ${standing.state === 'rejected' ? 'rejected' : 'undecided'}; its finding needs a disposition before the inspection is repeated.`,
      );
    case 'open':
    case 'in-work':
    case 'to-be-repeated':
      return;
    default:
      if (repeat === undefined)
        throw new Problem(
          'state-refused',
          `${named} is ${standing.state}. To inspect it again, name the reason (repeatReason).`,
          [{ path: 'repeatReason', message: 'is needed to inspect a met requirement again' }],
        );
  }
}

/** Why a requirement that waits for repetition is inspected again, when the person names nothing else. */
function repeatReasonOf(standing: PartRequirement, asked: RepeatReason | undefined): RepeatReason | null {
  if (asked !== undefined) return asked;
  if (standing.state !== 'to-be-repeated') return null;
  if (standing.reason?.startsWith('re-interpretation')) return 're-read';
  return standing.reason?.startsWith('void') ? 'repeat' : 're-inspect-after-rework';
}

async function answered(
  work: Work,
  inspectionId: string,
): Promise<{ answer: InspectionAnswer; headers: Record<string, string> }> {
  const answer = await describeInspection(work, inspectionId, work.now);
  return { answer, headers: { etag: `"${String(answer.version)}"`, location: `/api/inspections/${inspectionId}` } };
}

export interface OpenedDraft {
  readonly draftId: string;
  readonly part: PartSummary;
  readonly standing: PartRequirement;
  /** The draft was there already: nothing was written. */
  readonly live: Draft | null;
  /** The state before is kept here, so that giving the draft up can put it back. Empty when the draft was there. */
  readonly events: Recorded<InspectionAnswer>['events'];
}

/**
 * Writes the draft of a part's requirement under the part's row, or finds the live one. The content is what is known
 * from the start. Problems: not-found, invalid-input, state-refused.
 */
export async function openDraft(
  work: Work & { readonly actor: Actor },
  asked: Asked,
  content: InspectionContent = inspectionContent.parse({}),
): Promise<OpenedDraft> {
  const partId = asked.subject.part;
  await takeRows(work, 'parts', [partId]);
  const part = await partById(work, partId);
  if (!part) throw notFound('Part');
  const route = (await requirementsOfParts(work, [partId])).get(partId) ?? [];
  const standing = route.find(({ requirementId, key }) => requirementId === asked.requirement || key === asked.requirement);
  if (!standing)
    throw new Problem('invalid-input', 'requirement: is not a requirement of this part', [
      { path: 'requirement', message: 'is not a requirement of this part' },
    ]);
  const live = await liveDraft(work, partId, standing.requirementId);
  if (live) return { draftId: live.id, part, standing, live, events: [] };
  refusePart(part);
  refuseRequirement(standing, asked.repeatReason);
  const repeatReason = repeatReasonOf(standing, asked.repeatReason);
  const draftId = newId();
  await insert(work, drafts, {
    id: draftId,
    partId,
    requirementId: standing.requirementId,
    cycle: standing.cycle,
    state: 'draft',
    live: 1,
    content,
    shownReject: false,
    repeatReason,
    openedBy: work.actor.id,
    openedAt: work.now,
    changedBy: work.actor.id,
    changedAt: work.now,
    version: 1,
  });
  await update(work, partRequirements, { state: 'in-work' }, { partId, position: standing.position });
  await recountPart(work, partId);
  const { operation, title, state: priorState } = standing;
  return {
    draftId,
    part,
    standing,
    live: null,
    events: [
      {
        subject: { kind: 'inspection', id: draftId },
        also: [{ kind: 'part', id: partId }],
        details: { serial: part.serial, operation, title, priorState, repeatReason },
      },
    ],
  };
}

/** Opens the inspection of a part's requirement, or answers the live draft: two at once get the same one. */
export async function openInspection(work: Work & { readonly actor: Actor }, asked: Asked): Promise<Recorded<InspectionAnswer>> {
  const { draftId, live, events } = await openDraft(work, asked);
  return { ...(await answered(work, draftId)), ...(live ? { status: 200 } : {}), events };
}

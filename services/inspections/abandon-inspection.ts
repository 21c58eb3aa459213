import { takeRows } from '@/db/lock';
import { update } from '@/db/models/table';
import { draftById, endDraft } from '@/db/repositories/drafts';
import { eventsOf } from '@/db/repositories/events';
import { partRequirements, requirementsOfParts } from '@/db/repositories/parts';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { requirementState, type RequirementState } from '@/services/contracts/common';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { recountPart } from '@/services/parts/recount-part';
import { refuseEnded } from './change-inspection';
import { describeInspection } from './describe-inspection';

/** The state a requirement had before the draft was opened, from the journal. */
async function stateBefore(work: Work, draftId: string): Promise<RequirementState> {
  const opened = (await eventsOf(work, { kind: 'inspection', id: draftId }, 5)).find(({ kind }) => kind === 'inspection-opened');
  const prior = requirementState.safeParse(opened?.details.priorState);
  return prior.success && prior.data !== 'in-work' ? prior.data : 'open';
}

/** Gives a draft up. It is kept as abandoned, and whether a red verdict had been shown goes to the journal. */
export async function abandonInspection(
  work: Work & { readonly actor: Actor },
  draftId: string,
  reason: string | null,
): Promise<Recorded<InspectionAnswer>> {
  const found = await draftById(work, draftId);
  if (!found) throw notFound('Inspection');
  refuseEnded(found);
  await takeRows(work, 'parts', [found.partId]);
  if (!(await endDraft(work, draftId, 'abandoned'))) throw new Problem('state-refused', 'This inspection was ended meanwhile.');
  const route = (await requirementsOfParts(work, [found.partId])).get(found.partId) ?? [];
  const standing = route.find(({ requirementId }) => requirementId === found.requirementId);
  // A disposition may have moved the requirement meanwhile; only what this draft set is put back.
  if (standing?.state === 'in-work')
    await update(
      work,
      partRequirements,
      { state: await stateBefore(work, draftId) },
      { partId: found.partId, position: standing.position },
    );
  await recountPart(work, found.partId);
  const answer = await describeInspection(work, draftId, work.now);
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"` },
    events: [
      {
        subject: { kind: 'inspection', id: draftId },
        also: [{ kind: 'part', id: found.partId }],
        details: { reason, shownReject: found.shownReject, version: found.version },
      },
    ],
  };
}

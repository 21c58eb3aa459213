import { draftById } from '@/db/repositories/drafts';
import { dropLink, evidenceById, evidenceOfInspection, putLink } from '@/db/repositories/evidence';
import { execute, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { linkEvidence as linkContract } from '@/services/contracts/inspections';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { refuseEnded } from './change-inspection';
import { describeLink } from './describe-evidence';

type By = Work & { readonly actor: Actor };

/** A signed inspection's files never change: the draft's row is written first, so that a signature at the same moment waits. */
async function takeDraft(work: By, inspectionId: string): Promise<void> {
  const taken = await execute(work, 'UPDATE inspection_drafts SET shown_reject = shown_reject + 0 WHERE id = ? AND live = 1', [
    inspectionId,
  ]);
  const draft = await draftById(work, inspectionId);
  if (!draft) throw notFound('Inspection');
  refuseEnded(draft);
  if (taken === 0 && draft.live === null) throw new Problem('state-refused', 'This inspection no longer changes.');
}

/** Attaches an admitted file to a draft, or changes how it is attached. */
export async function linkEvidence(
  work: By,
  inspectionId: string,
  evidenceId: string,
  body: BodyOf<typeof linkContract>,
): Promise<Recorded<AnswerOf<typeof linkContract>>> {
  await takeDraft(work, inspectionId);
  const file = await evidenceById(work, evidenceId);
  if (!file) throw notFound('File');
  await putLink(work, {
    inspectionId,
    evidenceId,
    role: body.role,
    view: body.view ?? null,
    registration: body.registration ?? null,
    linkedBy: work.actor.id,
    linkedAt: work.now,
  });
  return {
    answer: { evidence: (await evidenceOfInspection(work, inspectionId)).map(describeLink) },
    events: [
      {
        subject: { kind: 'inspection', id: inspectionId },
        also: [{ kind: 'evidence', id: evidenceId }],
        details: { sha256: file.sha256, name: file.name, role: body.role, view: body.view ?? null },
      },
    ],
  };
}

/** Detaches a file from a draft; the file itself stays. */
export async function unlinkEvidence(work: By, inspectionId: string, evidenceId: string): Promise<Recorded<undefined>> {
  await takeDraft(work, inspectionId);
  const file = await evidenceById(work, evidenceId);
  if (!file || !(await dropLink(work, inspectionId, evidenceId))) throw notFound('File');
  return {
    answer: undefined,
    events: [
      {
        subject: { kind: 'inspection', id: inspectionId },
        also: [{ kind: 'evidence', id: evidenceId }],
        details: { sha256: file.sha256, name: file.name },
      },
    ],
  };
}

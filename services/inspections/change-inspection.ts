import { insertAll, update } from '@/db/models/table';
import { draftById, draftChanges, drafts, saveDraft, type Draft } from '@/db/repositories/drafts';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { inspectionContent, type InspectionContent, type InspectionPatch } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { judgeDraft } from '@/services/contracts/live-judgement';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { askEngine } from './ask-engine';
import { changedAfterVerdict } from './changed-after-verdict';
import { describeInspection } from './describe-inspection';
import { judgingSource, loadCase } from './load-case';

/** Refuses what is no longer a draft. */
export function refuseEnded(draft: Draft): void {
  if (draft.state !== 'draft') throw new Problem('state-refused', `This inspection is ${draft.state}; it no longer changes.`);
}

/** Another tab or person was faster: the answer carries both the present content and its version, so that nothing is lost. */
function changedMeanwhile(draft: Draft): Problem {
  return new Problem(
    'changed-meanwhile',
    `${draft.changedName} saved this inspection at ${draft.changedAt}. What you entered was not saved over it.`,
    [],
    {
      present: draft.content,
      version: draft.version,
      changed: { id: draft.changedBy, name: draft.changedName, at: draft.changedAt },
    },
  );
}

/** Half a character (a torn emoji) cannot be kept in UTF-8: it becomes the replacement sign, as everywhere on the way. */
function wellFormed(value: unknown): unknown {
  if (typeof value === 'string') return Buffer.from(value, 'utf8').toString('utf8');
  if (Array.isArray(value)) return value.map(wellFormed);
  if (typeof value !== 'object' || value === null) return value;
  return Object.fromEntries(Object.entries(value).map(([key, inner]) => [String(wellFormed(key)), wellFormed(inner)]));
}

function merged(before: InspectionContent, patch: InspectionPatch): InspectionContent {
  const sent = Object.fromEntries(Object.entries(patch).filter(([, value]) => value !== undefined));
  return inspectionContent.parse(wellFormed({ ...before, ...sent }));
}

/** Saves a draft as typed. Problems: version-needed, changed-meanwhile, state-refused, not-found. */
export async function changeInspection(
  work: Work & { readonly actor: Actor },
  draftId: string,
  patch: InspectionPatch,
  ifMatch: number | null,
): Promise<Recorded<InspectionAnswer>> {
  if (ifMatch === null) throw new Problem('version-needed', 'Send If-Match with the version you read.');
  const found = await draftById(work, draftId);
  if (!found) throw notFound('Inspection');
  refuseEnded(found);
  if (found.version !== ifMatch) throw changedMeanwhile(found);
  // Claiming the version writes the row, so nobody changes what is compared below.
  const claimed = await saveDraft(work, draftId, ifMatch, {
    content: found.content,
    shownReject: found.shownReject,
    by: work.actor.id,
  });
  if (!claimed) {
    const present = await draftById(work, draftId);
    if (!present) throw notFound('Inspection');
    refuseEnded(present);
    throw changedMeanwhile(present);
  }
  const inspection = await loadCase(work, draftId, work.now);
  const before = found.content;
  const after = merged(before, patch);
  const shown = judgeDraft(await judgingSource(work, inspection, before), askEngine).evaluation;
  const now = judgeDraft(await judgingSource(work, inspection, after), askEngine).evaluation;
  const kept = changedAfterVerdict(before, after, shown);
  await insertAll(
    work,
    draftChanges,
    kept.map(({ field, before: beforeValue, verdictShown }) => ({
      draftId,
      field,
      beforeValue,
      verdictShown,
      changedBy: work.actor.id,
      changedAt: work.now,
    })),
  );
  await update(
    work,
    drafts,
    { content: after, shownReject: found.shownReject || now?.verdictSoFar === 'reject' },
    { id: draftId },
  );
  const answer = await describeInspection(work, draftId, work.now);
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"` },
    events: [
      {
        subject: { kind: 'inspection', id: draftId },
        details: {
          version: answer.version,
          changed: Object.keys(patch).sort(),
          keptValues: kept.map(({ field, verdictShown }) => ({ field, verdictShown })),
        },
      },
    ],
  };
}

import { takeRows } from '@/db/lock';
import { keepDraft, keepHand, rewriteDraft, takeIssues, type WrittenTechnique } from '@/db/repositories/techniques';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type {
  changeTechnique as changeContract,
  draftTechnique as draftContract,
  Technique,
} from '@/services/contracts/techniques';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { technique } from './read-technique';

type By = Work & { readonly actor: Actor };

function written({ title, standard, customerApproval, content }: BodyOf<typeof changeContract>): WrittenTechnique {
  return { title, standard, customerApproval: customerApproval ?? null, content };
}

async function answered(work: By, id: string): Promise<Recorded<Technique>> {
  const answer = await technique(work, id);
  const { number, issue, method, title } = answer;
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"`, location: `/api/techniques/${id}` },
    events: [{ subject: { kind: 'technique', id }, details: { number, issue, method, title, content: answer.content } }],
  };
}

/** Starts the next issue of a technique. Problems: state-refused while another draft is open, invalid-input for another method. */
export async function draftTechnique(
  work: By,
  { number, method, ...body }: BodyOf<typeof draftContract>,
): Promise<Recorded<Technique>> {
  const [newest, ...earlier] = await takeIssues(work, number);
  const open = [...(newest ? [newest] : []), ...earlier].find(({ state }) => state === 'draft' || state === 'checked');
  if (open)
    throw new Problem('state-refused', `${number} issue ${String(open.issue)} is ${open.state}; finish or withdraw it first.`);
  if (newest && newest.method !== method)
    throw new Problem('invalid-input', `method: ${number} is a technique of ${newest.method}`, [
      { path: 'method', message: `${number} is a technique of ${newest.method}` },
    ]);
  const issue = (newest?.issue ?? 0) + 1;
  return answered(work, await keepDraft(work, { number, issue, method, ...written(body) }, work.actor.id));
}

/** Replaces what a draft says; `ifMatch` must be the version that was read. */
export async function changeTechnique(
  work: By,
  techniqueId: string,
  body: BodyOf<typeof changeContract>,
  ifMatch: number | null,
): Promise<Recorded<Technique>> {
  if (ifMatch === null) throw new Problem('version-needed', 'Send If-Match with the version you read.');
  await takeRows(work, 'technique_issues', [techniqueId]);
  const present = await technique(work, techniqueId);
  if (present.state !== 'draft')
    throw new Problem('state-refused', `Issue ${String(present.issue)} is ${present.state}; only a draft changes.`);
  const version = present.version - 1;
  if (version !== ifMatch)
    throw new Problem('changed-meanwhile', 'Somebody saved this draft since you read it.', [], {
      present: present.content,
      version,
    });
  await rewriteDraft(work, techniqueId, written(body));
  await keepHand(work, techniqueId, work.actor.id);
  return answered(work, techniqueId);
}

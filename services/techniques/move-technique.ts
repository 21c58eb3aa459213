import { takeRows } from '@/db/lock';
import { isLevelThree } from '@/db/repositories/personnel';
import { markApproved, markChecked, markWithdrawnForError } from '@/db/repositories/techniques';
import type { Interval } from '@/db/repositories/suspects';
import { databaseNow, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf } from '@/services/contracts/operation';
import type { Technique, withdrawTechnique as withdrawContract } from '@/services/contracts/techniques';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { plantToday } from '@/services/personnel/plant-today';
import { openSuspects, takeLeaning } from '@/services/suspects/open-suspects';
import { technique } from './read-technique';

type By = Work & { readonly actor: Actor };

/** The moves a technique issue can make; what is not here is refused. */
const moves = { check: ['draft'], approve: ['checked'], withdraw: ['checked', 'approved', 'superseded'] } as const;

async function take(work: By, techniqueId: string, move: keyof typeof moves): Promise<Technique> {
  await takeRows(work, 'technique_issues', [techniqueId]);
  const present = await technique(work, techniqueId);
  const allowed: readonly string[] = moves[move];
  if (!allowed.includes(present.state))
    throw new Problem(
      'state-refused',
      `${present.number} issue ${String(present.issue)} is ${present.state}; only ${allowed.join(' or ')} can make this move.`,
    );
  return present;
}

async function answered(work: By, id: string, details: Record<string, unknown>): Promise<Recorded<Technique>> {
  const answer = await technique(work, id);
  const { number, issue, method } = answer;
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"` },
    events: [{ subject: { kind: 'technique', id }, details: { number, issue, method, ...details } }],
  };
}

/** A second person states that the draft is whole and says how the work is done. Problems: not-permitted, invalid-input with every fault. */
export async function checkTechnique(work: By, techniqueId: string): Promise<Recorded<Technique>> {
  const { hands, faults } = await take(work, techniqueId, 'check');
  if (hands.includes(work.actor.id))
    throw new Problem('not-permitted', 'A technique is checked by somebody who did not write in it.');
  if (faults.length > 0)
    throw new Problem(
      'invalid-input',
      `The technique has ${String(faults.length)} fault(s): ${faults.map(({ path, message }) => `${path} ${message}`).join('; ')}`,
      faults,
    );
  await markChecked(work, techniqueId, work.actor.id);
  return answered(work, techniqueId, {});
}

/** Approved by a level 3 of the method who wrote nothing in it; the issue before is superseded. */
export async function approveTechnique(work: By, techniqueId: string): Promise<Recorded<Technique>> {
  const { hands, method, number } = await take(work, techniqueId, 'approve');
  if (hands.includes(work.actor.id)) throw new Problem('not-permitted', 'Nobody approves a technique they wrote in.');
  const { day } = await plantToday(work);
  if (!(await isLevelThree(work, work.actor.id, method, number, day)))
    throw new Problem('not-permitted', `Only a reviewer who is level 3 in ${method} today approves this technique.`);
  const superseded = await markApproved(work, techniqueId, number, work.actor.id);
  return answered(work, techniqueId, { superseded });
}

/**
 * Withdraws an issue because it was wrong. What rests on an inspection by it is held in the same transaction: part rows
 * first, in id order, then the technique. Problems: not-found, state-refused.
 */
export async function withdrawTechnique(
  work: By,
  techniqueId: string,
  reason: string,
): Promise<Recorded<AnswerOf<typeof withdrawContract>>> {
  const interval: Interval = { kind: 'technique', target: techniqueId, since: null, sinceDay: null, untilDay: null };
  const first = await takeLeaning(work, interval);
  const { number, issue, method } = await take(work, techniqueId, 'withdraw');
  const leaning = await takeLeaning(work, interval, new Set(first.map(({ partId }) => partId)));
  await markWithdrawnForError(work, techniqueId, work.actor.id, reason);
  const named = `${number} issue ${String(issue)}`;
  const opened = await openSuspects(
    work,
    {
      ...{ cause: 'technique', causeId: techniqueId, method, technique: number, equipmentId: null, scope: null },
      ...{ named, reason: `${named} was withdrawn: ${reason}`, since: null, until: await databaseNow(work) },
    },
    leaning,
  );
  const { answer, headers, events } = await answered(work, techniqueId, { reason, suspects: opened?.list.number ?? null });
  return {
    answer: { ...answer, suspects: opened ? { id: opened.list.id, number: opened.list.number } : null },
    ...(headers ? { headers } : {}),
    events: [...events, ...(opened ? [opened.event] : [])],
  };
}

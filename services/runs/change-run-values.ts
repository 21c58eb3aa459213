import { takeRows } from '@/db/lock';
import { insert, update } from '@/db/models/table';
import {
  inspectionsOfRun,
  runById,
  runs,
  runValues,
  valuesOfRun,
  type LeaningInspection,
  type Run,
} from '@/db/repositories/runs';
import { execute, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import type { changeRunValues as contract } from '@/services/contracts/runs';
import { placeHold } from '@/services/holds/keep-holds';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { recountPart } from '@/services/parts/recount-part';
import { judgeRun, voidReason } from './judge-run';
import { readRun } from './read-run';

type By = Work & { readonly actor: Actor };
type Answer = AnswerOf<typeof contract>;

/** States past which a part is not simply inspected again: it is held, and listed for recall. */
const gone: readonly string[] = ['released', 'shipped'];

/** Ends one signed inspection as void and sends its requirement back. The record stays readable. */
async function voidInspection(work: By, leaning: LeaningInspection, reason: string): Promise<void> {
  await execute(
    work,
    `INSERT INTO inspection_ends (inspection_id, kind, reason, ended_by, ended_at) VALUES (?, 'voided', ?, ?, ?)`,
    [leaning.inspection, reason, work.actor.id, sqlTimeOf(work.now)],
  );
  // Only while the requirement still rests on this inspection: a later one, or a decision, stands.
  await execute(
    work,
    `UPDATE part_requirements SET state = 'to-be-repeated', reason = ? WHERE part_id = ? AND requirement_id = ? AND inspection_id = ? AND state IN ('met', 'to-be-repeated')`,
    [reason, leaning.part, leaning.requirementId, leaning.inspection],
  );
  await recountPart(work, leaning.part);
}

async function recall(work: By, leaning: LeaningInspection, reason: string) {
  const held = await placeHold(work, { target: { kind: 'part', id: leaning.part }, reason });
  return {
    row: { part: leaning.part, serial: leaning.serial, hold: held.answer.number },
    events: held.events.map((event) => ({ ...event, kind: 'hold-placed' as const })),
  };
}

async function takeRun(work: By, runId: string): Promise<{ run: Run; leaning: LeaningInspection[] }> {
  const before = await inspectionsOfRun(work, runId);
  await takeRows(
    work,
    'parts',
    before.map(({ part }) => part),
  );
  await takeRows(work, 'runs', [runId]);
  const run = await runById(work, runId);
  if (!run) throw notFound('Run');
  const leaning = await inspectionsOfRun(work, runId);
  const taken = new Set(before.map(({ part }) => part));
  if (leaning.some(({ part }) => !taken.has(part)))
    throw new Problem('state-refused', 'A basket that leans on this run was signed in this instant. Try again.');
  return { run, leaning: leaning.filter(({ voided }) => !voided) };
}

/**
 * Enters the values of a run anew. When one lies outside its window, every inspection that leaned on the run is void:
 * parts, then run, are written first in id order, as whoever signs or releases does. Problems: not-found, invalid-input.
 */
export async function changeRunValues(work: By, runId: string, body: BodyOf<typeof contract>): Promise<Recorded<Answer>> {
  const { run, leaning } = await takeRun(work, runId);
  const judged = judgeRun(run.windows, body.process);
  const seq = ((await valuesOfRun(work, runId))[0]?.seq ?? 0) + 1;
  const { evaluation, standing } = judged;
  await insert(work, runValues, {
    runId,
    seq,
    process: body.process,
    evaluation,
    standing,
    reason: body.reason,
    enteredBy: work.actor.id,
    enteredAt: work.now,
  });
  await update(work, runs, { standing }, { id: runId });
  const voids = standing === 'void' ? leaning : [];
  const reason = voidReason(run.number, judged);
  const events: Recorded<Answer>['events'][number][] = [];
  const recalled: Answer['recall'] = [];
  for (const one of voids) {
    await voidInspection(work, one, reason);
    events.push({
      kind: 'inspection-voided',
      subject: { kind: 'inspection', id: one.inspection },
      also: [
        { kind: 'part', id: one.part },
        { kind: 'run', id: runId },
      ],
      details: { number: one.number, serial: one.serial, run: run.number, reason },
    });
    if (!gone.includes(one.partState) || recalled.some(({ part }) => part === one.part)) continue;
    const held = await recall(work, one, reason);
    recalled.push(held.row);
    events.push(...held.events);
  }
  const voided = voids.map(({ inspection, number, serial }) => ({ inspection, number, serial }));
  return {
    answer: { run: await readRun(work, runId), voided, recall: recalled },
    events: [
      {
        subject: { kind: 'run', id: runId },
        also: voids.map(({ part }) => ({ kind: 'part', id: part })),
        details: {
          number: run.number,
          before: { process: run.process, standing: run.standing },
          process: body.process,
          standing,
          reason: body.reason,
          voided: voided.map(({ number }) => number),
        },
      },
      ...events,
    ],
  };
}

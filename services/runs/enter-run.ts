import { newId, nextNumber } from '@/db/identity';
import { insert, insertAll } from '@/db/models/table';
import { equipmentByIds, peopleByIds, plantZone, techniqueInForce } from '@/db/repositories/act-conditions';
import { runParts, runs, runTechniques, runValues } from '@/db/repositories/runs';
import { select, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { enterRun as contract, RunAnswer } from '@/services/contracts/runs';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { instantOf } from '@/services/inspections/acts-on-record';
import { plantDay } from '@/services/inspections/plant-day';
import { judgeRun } from './judge-run';
import { readRun, windowsFor } from './read-run';

type By = Work & { readonly actor: Actor };
type Body = BodyOf<typeof contract>;

/** Who processed, when, with what: each must be named and known. */
async function actFaults(work: By, acts: Body['acts']): Promise<FieldError[]> {
  const people = await peopleByIds(
    work,
    acts.flatMap(({ person }) => (person ? [person] : [])),
  );
  const day = plantDay(work.now, await plantZone(work));
  const equipment = await equipmentByIds(
    work,
    acts.flatMap((act) => act.equipment),
    day,
  );
  return acts.flatMap((act, place): FieldError[] => {
    const path = `acts.${String(place)}`;
    const at = instantOf(act.at);
    return [
      ...(people.some(({ id }) => id === act.person) ? [] : [{ path: `${path}.person`, message: 'who did it is needed' }]),
      ...(at === null ? [{ path: `${path}.at`, message: 'the time of the act is needed, such as 2026-03-09T14:05:00Z' }] : []),
      ...(at !== null && at > work.now ? [{ path: `${path}.at`, message: 'lies in the future' }] : []),
      ...act.equipment.flatMap((id, one) =>
        equipment.some((row) => row.id === id)
          ? []
          : [{ path: `${path}.equipment.${String(one)}`, message: 'is not known equipment' }],
      ),
    ];
  });
}

async function partFaults(work: By, parts: Body['parts']): Promise<FieldError[]> {
  if (parts.length === 0) return [];
  const known = await select<{ id: string }>(work, 'SELECT id FROM parts WHERE id IN (?)', [parts.map(({ part }) => part)]);
  const ids = new Set(known.map(({ id }) => id));
  const seen = new Set<string>();
  return parts.flatMap(({ part }, place): FieldError[] => {
    const path = `parts.${String(place)}.part`;
    if (!ids.has(part)) return [{ path, message: 'is not a known part' }];
    if (seen.has(part)) return [{ path, message: 'is named twice' }];
    seen.add(part);
    return [];
  });
}

async function techniqueOf(work: By, number: string) {
  const technique = await techniqueInForce(work, number);
  const method = (await runTechniques(work)).find((one) => one.number === number)?.method;
  if (!technique || method === undefined)
    throw new Problem('invalid-input', `technique: ${number} has no approved issue`, [
      { path: 'technique', message: 'has no approved issue' },
    ]);
  return { ...technique, method };
}

/** Enters a run and judges its values. Problems: invalid-input with every field. */
export async function enterRun(work: By, body: Body): Promise<Recorded<RunAnswer>> {
  const technique = await techniqueOf(work, body.technique);
  const faults = [...(await actFaults(work, body.acts)), ...(await partFaults(work, body.parts))];
  if (faults.length > 0)
    throw new Problem('invalid-input', faults.map(({ path, message }) => `${path}: ${message}`).join('; '), faults);
  const windows = await windowsFor(work, body.technique, technique.content);
  const { evaluation, standing } = judgeRun(windows, body.process);
  const id = newId();
  const number = await nextNumber(work, 'R');
  await insert(work, runs, {
    id,
    number,
    kind: body.kind,
    technique: technique.number,
    techniqueIssue: technique.issue,
    method: technique.method,
    line: body.line ?? null,
    windows,
    acts: body.acts,
    standing,
    enteredBy: work.actor.id,
    enteredAt: work.now,
    version: 1,
  });
  await insert(work, runValues, {
    runId: id,
    seq: 1,
    process: body.process,
    evaluation,
    standing,
    reason: null,
    enteredBy: work.actor.id,
    enteredAt: work.now,
  });
  await insertAll(
    work,
    runParts,
    body.parts.map(({ part, place }) => ({ runId: id, partId: part, place: place ?? null, addedAt: work.now })),
  );
  return {
    answer: await readRun(work, id),
    headers: { location: `/api/runs/${id}` },
    events: [
      {
        subject: { kind: 'run', id },
        also: body.parts.map(({ part }) => ({ kind: 'part', id: part })),
        details: { number, kind: body.kind, technique: technique.number, standing, process: body.process, acts: body.acts },
      },
    ],
  };
}

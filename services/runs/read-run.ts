import { benchPeople, equipmentOfMethod, peopleByIds, plantZone, techniqueInForce } from '@/db/repositories/act-conditions';
import {
  inspectionsOfRun,
  membersOfRun,
  planWindowsFor,
  runById,
  runsBefore,
  runTechniques,
  valuesOfRun,
  type Run,
} from '@/db/repositories/runs';
import { databaseNow, type Reading } from '@/db/work';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { readWindows, windowsOfRequirement, type ProcessWindow } from '@/services/contracts/plan-windows';
import type { listRuns as listContract, RunAnswer, RunSetUp, RunSummary } from '@/services/contracts/runs';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';
import { plantDay } from '@/services/inspections/plant-day';

function summaryOf({ id, number, kind, technique, line, standing, parts, entered, enteredAt }: Run): RunSummary {
  return { id, number, kind, technique, line, standing, parts, enteredBy: entered, enteredAt };
}

/** A run with its values, how they were judged, its parts, and what leans on it. Problem not-found. */
export async function readRun(reading: Reading, runId: string): Promise<RunAnswer> {
  const run = await runById(reading, runId);
  if (!run) throw notFound('Run');
  const values = await valuesOfRun(reading, runId);
  const evaluation = values[0]?.evaluation as EvaluationAnswer | undefined;
  const people = await peopleByIds(
    reading,
    run.acts.flatMap(({ person }) => (person ? [person] : [])),
  );
  return {
    ...summaryOf(run),
    techniqueIssue: run.techniqueIssue,
    method: run.method,
    version: run.version,
    windows: [...run.windows],
    process: run.process,
    acts: run.acts.map((act) => ({ ...act, name: people.find(({ id }) => id === act.person)?.name ?? null })),
    judged: (evaluation?.process ?? []).map(({ number, verdict, sentence }) => ({ number, verdict, text: sentence.text })),
    missing: (evaluation?.missing ?? []).map(({ number }) => number),
    members: await membersOfRun(reading, runId),
    values: values.map(({ process, standing, reason, by, at }) => ({ process, standing, reason, by, at })),
    inspections: (await inspectionsOfRun(reading, runId)).map(({ inspection, number, serial, verdict, voided }) => ({
      inspection,
      number,
      serial,
      verdict,
      voided,
    })),
  };
}

/** Runs, newest first. */
export async function listRuns(
  reading: Reading,
  { kind, technique, standing, limit, after }: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const before = partsOfKey(after, 2);
  const rows = await runsBefore(
    reading,
    { kind, technique, standing },
    before && [String(before[0]), String(before[1])],
    limit + 1,
  );
  return pageOf(rows, limit, ({ enteredAt, id }) => [enteredAt, id], summaryOf);
}

/** What a run by a technique is judged by: the technique's own windows, or those of the plan that works by it. */
export async function windowsFor(
  reading: Reading,
  technique: string,
  content: Record<string, unknown>,
): Promise<ProcessWindow[]> {
  const own = readWindows(content.windows);
  if (own.length > 0) return own;
  const plan = await planWindowsFor(reading, technique);
  return plan ? windowsOfRequirement(plan.criteria, plan.numbers) : [];
}

/** What the form of a run asks. Problem not-found when the technique has no approved issue. */
export async function offerRunSetUp(reading: Reading, number: string | undefined): Promise<RunSetUp> {
  const [techniques, people] = [await runTechniques(reading), await benchPeople(reading)];
  if (number === undefined) return { techniques, windows: [], people, equipment: [] };
  const technique = await techniqueInForce(reading, number);
  const method = techniques.find((one) => one.number === number)?.method;
  if (!technique || method === undefined) throw notFound('Technique');
  const day = plantDay(await databaseNow(reading), await plantZone(reading));
  const equipment = await equipmentOfMethod(reading, method, day);
  return {
    techniques,
    windows: await windowsFor(reading, number, technique.content),
    people,
    equipment: equipment.map(({ id, number: named, title }) => ({ id, number: named, title })),
  };
}

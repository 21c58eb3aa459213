import type { InspectionContent } from '../../services/contracts/inspection-content';
import type { RunAnswer, RunSummary, RunWindow } from '../../services/contracts/runs';
import { table } from '../models/table';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

type Process = InspectionContent['process'];
type Acts = InspectionContent['acts'];
type Standing = RunSummary['standing'];

export interface RunRow {
  id: string;
  number: string;
  kind: RunSummary['kind'];
  technique: string;
  techniqueIssue: number | null;
  method: string;
  line: string | null;
  windows: readonly RunWindow[];
  acts: Acts;
  standing: Standing;
  enteredBy: string;
  enteredAt: string;
  version: number;
}

export const runs = table<RunRow>('runs', {
  id: 'uuid',
  number: 'text',
  kind: 'text',
  technique: 'text',
  techniqueIssue: 'int',
  method: 'text',
  line: 'text',
  windows: 'json',
  acts: 'json',
  standing: 'text',
  enteredBy: 'uuid',
  enteredAt: 'time',
  version: 'int',
});

export const runParts = table<{ runId: string; partId: string; place: string | null; addedAt: string }>(
  'run_parts',
  { runId: 'uuid', partId: 'uuid', place: 'text', addedAt: 'time' },
  ['runId', 'partId'],
);

export const runValues = table<{
  runId: string;
  seq: number;
  process: Process;
  evaluation: unknown;
  standing: Standing;
  reason: string | null;
  enteredBy: string;
  enteredAt: string;
}>(
  'run_values',
  {
    runId: 'uuid',
    seq: 'int',
    process: 'json',
    evaluation: 'json',
    standing: 'text',
    reason: 'text',
    enteredBy: 'uuid',
    enteredAt: 'time',
  },
  ['runId', 'seq'],
);

export const runInspections = table<{ runId: string; inspectionId: string; partId: string }>(
  'run_inspections',
  { runId: 'uuid', inspectionId: 'uuid', partId: 'uuid' },
  ['runId', 'inspectionId'],
);

/** A run with its newest values. */
export interface Run extends RunRow {
  readonly process: Process;
  readonly entered: string;
  readonly parts: number;
}

type Stored = Omit<Run, 'windows' | 'acts' | 'process'> & { windows: string; acts: string; process: string | null };

const query = `SELECT r.id, r.number, r.kind, r.technique, r.technique_issue AS techniqueIssue, r.method, r.line, r.windows, r.acts, r.standing, r.entered_by AS enteredBy,
  ${isoOf('r.entered_at')} AS enteredAt, r.version, a.name AS entered,
  (SELECT v.process FROM run_values v WHERE v.run_id = r.id ORDER BY v.seq DESC LIMIT 1) AS process,
  (SELECT COUNT(*) FROM run_parts p WHERE p.run_id = r.id) AS parts
  FROM runs r JOIN accounts a ON a.id = r.entered_by`;

function toRun(row: Stored): Run {
  return {
    ...row,
    windows: JSON.parse(row.windows) as RunWindow[],
    acts: JSON.parse(row.acts) as Acts,
    process: row.process === null ? [] : (JSON.parse(row.process) as Process),
  };
}

export async function runById(reading: Reading, runId: string): Promise<Run | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE r.id = ?`, [runId]);
  return row && toRun(row);
}

/** Runs, newest first, before a key. */
export async function runsBefore(
  reading: Reading,
  filter: Readonly<Record<'kind' | 'technique' | 'standing', string | undefined>>,
  before: readonly [string, string] | null,
  limit: number,
): Promise<Run[]> {
  const named = Object.entries(filter).filter((one): one is [string, string] => one[1] !== undefined);
  const where = named.map(([column]) => `r.${column} = ?`);
  const values: unknown[] = named.map(([, value]) => value);
  if (before) {
    const at = sqlTimeOf(before[0]);
    where.push('r.entered_at <= ? AND (r.entered_at < ? OR r.id < ?)');
    values.push(at, at, before[1]);
  }
  const rows = await select<Stored>(
    reading,
    `${query} ${where.length > 0 ? `WHERE ${where.join(' AND ')}` : ''} ORDER BY r.entered_at DESC, r.id DESC LIMIT ?`,
    [...values, limit],
  );
  return rows.map(toRun);
}

/** Runs of a technique that a basket may lean on, newest first. */
export function openRunsOf(
  reading: Reading,
  technique: string,
): Promise<{ id: string; number: string; line: string | null; enteredAt: string }[]> {
  return select(
    reading,
    `SELECT id, number, line, ${isoOf('entered_at')} AS enteredAt FROM runs WHERE technique = ? AND standing <> 'void' ORDER BY entered_at DESC, id DESC LIMIT 20`,
    [technique],
  );
}

export function membersOfRun(reading: Reading, runId: string): Promise<RunAnswer['members']> {
  return select(
    reading,
    `SELECT p.id AS part, p.serial, d.number AS partNumber, m.place FROM run_parts m JOIN parts p ON p.id = m.part_id JOIN drawings d ON d.id = p.drawing_id
     WHERE m.run_id = ? ORDER BY m.added_at, p.serial, p.id LIMIT 2000`,
    [runId],
  );
}

/** Every set of values ever entered, newest first, with how each was judged. */
export async function valuesOfRun(
  reading: Reading,
  runId: string,
): Promise<
  { seq: number; process: Process; evaluation: unknown; standing: Standing; reason: string | null; by: string; at: string }[]
> {
  const rows = await select<{
    seq: number;
    process: string;
    evaluation: string;
    standing: Standing;
    reason: string | null;
    by: string;
    at: string;
  }>(
    reading,
    `SELECT v.seq, v.process, v.evaluation, v.standing, v.reason, a.name AS \`by\`, ${isoOf('v.entered_at')} AS at
     FROM run_values v JOIN accounts a ON a.id = v.entered_by WHERE v.run_id = ? ORDER BY v.seq DESC LIMIT 200`,
    [runId],
  );
  return rows.map((row) => ({
    ...row,
    process: JSON.parse(row.process) as Process,
    evaluation: JSON.parse(row.evaluation) as unknown,
  }));
}

export interface LeaningInspection {
  readonly inspection: string;
  readonly number: string;
  readonly part: string;
  readonly serial: string;
  readonly partState: string;
  readonly requirementId: string;
  readonly verdict: RunAnswer['inspections'][number]['verdict'];
  readonly voided: boolean;
}

/** Signed inspections that took their process values from the run. */
export async function inspectionsOfRun(reading: Reading, runId: string): Promise<LeaningInspection[]> {
  const rows = await select<Omit<LeaningInspection, 'voided'> & { ended: number }>(
    reading,
    `SELECT i.id AS inspection, i.number, p.id AS part, p.serial, p.state AS partState, i.requirement_id AS requirementId, i.verdict, IF(e.inspection_id IS NULL, 0, 1) AS ended
     FROM run_inspections r JOIN inspections i ON i.id = r.inspection_id JOIN parts p ON p.id = i.part_id LEFT JOIN inspection_ends e ON e.inspection_id = i.id
     WHERE r.run_id = ? ORDER BY p.serial, i.id LIMIT 4000`,
    [runId],
  );
  return rows.map(({ ended, ...row }) => ({ ...row, voided: ended === 1 }));
}

/** The approved techniques that may govern a run, by number. */
export function runTechniques(reading: Reading): Promise<{ number: string; title: string; method: string }[]> {
  return select(
    reading,
    `SELECT number, title, method FROM technique_issues WHERE state = 'approved' GROUP BY number ORDER BY number LIMIT 300`,
  );
}

/** Process rows of the newest approved plan that works by a technique: the windows of a run whose technique names none. */
export async function planWindowsFor(
  reading: Reading,
  technique: string,
): Promise<{ criteria: Record<string, unknown>; numbers: string[] } | undefined> {
  const row = await selectOne<{ content: string; asked: string }>(
    reading,
    `SELECT p.content, q.content AS asked FROM requirements q JOIN plan_issues p ON p.id = q.plan_issue_id WHERE q.technique = ? AND p.state = 'approved'
     ORDER BY p.approved_at DESC, q.position LIMIT 1`,
    [technique],
  );
  if (!row) return undefined;
  const { criteria = {} } = JSON.parse(row.content) as { criteria?: Record<string, unknown> };
  const { process = [] } = JSON.parse(row.asked) as { process?: string[] };
  return { criteria, numbers: process };
}

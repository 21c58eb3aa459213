import { z } from 'zod';
import { id, instant, mark, page, pageQuery, verdict, words } from './common';
import { act, enteredProcess } from './inspection-content';
import { operation } from './operation';

export const runKind = z.enum(['penetrant-load', 'furnace', 'leach', 'coating']);
export const runStanding = z.enum(['incomplete', 'good', 'void']);

const byId = z.object({ id });

/** A value the run must keep, with its window; either limit may be absent. */
export const runWindow = z.object({
  number: z.string(),
  title: z.string(),
  unit: z.string(),
  lower: z.string().nullable(),
  upper: z.string().nullable(),
});
export type RunWindow = z.output<typeof runWindow>;

const summary = z.object({
  id,
  number: z.string(),
  kind: runKind,
  technique: z.string(),
  line: z.string().nullable(),
  standing: runStanding,
  parts: z.int(),
  enteredBy: z.string(),
  enteredAt: instant,
});
export type RunSummary = z.output<typeof summary>;

const judged = z.object({ number: z.string(), verdict, text: z.string() });

export const run = summary.extend({
  techniqueIssue: z.int().nullable(),
  method: z.string(),
  version: z.int(),
  windows: z.array(runWindow),
  process: z.array(enteredProcess),
  acts: z.array(act.extend({ name: z.string().nullable() })),
  judged: z.array(judged),
  missing: z.array(z.string()),
  members: z.array(z.object({ part: id, serial: z.string(), partNumber: z.string(), place: z.string().nullable() })),
  /** Every set of values entered, newest first. */
  values: z.array(
    z.object({
      process: z.array(enteredProcess),
      standing: runStanding,
      reason: z.string().nullable(),
      by: z.string(),
      at: instant,
    }),
  ),
  inspections: z.array(z.object({ inspection: id, number: z.string(), serial: z.string(), verdict, voided: z.boolean() })),
});
export type RunAnswer = z.output<typeof run>;

export const listRuns = operation({
  name: 'list-runs',
  method: 'GET',
  path: '/api/runs',
  summary: 'Runs, newest first.',
  changes: false,
  query: pageQuery.extend({ kind: runKind.optional(), technique: mark.optional(), standing: runStanding.optional() }),
  response: page(summary),
  status: 200,
});

export const setUpRun = operation({
  name: 'set-up-run',
  method: 'GET',
  path: '/api/runs/set-up',
  summary:
    'What a run by a technique asks: its windows, who and what may be named in its acts. Without `technique`, the techniques.',
  changes: false,
  query: z.object({ technique: mark.optional() }),
  response: z.object({
    techniques: z.array(z.object({ number: z.string(), title: z.string(), method: z.string() })),
    windows: z.array(runWindow),
    people: z.array(z.object({ id, name: z.string() })),
    equipment: z.array(z.object({ id, number: z.string(), title: z.string() })),
  }),
  status: 200,
});
export type RunSetUp = z.output<(typeof setUpRun)['response']>;

export const enterRun = operation({
  name: 'enter-run',
  method: 'POST',
  path: '/api/runs',
  summary: 'Enter a run: technique, process values, who processed, which parts. A value outside its window makes the run void.',
  changes: true,
  body: z.strictObject({
    kind: runKind.default('penetrant-load'),
    technique: mark,
    line: words(60).nullish(),
    process: z.array(enteredProcess).max(100).default([]),
    acts: z.array(act).min(1, 'must say who processed and when').max(10),
    parts: z
      .array(z.strictObject({ part: id, place: words(40).nullish() }))
      .max(2000)
      .default([]),
  }),
  response: run,
  status: 201,
});

export const readRun = operation({
  name: 'read-run',
  method: 'GET',
  path: '/api/runs/{id}',
  summary: 'One run with its values, how they were judged, its parts and the inspections that lean on it.',
  changes: false,
  params: byId,
  response: run,
  status: 200,
});

export const addRunPart = operation({
  name: 'add-run-part',
  method: 'POST',
  path: '/api/runs/{id}/parts',
  summary: 'Add one scanned or typed part to a run; the same part again changes nothing.',
  changes: true,
  params: byId,
  body: z.strictObject({ scan: z.string().min(1).max(200), place: words(40).nullish() }),
  response: run,
  status: 201,
});

export const changeRunValues = operation({
  name: 'change-run-values',
  method: 'POST',
  path: '/api/runs/{id}/values',
  summary:
    'Enter the process values anew, with the reason. A value outside its window voids every inspection that leaned on the run: its parts are to be repeated, those already released are held and listed for recall.',
  changes: true,
  params: byId,
  body: z.strictObject({ process: z.array(enteredProcess).min(1).max(100), reason: words(400, 5) }),
  response: z.object({
    run,
    voided: z.array(z.object({ inspection: id, number: z.string(), serial: z.string() })),
    recall: z.array(z.object({ part: id, serial: z.string(), hold: z.string() })),
  }),
  status: 200,
});

import { z } from 'zod';
import { day, decimalText, id, instant, mark, method, page, pageQuery, password, words } from './common';
import { operation } from './operation';
import { fault } from './plans';
import { personAt, planState } from './plan-content';

const unit = words(20);

/** A limit pair in a unit; either limit may be absent, not both. */
const limits = { unit, lower: decimalText.nullable().default(null), upper: decimalText.nullable().default(null) };

/** One setting of the technique. An essential one cannot be changed without a new issue and a new approval. */
const parameter = z.strictObject({
  name: words(80),
  value: words(120),
  unit: words(20).nullable().default(null),
  essential: z.boolean().default(false),
});

/** A process value and the window it must lie in while the work is done. */
const processWindow = z.strictObject({ title: words(120), ...limits });

/** A process check that must be good for work by this technique to count. */
const requiredCheck = z.strictObject({
  scope: words(60),
  title: words(160),
  kind: z.enum(['opening', 'bracketing']),
  /** How long a good one counts. */
  validHours: z.int().min(1).max(8760),
  /** Window of the value that is read, where there is one. */
  window: z.strictObject(limits).nullable().default(null),
});
export type RequiredCheck = z.output<typeof requiredCheck>;

/** How a method is carried out. Every list may be empty in a draft; the check asks for more. */
export const techniqueContent = z.strictObject({
  parameters: z.array(parameter).max(200).default([]),
  windows: z.array(processWindow).max(100).default([]),
  views: z.array(words(120)).max(60).default([]),
  checks: z.array(requiredCheck).max(40).default([]),
  /** Image quality indicator that must be placed and seen. */
  indicator: words(60).nullable().default(null),
});
export type TechniqueContent = z.output<typeof techniqueContent>;

const head = z.object({
  id,
  number: z.string(),
  issue: z.int(),
  method: z.string(),
  title: z.string(),
  standard: z.string(),
  customerApproval: z.string().nullable(),
  state: planState,
  version: z.int(),
  author: personAt,
  approved: personAt,
});
export type TechniqueHead = z.output<typeof head>;

/** A technique issue as read. */
const technique = head.extend({
  checked: personAt,
  ended: personAt,
  endedReason: z.string().nullable(),
  content: techniqueContent,
  /** Everybody who wrote in the draft; none of them checks or approves it. */
  hands: z.array(id),
  /** What still stands against checking it. */
  faults: z.array(fault),
});
export type Technique = z.output<typeof technique>;

const byId = z.object({ id });
const written = { title: words(200), standard: words(200), customerApproval: words(120).optional(), content: techniqueContent };

export const listTechniques = operation({
  name: 'list-techniques',
  method: 'GET',
  path: '/api/techniques',
  summary: 'Technique issues by number, newest issue first.',
  changes: false,
  query: pageQuery.extend({ method: method.optional(), state: planState.optional(), number: mark.optional() }),
  response: page(head),
  status: 200,
});

export const draftTechnique = operation({
  name: 'draft-technique',
  method: 'POST',
  path: '/api/techniques',
  summary: 'Start the next issue of a technique as a draft.',
  changes: true,
  body: z.strictObject({ number: mark, method, ...written }),
  response: technique,
  status: 201,
});

export const readTechnique = operation({
  name: 'read-technique',
  method: 'GET',
  path: '/api/techniques/{id}',
  summary: 'One technique issue; ETag is its version.',
  changes: false,
  params: byId,
  response: technique,
  status: 200,
});

export const changeTechnique = operation({
  name: 'change-technique',
  method: 'PUT',
  path: '/api/techniques/{id}',
  summary: 'Replace what a draft says; needs If-Match.',
  changes: true,
  params: byId,
  body: z.strictObject(written),
  response: technique,
  status: 200,
});

export const checkTechnique = operation({
  name: 'check-technique',
  method: 'POST',
  path: '/api/techniques/{id}/check',
  summary: 'A second person has checked the draft; every fault at once otherwise.',
  changes: true,
  params: byId,
  body: z.strictObject({}),
  response: technique,
  status: 200,
});

export const approveTechnique = operation({
  name: 'approve-technique',
  method: 'POST',
  path: '/api/techniques/{id}/approval',
  summary: 'Approve a checked issue, signed by a reviewer who is level 3 in the method; never by who wrote in it.',
  changes: true,
  params: byId,
  body: z.strictObject({ password }),
  response: technique,
  status: 200,
});

export const withdrawTechnique = operation({
  name: 'withdraw-technique',
  method: 'POST',
  path: '/api/techniques/{id}/withdrawal',
  summary: 'Withdraw an issue for error; what was inspected by it becomes suspect and is held.',
  changes: true,
  params: byId,
  body: z.strictObject({ password, reason: words(400, 5) }),
  response: technique.extend({ suspects: z.object({ id, number: z.string() }).nullable() }),
  status: 200,
});

const measurementProcess = z.object({
  id,
  technique: z.string(),
  characteristic: z.string(),
  gaugeKind: z.string(),
  /** Expanded uncertainty U with its coverage factor k, in `unit`. */
  expanded: z.string(),
  k: z.string(),
  unit: z.string(),
  basis: z.string(),
  validFrom: day,
  recordedAt: instant,
});
export type MeasurementProcess = z.output<typeof measurementProcess>;

export const listMeasurementProcesses = operation({
  name: 'list-measurement-processes',
  method: 'GET',
  path: '/api/measurement-processes',
  summary: 'Uncertainties of techniques by characteristic and kind of gauge.',
  changes: false,
  query: pageQuery.extend({ technique: mark.optional() }),
  response: page(measurementProcess),
  status: 200,
});

export const recordMeasurementProcess = operation({
  name: 'record-measurement-process',
  method: 'POST',
  path: '/api/measurement-processes',
  summary: 'Record an uncertainty; a later one stands in its place from its day on, nothing signed changes.',
  changes: true,
  body: z.strictObject({
    technique: mark,
    characteristic: mark,
    gaugeKind: mark,
    expanded: decimalText,
    k: decimalText,
    unit,
    basis: words(200, 5),
    validFrom: day,
  }),
  response: measurementProcess,
  status: 201,
});

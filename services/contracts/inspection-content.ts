import { z } from 'zod';
import { id, words } from './common';

// What a person has typed stays as typed, also when it is no number: the engine names the fault, nothing is lost.
const typed = z.string().max(60);

export const enteredReading = z.strictObject({
  characteristic: z.string().max(24),
  value: typed,
  unit: z.string().max(12),
  source: z.enum(['typed', 'pasted', 'file']).default('typed'),
  void: z.strictObject({ reason: words(200) }).nullish(),
});

export const enteredAttribute = z.strictObject({
  number: z.string().max(24),
  result: z.enum(['conforming', 'nonconforming', 'not-inspected']),
  reason: z.string().max(400).nullish(),
});

export const enteredProcess = z.strictObject({ number: z.string().max(24), value: typed, unit: z.string().max(12) });

/** An indication in the engine's form, and the file it was marked on. */
export const enteredIndication = z.strictObject({
  id: z.string().min(1).max(40),
  type: z.string().max(40),
  view: z.string().max(60),
  shape: z.unknown(),
  evidence: id.nullish(),
  note: z.string().max(400).nullish(),
  severity: z.unknown().optional(),
  relevant: z.unknown().optional(),
});

/** Who did what, when, with which equipment: processed, exposed, measured, evaluated; block readings before and after. */
export const act = z.strictObject({
  kind: z.enum(['processed', 'exposed', 'measured', 'evaluated', 'block-check-before', 'block-check-after']),
  person: id.nullish(),
  at: z.string().max(40).nullish(),
  equipment: z.array(id).max(20).default([]),
  /** Entered facts of the act, e.g. {kV, mA, exposureS, distanceMm, indicatorSeen}; block readings {nominal: read}. */
  values: z.record(z.string().max(60), z.string().max(200)).default({}),
});

/** What a draft holds. PATCH replaces the lists that are sent and leaves the others. */
export const inspectionContent = z.strictObject({
  readings: z.array(enteredReading).max(2000).default([]),
  attributes: z.array(enteredAttribute).max(500).default([]),
  process: z.array(enteredProcess).max(200).default([]),
  indications: z.array(enteredIndication).max(2000).default([]),
  acts: z.array(act).max(50).default([]),
  /** The person says that every view the operation asks for was examined, whether or not anything was seen. */
  examined: z.boolean().default(false),
  notes: z.string().max(4000).default(''),
});
export type InspectionContent = z.output<typeof inspectionContent>;

export const inspectionPatch = z.strictObject({
  readings: z.array(enteredReading).max(2000).optional(),
  attributes: z.array(enteredAttribute).max(500).optional(),
  process: z.array(enteredProcess).max(200).optional(),
  indications: z.array(enteredIndication).max(2000).optional(),
  acts: z.array(act).max(50).optional(),
  examined: z.boolean().optional(),
  notes: z.string().max(4000).optional(),
});
export type InspectionPatch = z.output<typeof inspectionPatch>;

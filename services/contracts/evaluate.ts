import { z } from 'zod';
import { verdict } from './common';
import { operation } from './operation';

/** What a person reads: code and parameters for translation, `text` in English. */
const sentence = z.object({
  code: z.string(),
  parameters: z.record(z.string(), z.union([z.string(), z.number(), z.boolean(), z.null()])),
  text: z.string(),
});

const decimalOrNull = z.string().nullable();
const rows = <Row extends z.ZodType>(row: Row) => z.array(row).readonly();

const judgedReading = z.object({
  characteristic: z.string(),
  verdict,
  inside: z.boolean(),
  lower: decimalOrNull,
  upper: decimalOrNull,
  acceptLower: decimalOrNull,
  acceptUpper: decimalOrNull,
  conformanceProbability: z.number().nullable(),
  sentence,
});

const judgedRule = z.object({
  rule: z.string(),
  index: z.int(),
  kind: z.string(),
  zone: z.string(),
  clause: z.string().nullable(),
  verdict,
  indications: rows(z.string()),
  measured: decimalOrNull,
  limit: decimalOrNull,
  sentence,
});

const judgedIndication = z.object({
  id: z.string(),
  length: decimalOrNull,
  width: decimalOrNull,
  class: z.enum(['linear', 'rounded']).nullable(),
  zones: rows(z.string()),
  group: z.string().nullable(),
  judged: z.boolean(),
});

/** What the acceptance engine answers (form of POST /api/evaluate). */
export const evaluation = z.object({
  engine: z.string(),
  criteriaDigest: z.string(),
  inputDigest: z.string(),
  verdict,
  verdictSoFar: z.enum(['accept', 'reject', 'indeterminate']).nullable(),
  complete: z.boolean(),
  missing: rows(z.object({ kind: z.enum(['reading', 'attribute', 'process', 'method']), number: z.string() })),
  readings: rows(judgedReading),
  attributes: rows(
    z.object({ number: z.string(), result: z.enum(['conforming', 'nonconforming', 'not-inspected']), verdict, sentence }),
  ),
  process: rows(z.object({ number: z.string(), verdict: z.enum(['accept', 'reject']), sentence })),
  indications: rows(judgedIndication),
  rules: rows(judgedRule),
  unjudged: rows(z.string()),
});
export type EvaluationAnswer = z.output<typeof evaluation>;

// Form and meaning of the body are the engine's own business: its faults come in one pass with its own paths.
export const evaluateCall = operation({
  name: 'evaluate',
  method: 'POST',
  path: '/api/evaluate',
  summary: 'The acceptance engine alone: criteria and observations in, verdict with every row out. Nothing is stored.',
  changes: false,
  body: z.unknown(),
  response: evaluation,
  status: 200,
});

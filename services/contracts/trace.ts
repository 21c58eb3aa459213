import { z } from 'zod';
import { id, instant } from './common';
import { operation } from './operation';
import { part } from './parts';

const tracedEvent = z.object({
  id,
  seq: z.int(),
  at: instant,
  kind: z.string(),
  actor: z.object({ id, name: z.string() }).nullable(),
  subject: z.object({ kind: z.string(), id: z.string() }),
  details: z.record(z.string(), z.unknown()),
  digest: z.string(),
});

const tracedInspection = z.object({
  id,
  number: z.string(),
  operation: z.string(),
  title: z.string(),
  verdict: z.string(),
  signedBy: z.string(),
  signedAt: instant,
  technique: z.string().nullable(),
  recordDigest: z.string(),
  ended: z.string().nullable(),
  people: z.array(z.string()),
  equipment: z.array(z.string()),
  evidence: z.array(z.object({ id, name: z.string(), sha256: z.string() })),
});

/** The whole history of a part. */
const trace = z.object({
  part,
  inspections: z.array(tracedInspection),
  events: z.array(tracedEvent),
  recordedBy: instant.nullable(),
});
export type Trace = z.output<typeof trace>;

export const readTrace = operation({
  name: 'read-trace',
  method: 'GET',
  path: '/api/trace/{partId}',
  summary: 'Everything on record about a part; with recordedBy, the journal as recorded by then.',
  changes: false,
  params: z.object({ partId: id }),
  query: z.object({ recordedBy: z.iso.datetime().optional() }),
  response: trace,
  status: 200,
});

import { z } from 'zod';
import { id, instant, page, pageQuery } from './common';
import { operation } from './operation';
import { lotRef, part } from './parts';

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
  /** Superseded or voided, when, and why. */
  ended: z.object({ kind: z.string(), reason: z.string(), at: instant }).nullable(),
  people: z.array(z.string()),
  equipment: z.array(z.string()),
  evidence: z.array(z.object({ id, name: z.string(), kind: z.string(), sha256: z.string() })),
});

const tracedFinding = z.object({
  number: z.string(),
  state: z.string(),
  verdict: z.string(),
  summary: z.string(),
  openedBy: z.string(),
  openedAt: instant,
  closedAt: instant.nullable(),
  dispositions: z.array(
    z.object({ decision: z.string(), reason: z.string(), sentence: z.string(), decidedBy: z.string(), decidedAt: instant }),
  ),
});

const tracedHold = z.object({
  number: z.string(),
  target: z.string(),
  reason: z.string(),
  placedBy: z.string(),
  placedAt: instant,
  liftedBy: z.string().nullable(),
  liftedAt: instant.nullable(),
  liftedReason: z.string().nullable(),
});

const tracedCertificate = z.object({
  number: z.string(),
  state: z.string(),
  shipment: z.string(),
  sentence: z.string(),
  signedBy: z.string(),
  signedAt: instant,
  issuedAt: instant.nullable(),
  withdrawals: z.array(z.object({ whole: z.boolean(), reason: z.string(), withdrawnBy: z.string(), withdrawnAt: instant })),
  receipts: z.array(z.object({ kind: z.string(), note: z.string().nullable(), by: z.string(), at: instant })),
});

/** A lot above the part, and the lots it was made from. */
const tracedLot = lotRef.extend({
  depth: z.int(),
  quantity: z.int(),
  attributes: z.record(z.string(), z.string()),
  createdAt: instant,
  parents: z.array(id),
});

/** The whole history of a part. `part` and its ring are as they stand now; everything else is as recorded by then. */
const trace = z.object({
  part,
  inspections: z.array(tracedInspection),
  findings: z.array(tracedFinding),
  holds: z.array(tracedHold),
  certificates: z.array(tracedCertificate),
  genealogy: z.array(tracedLot),
  events: z.array(tracedEvent),
  recordedBy: instant.nullable(),
});
export type Trace = z.output<typeof trace>;

export const readTrace = operation({
  name: 'read-trace',
  method: 'GET',
  path: '/api/trace/{partId}',
  summary: 'Everything on record about a part; with recordedBy, what was on record by that time.',
  changes: false,
  params: z.object({ partId: id }),
  query: z.object({ recordedBy: z.iso.datetime().optional() }),
  response: trace,
  status: 200,
});

export const listRecord = operation({
  name: 'list-record',
  method: 'GET',
  path: '/api/record',
  summary: 'The journal of every change, newest first.',
  changes: false,
  query: pageQuery,
  response: page(tracedEvent),
  status: 200,
});
export type JournalEvent = z.output<typeof tracedEvent>;

import { z } from 'zod';
import { id, instant, page, pageQuery, password, words } from './common';
import { operation } from './operation';

export const decision = z.enum(['re-interpretation', 'rework', 'repair', 'use-as-is', 'scrap', 'void', 'refer']);
export type Decision = z.output<typeof decision>;

export const findingSummary = z.object({
  number: z.string(),
  state: z.enum(['open', 'dispositioned', 'awaiting-follow-up', 'closed']),
  part: z.object({ id, serial: z.string(), partNumber: z.string() }),
  requirement: z.object({ key: z.string(), title: z.string(), operation: z.string(), method: z.string() }),
  verdict: z.string(),
  summary: z.string(),
  openedAt: instant,
  openedBy: z.string(),
});
export type FindingSummary = z.output<typeof findingSummary>;

export const disposition = z.object({
  decision,
  reason: z.string(),
  repeat: z.array(z.string()),
  scheme: z.string().nullable(),
  decidedBy: z.string(),
  decidedAt: instant,
  sentence: z.string(),
});

export const finding = findingSummary.extend({
  id,
  inspection: z
    .object({ id, number: z.string(), signedBy: z.string(), signedById: id, signedAt: instant, verdict: z.string() })
    .nullable(),
  /** What the inspection recorded that was not accepted: readings in their unit, indications in millimetres. */
  failed: z.object({
    readings: z.array(z.object({ characteristic: z.string(), value: z.string(), unit: z.string(), verdict: z.string() })),
    indications: z.array(
      z.object({
        label: z.string(),
        type: z.string(),
        view: z.string().nullable(),
        lengthMm: z.string().nullable(),
        widthMm: z.string().nullable(),
        verdict: z.string(),
      }),
    ),
  }),
  /** Files of the inspection, for GET /api/evidence/{id}. */
  evidence: z.array(z.object({ id, name: z.string(), kind: z.string(), role: z.string(), view: z.string().nullable() })),
  dispositions: z.array(disposition),
  /** Earlier and later inspections of the same requirement of this part. */
  history: z.array(z.object({ id, number: z.string(), verdict: z.string(), signedBy: z.string(), signedAt: instant })),
  /** Operations of the route, for choosing what is repeated. */
  operations: z.array(z.object({ key: z.string(), operation: z.string(), title: z.string() })),
  rework: z.array(z.object({ kind: z.string(), title: z.string(), reopens: z.array(z.string()) })),
});
export type Finding = z.output<typeof finding>;

const byNumber = z.object({ number: z.string().max(24) });

export const listFindings = operation({
  name: 'list-findings',
  method: 'GET',
  path: '/api/findings',
  summary: 'Findings that are not closed, the undecided ones first, each oldest first; or those of a state.',
  changes: false,
  query: pageQuery.extend({ state: z.enum(['open', 'awaiting-follow-up', 'closed']).optional() }),
  response: page(findingSummary),
  status: 200,
});

export const readFinding = operation({
  name: 'read-finding',
  method: 'GET',
  path: '/api/findings/{number}',
  summary: 'One finding.',
  changes: false,
  params: byNumber,
  response: finding,
  status: 200,
});

export const dispositionFinding = operation({
  name: 'disposition-finding',
  method: 'POST',
  path: '/api/findings/{number}/disposition',
  summary: 'A reviewer decides, with a signature; what stays outside the drawing is never accepted here.',
  changes: true,
  params: byNumber,
  body: z.strictObject({
    decision,
    reason: words(1000, 5),
    /** Rework: keys of the operations to repeat besides the finding's own; left out, what the plan's rework reopens. */
    repeat: z.array(z.string().max(60)).max(100).optional(),
    /** The kind of rework of the plan; what that kind reopens is always repeated. */
    scheme: words(60).optional(),
    password,
  }),
  response: finding,
  status: 201,
});

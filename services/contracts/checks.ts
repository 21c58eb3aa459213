import { z } from 'zod';
import { decimalText, id, instant, method, page, pageQuery, words } from './common';
import { operation } from './operation';
import { suspectList } from './suspects';

/** Hours before a good check runs out at which it is flagged. */
export const checkSoonHours = 2;

const check = z.object({
  id,
  scope: z.string(),
  title: z.string(),
  method: z.string(),
  kind: z.enum(['opening', 'bracketing']),
  result: z.enum(['good', 'failed']),
  value: z.string().nullable(),
  unit: z.string().nullable(),
  note: z.string().nullable(),
  at: instant,
  validUntil: instant,
  doneBy: z.object({ id, name: z.string() }),
  /** The suspect list that a failed one opened. */
  suspects: z.object({ id, number: z.string() }).nullable(),
});
export type Check = z.output<typeof check>;

const window = z.object({ unit: z.string(), lower: z.string().nullable(), upper: z.string().nullable() });

/** One check of a scope as it stands now: what a technique asks for, and the last one on record. */
const standing = z.object({
  scope: z.string(),
  title: z.string(),
  method: z.string(),
  kind: z.enum(['opening', 'bracketing']),
  validHours: z.int(),
  window: window.nullable(),
  /** Approved techniques that ask for it; empty for a check that only records know. */
  techniques: z.array(z.string()),
  state: z.enum(['failed', 'lapsed', 'never', 'owed', 'due-soon', 'good']),
  last: check.nullable(),
});
export type CheckStanding = z.output<typeof standing>;

export const listChecks = operation({
  name: 'list-checks',
  method: 'GET',
  path: '/api/checks',
  summary: 'Process checks, newest first.',
  changes: false,
  query: pageQuery.extend({ scope: z.string().max(60).optional(), method: method.optional() }),
  response: page(check),
  status: 200,
});

export const readStandingChecks = operation({
  name: 'read-standing-checks',
  method: 'GET',
  path: '/api/checks/standing',
  summary: 'How each check stands now: failed, lapsed and owed ones first.',
  changes: false,
  response: z.object({ items: z.array(standing) }),
  status: 200,
});

export const recordCheck = operation({
  name: 'record-check',
  method: 'POST',
  path: '/api/checks',
  summary:
    'Record a process check. Failed: everything that leaned on its scope since the last good one is answered as a suspect list and held; a good one restarts the line.',
  changes: true,
  body: z.strictObject({
    scope: words(60),
    title: words(160),
    method,
    kind: z.enum(['opening', 'bracketing']).default('opening'),
    result: z.enum(['good', 'failed']),
    value: decimalText.optional(),
    unit: words(20).optional(),
    note: words(400).optional(),
    /** When it was made; now unless told. */
    at: z.iso.datetime({ offset: true }).optional(),
    /** How long it counts where no approved technique says so. */
    validHours: z.int().min(1).max(8760).optional(),
  }),
  response: z.object({ check, suspects: suspectList.nullable() }),
  status: 201,
});

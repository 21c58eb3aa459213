import { z } from 'zod';
import { id, instant, page, pageQuery, password, verdict, words } from './common';
import { operation } from './operation';

/** What made work suspect. */
const suspectCause = z.enum(['calibration', 'check', 'technique']);

const gone = z.object({ number: z.string(), customer: z.string() });

/** A signed inspection that leaned on what failed. */
const suspectInspection = z.object({
  id,
  number: z.string(),
  verdict,
  actedAt: instant,
  group: id,
  operation: z.string(),
  title: z.string(),
  /** The part's requirement still rests on it; a replaced one is listed and holds nothing. */
  rests: z.boolean(),
  part: z.object({ id, serial: z.string(), partNumber: z.string(), state: z.string(), held: z.boolean() }),
  /** Released or shipped when the list was drawn. */
  gone: z.boolean(),
  certificates: z.array(gone),
});
export type SuspectInspection = z.output<typeof suspectInspection>;

/** Inspections of one operation, in the plant or already released: decided together. */
const suspectGroup = z.object({
  id,
  drawing: z.string(),
  operation: z.string(),
  title: z.string(),
  gone: z.boolean(),
  inspections: z.int(),
  parts: z.int(),
  state: z.enum(['open', 'closed']),
  closing: z
    .object({ how: z.enum(['no-effect', 'repeat']), reason: z.string(), by: z.object({ id, name: z.string() }), at: instant })
    .nullable(),
});
export type SuspectGroup = z.output<typeof suspectGroup>;

const listHead = z.object({
  id,
  number: z.string(),
  cause: suspectCause,
  /** The equipment, scope or technique, as people call it. */
  named: z.string(),
  equipment: id.nullable(),
  scope: z.string().nullable(),
  technique: z.string().nullable(),
  method: z.string(),
  reason: z.string(),
  /** The last good moment; null when there was none on record. */
  since: instant.nullable(),
  until: instant,
  openedBy: z.object({ id, name: z.string() }),
  openedAt: instant,
  state: z.enum(['open', 'closed']),
  inspections: z.int(),
  /** Parts that the open groups hold in the plant, and parts that had gone and are to be recalled. */
  held: z.int(),
  recall: z.int(),
});
export type SuspectListHead = z.output<typeof listHead>;

/** The list with its groups and the first inspections, shipped ones first; `next` leads to the others. */
export const suspectList = listHead.extend({
  groups: z.array(suspectGroup),
  items: z.array(suspectInspection),
  next: z.string().nullable(),
});
export type SuspectList = z.output<typeof suspectList>;

const byId = z.object({ id });

export const listSuspects = operation({
  name: 'list-suspects',
  method: 'GET',
  path: '/api/suspects',
  summary: 'Suspect lists, newest first: of one equipment or one check scope where named.',
  changes: false,
  query: pageQuery.extend({
    equipment: id.optional(),
    scope: z.string().max(60).optional(),
    open: z.enum(['true', 'false']).optional(),
  }),
  response: page(listHead),
  status: 200,
});

export const readSuspects = operation({
  name: 'read-suspects',
  method: 'GET',
  path: '/api/suspects/{id}',
  summary: 'One suspect list: its groups, and the inspections that leaned on what failed, shipped ones first.',
  changes: false,
  params: byId,
  query: pageQuery,
  response: suspectList,
  status: 200,
});

export const closeSuspectGroup = operation({
  name: 'close-suspect-group',
  method: 'POST',
  path: '/api/suspects/{id}/groups/{group}/closing',
  summary:
    'Close a group: no-effect with a reason by a level 3 of the method, or repeat: the operation is to be inspected again. Lifts its hold.',
  changes: true,
  params: z.object({ id, group: id }),
  body: z.strictObject({ decision: z.enum(['no-effect', 'repeat']), reason: words(400, 10), password }),
  response: suspectList,
  status: 200,
});

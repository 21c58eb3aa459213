import { z } from 'zod';
import { id, instant, mark, page, pageQuery, partState, requirementState, words } from './common';
import { operation } from './operation';

export const lotKind = z.enum(['heat', 'shell', 'core', 'wax', 'cluster', 'coating', 'penetrant-material', 'furnace-load']);

export const lotRef = z.object({ id, kind: lotKind, number: z.string() });

export const lot = z.object({
  id,
  kind: lotKind,
  number: z.string(),
  quantity: z.int(),
  attributes: z.record(z.string(), z.string()),
  parents: z.array(lotRef),
  children: z.array(lotRef),
  /** A hold stands on this lot or on one it came from. */
  held: z.boolean(),
  /** Parts downstream. */
  partCount: z.int(),
  createdAt: instant,
});
export type Lot = z.output<typeof lot>;

/** A lot with what stands over it and how far everything downstream has come. */
export const lotStory = lot.extend({
  holds: z.array(z.object({ id, number: z.string(), reason: z.string(), target: z.string(), placedAt: instant })),
  /** Requirements of all parts downstream, by state. */
  progress: z.partialRecord(requirementState, z.int()),
});
export type LotStory = z.output<typeof lotStory>;

export const listLots = operation({
  name: 'list-lots',
  method: 'GET',
  path: '/api/lots',
  summary: 'Lots, newest first.',
  changes: false,
  query: pageQuery.extend({ kind: lotKind.optional(), number: z.string().max(40).optional() }),
  response: page(lot.omit({ parents: true, children: true })),
  status: 200,
});

export const createLot = operation({
  name: 'create-lot',
  method: 'POST',
  path: '/api/lots',
  summary: 'Enter a lot with the lots it came from.',
  changes: true,
  body: z.strictObject({
    kind: lotKind,
    number: mark,
    quantity: z.int().min(1).max(100000),
    parents: z.array(id).max(50).default([]),
    attributes: z.record(z.string().max(60), words(400)).default({}),
  }),
  response: lot,
  status: 201,
});

export const readLot = operation({
  name: 'read-lot',
  method: 'GET',
  path: '/api/lots/{id}',
  summary: 'One lot, the lots it came from and that came from it, and how far everything downstream has come.',
  changes: false,
  params: z.object({ id }),
  response: lotStory,
  status: 200,
});

export const ringSegment = z.object({
  key: z.string(),
  title: z.string(),
  operation: z.string(),
  method: z.string(),
  state: requirementState,
});

export const partSummary = z.object({
  id,
  serial: z.string(),
  partNumber: z.string(),
  title: z.string(),
  revision: z.string(),
  planIssue: z.int(),
  customer: z.string(),
  cluster: z.string(),
  position: z.string(),
  state: partState,
  held: z.boolean(),
  openFindings: z.int(),
  met: z.int(),
  required: z.int(),
  next: z.string().nullable(),
  ring: z.array(ringSegment),
});
export type PartSummary = z.output<typeof partSummary>;

export const listLotParts = operation({
  name: 'list-lot-parts',
  method: 'GET',
  path: '/api/lots/{id}/parts',
  summary: 'Everything downstream of a lot.',
  changes: false,
  params: z.object({ id }),
  query: pageQuery,
  response: page(partSummary),
  status: 200,
});

export const splitLot = operation({
  name: 'split-lot',
  method: 'POST',
  path: '/api/lots/{id}/split',
  summary: 'Take a quantity into a new lot; the remainder stays.',
  changes: true,
  params: z.object({ id }),
  body: z.strictObject({ number: mark, quantity: z.int().min(1).max(100000) }),
  response: lot,
  status: 201,
});

export const partsFilter = z.object({
  serial: z.string().max(40).optional(),
  state: partState.optional(),
  partNumber: z.string().max(60).optional(),
  customer: z.string().max(60).optional(),
  cluster: z.string().max(40).optional(),
  held: z.enum(['true', 'false']).optional(),
  findings: z.enum(['open']).optional(),
  sort: z.enum(['serial', '-serial', 'newest']).default('serial'),
});

export const listParts = operation({
  name: 'list-parts',
  method: 'GET',
  path: '/api/parts',
  summary: 'Parts with their rings; a serial resolves to its candidates.',
  changes: false,
  query: pageQuery.extend(partsFilter.shape),
  response: page(partSummary),
  status: 200,
});

export const createParts = operation({
  name: 'create-parts',
  method: 'POST',
  path: '/api/parts',
  summary: 'Give serials to the surviving positions of clusters.',
  changes: true,
  body: z.strictObject({
    plan: id,
    parts: z
      .array(z.strictObject({ serial: mark, cluster: z.string().min(1).max(60), position: z.string().trim().min(1).max(12) }))
      .min(1)
      .max(500),
  }),
  response: z.object({ items: z.array(partSummary), next: z.null() }),
  status: 201,
});

export const partRequirement = ringSegment.extend({
  id,
  technique: z.string().nullable(),
  inspection: z.object({ id, number: z.string(), verdict: z.string(), signedBy: z.string(), signedAt: instant }).nullable(),
  draft: z.object({ id, openedBy: z.string(), changedAt: instant }).nullable(),
  cycle: z.int(),
  reason: z.string().nullable(),
});

export const part = partSummary.extend({
  version: z.int(),
  plan: z.object({ id, issue: z.int() }),
  requirements: z.array(partRequirement),
  lots: z.array(lotRef.extend({ depth: z.int() })),
  siblings: z.array(z.object({ id, serial: z.string(), position: z.string(), state: partState })),
  findings: z.array(z.object({ number: z.string(), state: z.string(), summary: z.string(), openedAt: instant })),
  holds: z.array(z.object({ id, number: z.string(), reason: z.string(), target: z.string(), placedAt: instant })),
  certificates: z.array(z.object({ number: z.string(), state: z.string(), signedAt: instant })),
  shipment: z.string().nullable(),
});
export type Part = z.output<typeof part>;

export const readPart = operation({
  name: 'read-part',
  method: 'GET',
  path: '/api/parts/{id}',
  summary: 'One part with its whole state.',
  changes: false,
  params: z.object({ id }),
  response: part,
  status: 200,
});

export const hold = z.object({
  id,
  number: z.string(),
  target: z.object({ kind: z.enum(['part', 'lot']), id, name: z.string() }),
  reason: z.string(),
  placedBy: z.string(),
  placedAt: instant,
  liftedBy: z.string().nullable(),
  liftedAt: instant.nullable(),
  liftedReason: z.string().nullable(),
  held: z.int(),
  recall: z.array(z.object({ part: id, serial: z.string(), certificate: z.string(), customer: z.string() })),
});
export type Hold = z.output<typeof hold>;

export const listHolds = operation({
  name: 'list-holds',
  method: 'GET',
  path: '/api/holds',
  summary: 'Holds, newest first.',
  changes: false,
  query: pageQuery.extend({ open: z.enum(['true', 'false']).optional() }),
  response: page(hold),
  status: 200,
});

export const placeHold = operation({
  name: 'place-hold',
  method: 'POST',
  path: '/api/holds',
  summary: 'Hold a part or a lot and everything downstream at once; what is already released is answered as a recall list.',
  changes: true,
  body: z.strictObject({ target: z.strictObject({ kind: z.enum(['part', 'lot']), id }), reason: words(400, 5) }),
  response: hold,
  status: 201,
});

export const liftHold = operation({
  name: 'lift-hold',
  method: 'POST',
  path: '/api/holds/{id}/lift',
  summary: 'Lift a hold with a reason and a signature.',
  changes: true,
  params: z.object({ id }),
  body: z.strictObject({ reason: words(400, 5), password: z.string().max(200) }),
  response: hold,
  status: 200,
});

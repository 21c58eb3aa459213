import { z } from 'zod';
import { id, instant, page, pageQuery, password, verdict, words } from './common';
import { act, enteredProcess } from './inspection-content';
import { operation } from './operation';

const byId = z.object({ id });

/** Parts in one basket; a larger load is several baskets. */
export const mostParts = 400;

const countOf = z
  .int()
  .min(1, 'must be at least 1')
  .max(mostParts, `must be at most ${String(mostParts)}`);

/** How a part stands in its basket: clean as scanned, marked at the bench, signed by itself there, given up there, or taken out. */
export const basketMark = z.enum(['clean', 'marked', 'signed-apart', 'given-up', 'taken-out', 'signed']);

export const basketPart = z.object({
  part: id,
  serial: z.string(),
  revision: z.string(),
  planIssue: z.int(),
  /** The inspection: a draft until the basket is signed. */
  inspection: id,
  number: z.string().nullable(),
  scannedAt: instant,
  mark: basketMark,
  held: z.boolean(),
  /** Of a marked draft the verdict so far; of a signed one its verdict; a clean part has none before it is signed. */
  verdict: verdict.nullable(),
  reason: z.string().nullable(),
});
export type BasketPart = z.output<typeof basketPart>;

const counts = z.object({
  /** Put in when the basket was opened. */
  in: z.int(),
  /** Inspected and in the basket. */
  scanned: z.int(),
  /** Scanned and no longer in it: taken out, or ended at the bench. */
  out: z.int(),
});
export type BasketCounts = z.output<typeof counts>;

const asked = z.object({
  key: z.string(),
  operation: z.string(),
  title: z.string(),
  method: z.string(),
  technique: z.string().nullable(),
});

const summary = z.object({
  id,
  number: z.string(),
  state: z.enum(['open', 'signed', 'closed']),
  partNumber: z.string(),
  title: z.string(),
  requirement: asked,
  line: z.string().nullable(),
  run: z.object({ id, number: z.string(), standing: z.enum(['incomplete', 'good', 'void']) }).nullable(),
  counts,
  evaluator: z.object({ id, name: z.string() }),
  openedAt: instant,
  endedAt: instant.nullable(),
});
export type BasketSummary = z.output<typeof summary>;

/** A process value of the operation with its window, as the engine judges it. */
const processRow = z.object({
  number: z.string(),
  title: z.string(),
  unit: z.string(),
  lower: z.string().nullable(),
  upper: z.string().nullable(),
});
export type ProcessRow = z.output<typeof processRow>;

export const basket = summary.extend({
  version: z.int(),
  process: z.array(enteredProcess),
  acts: z.array(act),
  windows: z.array(processRow),
  /** What stands against the set-up as a whole, by field; a process value outside its window voids every inspection. */
  setUp: z.object({
    void: z.boolean(),
    judged: z.array(z.object({ number: z.string(), verdict, text: z.string() })),
    faults: z.array(z.object({ path: z.string(), message: z.string() })),
  }),
  splitFrom: z.object({ id, number: z.string() }).nullable(),
  splitInto: z.array(z.object({ id, number: z.string(), evaluator: z.string() })),
  parts: z.array(basketPart),
  /** The sentence one signature signs, for the parts now listed. */
  sentence: z.string(),
  signed: z.object({ count: z.int(), sentence: z.string(), at: instant, by: z.string(), recordDigest: z.string() }).nullable(),
});
export type BasketAnswer = z.output<typeof basket>;

export const listBaskets = operation({
  name: 'list-baskets',
  method: 'GET',
  path: '/api/baskets',
  summary: 'Baskets, newest first.',
  changes: false,
  query: pageQuery.extend({ state: z.enum(['open', 'signed', 'closed']).optional(), mine: z.enum(['true']).optional() }),
  response: page(summary),
  status: 200,
});

export const setUpBasket = operation({
  name: 'set-up-basket',
  method: 'GET',
  path: '/api/baskets/set-up',
  summary: 'From one scanned part, or a part number: the operations a basket of its kind can be opened for, with what each asks.',
  changes: false,
  query: z.object({ scan: z.string().min(1).max(200).optional(), partNumber: z.string().min(1).max(60).optional() }),
  response: z.object({
    partNumber: z.string(),
    title: z.string(),
    /** The part that was scanned; null when only the part number was named. */
    serial: z.string().nullable(),
    operations: z.array(
      asked.extend({
        /** Why a basket cannot be opened for it: it asks for readings or files of each part. */
        refusal: z.string().nullable(),
        waiting: z.boolean(),
        windows: z.array(processRow),
        neededActs: z.array(z.object({ kind: z.string(), equipment: z.boolean() })),
        indicator: z.string().nullable(),
        equipment: z.array(z.object({ id, number: z.string(), title: z.string() })),
        runs: z.array(z.object({ id, number: z.string(), line: z.string().nullable(), enteredAt: instant })),
      }),
    ),
    people: z.array(z.object({ id, name: z.string() })),
  }),
  status: 200,
});
export type BasketSetUp = z.output<(typeof setUpBasket)['response']>;

export const openBasket = operation({
  name: 'open-basket',
  method: 'POST',
  path: '/api/baskets',
  summary:
    'Open a basket: operation, line, equipment, process values and acts entered once. With `run` the process values are those of the run.',
  changes: true,
  body: z.strictObject({
    partNumber: z.string().min(1).max(60),
    /** Key of the requirement in the plan. */
    requirement: z.string().min(1).max(60),
    line: words(60).nullish(),
    run: id.nullish(),
    countIn: countOf,
    process: z.array(enteredProcess).max(200).default([]),
    acts: z.array(act).max(10).default([]),
  }),
  response: basket,
  status: 201,
});

export const readBasket = operation({
  name: 'read-basket',
  method: 'GET',
  path: '/api/baskets/{id}',
  summary: 'One basket with its parts in the order they were scanned.',
  changes: false,
  params: byId,
  response: basket,
  status: 200,
});

export const changeBasket = operation({
  name: 'change-basket',
  method: 'PATCH',
  path: '/api/baskets/{id}',
  summary: 'Correct the set-up or the count of an open basket; clean parts follow, marked ones keep what the bench holds.',
  changes: true,
  params: byId,
  body: z.strictObject({
    countIn: countOf.optional(),
    line: words(60).nullish(),
    process: z.array(enteredProcess).max(200).optional(),
    acts: z.array(act).max(10).optional(),
  }),
  response: basket,
  status: 200,
});

export const scanPart = operation({
  name: 'scan-basket-part',
  method: 'POST',
  path: '/api/baskets/{id}/parts',
  summary:
    'Add one scanned or typed part. The same part again answers `already` and changes nothing. A refusal says `why`: unknown, wrong-part, wrong-operation, already-accepted, undecided, held, elsewhere, not-inspectable. A scan that waited for the network names its wait in the header Scan-Waited-Ms, so that the act is that much earlier and a repeated key stays the same request.',
  changes: true,
  params: byId,
  body: z.strictObject({ scan: z.string().min(1).max(200) }),
  response: z.object({ outcome: z.enum(['added', 'already']), part: basketPart, counts }),
  status: 201,
});
export type ScanAnswer = z.output<(typeof scanPart)['response']>;

export const removePart = operation({
  name: 'remove-basket-part',
  method: 'POST',
  path: '/api/baskets/{id}/parts/{part}/removal',
  summary: 'Take a part out of the basket; its draft is given up and kept.',
  changes: true,
  params: z.object({ id, part: id }),
  body: z.strictObject({ reason: words(400) }),
  response: basket,
  status: 200,
});

export const signBasket = operation({
  name: 'sign-basket',
  method: 'POST',
  path: '/api/baskets/{id}/signature',
  summary:
    'One signature for every part in the basket: one inspection each, all or nothing. `count` is what the evaluator counted. 422 with every reason, by serial.',
  changes: true,
  params: byId,
  body: z.strictObject({
    count: z.int().min(0).max(mostParts),
    password: password.optional(),
    pin: z.string().min(1).max(20).optional(),
  }),
  response: z.object({
    basket: id,
    number: z.string(),
    sentence: z.string(),
    count: z.int(),
    inspections: z.array(
      z.object({
        serial: z.string(),
        part: id,
        inspection: id,
        number: z.string(),
        verdict,
        findings: z.array(z.object({ number: z.string() })),
      }),
    ),
  }),
  status: 201,
});
export type BasketSigned = z.output<(typeof signBasket)['response']>;

export const splitBasket = operation({
  name: 'split-basket',
  method: 'POST',
  path: '/api/baskets/{id}/split',
  summary:
    'At a shift change: what is scanned stays with its evaluator; the `count` parts not yet inspected go on in a new basket of the next one.',
  changes: true,
  params: byId,
  body: z.strictObject({
    /** All that are left, when not given. */
    count: countOf.optional(),
    /** The next evaluator; the person who asks, when not given. */
    to: id.optional(),
  }),
  response: basket,
  status: 201,
});

export const closeBasket = operation({
  name: 'close-basket',
  method: 'POST',
  path: '/api/baskets/{id}/closing',
  summary: 'Give up an open basket: the drafts of its parts are given up and kept, nothing is signed.',
  changes: true,
  params: byId,
  body: z.strictObject({ reason: words(400) }),
  response: basket,
  status: 200,
});

/** What is printed on the tag of a part that leaves a basket. */
export interface HoldTag {
  readonly serial: string;
  readonly revision: string;
  readonly partNumber: string;
  readonly basket: string;
  readonly operation: string;
  readonly title: string;
  readonly inspection: string;
  readonly verdict: 'reject' | 'indeterminate' | 'not-evaluable';
  readonly findings: string | null;
  readonly at: string;
  readonly by: string;
  /** Data Matrix of the serial: an SVG path of so many modules a side. */
  readonly code: { readonly path: string; readonly modules: number };
}

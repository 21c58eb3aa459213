import { z } from 'zod';
import { id, mark, method, words } from './common';

/** A corner in whole micrometres on a view, y upwards. */
const corner = z.tuple([z.int().min(-1e8).max(1e8), z.int().min(-1e8).max(1e8)]);

/** A nominal view of the part on which zones are drawn and indications are placed. */
export const planView = z.strictObject({
  name: mark,
  title: words(80),
  widthUm: z.int().min(1).max(1e8),
  heightUm: z.int().min(1).max(1e8),
  outline: z.array(corner).max(4000).optional(),
});

/** One row of the route: what the plan demands of every part, in route order. Numbers refer to the plan's criteria. */
export const planRequirement = z.strictObject({
  key: mark.optional(),
  operation: z.string().trim().min(1).max(12),
  title: words(160),
  method,
  technique: mark.optional(),
  views: z.array(mark).default([]),
  characteristics: z.array(z.string()).default([]),
  attributes: z.array(z.string()).default([]),
  process: z.array(z.string()).default([]),
  indicationRules: z.array(z.string()).default([]),
  /** Files that must be attached before signing. */
  evidence: z
    .array(
      z.strictObject({ role: z.enum(['radiograph', 'photograph', 'reading-file', 'document']), minimum: z.int().min(1).max(50) }),
    )
    .default([]),
  /** Reading a step block before and after is part of the operation. */
  blockCheck: z
    .strictObject({
      unit: z.string(),
      steps: z
        .array(z.strictObject({ nominal: z.string(), tolerance: z.string() }))
        .min(1)
        .max(20),
    })
    .optional(),
  /** Image quality indicator that must be placed and seen. */
  indicator: z.strictObject({ required: words(60) }).optional(),
  /** Which process-check scopes must be good for the act to count. */
  checks: z.array(words(60)).default([]),
});
export type PlanRequirement = z.output<typeof planRequirement>;

/** Rework the plan permits: who may order it, how often, what it reopens. */
export const planRework = z.strictObject({
  kind: mark,
  title: words(160),
  inspectorMayOrder: z.boolean().default(false),
  mostCycles: z.int().min(1).max(20).default(1),
  reopens: z.array(mark).default([]),
});

/**
 * A characteristic whose reading is derived from raw entries. An input without a value is entered at the bench, in `unit` where
 * it has one; with a value the plan fixes it. Quantities and inputs are the engine's list.
 */
const planDerivation = z.strictObject({
  characteristic: z.string().min(1).max(24),
  quantity: z.string().min(1).max(60),
  inputs: z
    .array(
      z.strictObject({
        name: z.string().min(1).max(60),
        unit: z.string().max(20).optional(),
        value: z.union([z.string().max(60), z.array(z.string().max(60)).max(2000)]).optional(),
      }),
    )
    .max(20),
});

export const effectivity = z.strictObject({
  kind: z.enum(['serial', 'lot', 'date']),
  from: words(60),
  to: words(60).nullable().default(null),
});

/**
 * The body of a plan issue. `criteria` has the form of POST /api/evaluate and is judged by the engine's own fault
 * finder, so that every fault of form and meaning comes in one answer.
 */
export const planContent = z.strictObject({
  views: z.array(planView).max(20).default([]),
  criteria: z.record(z.string(), z.unknown()).default({}),
  route: z.array(planRequirement).max(100).default([]),
  rework: z.array(planRework).max(50).default([]),
  effectivity: effectivity.nullable().default(null),
  derived: z.array(planDerivation).max(500).optional(),
});
export type PlanContent = z.output<typeof planContent>;

export const planState = z.enum(['draft', 'checked', 'approved', 'superseded', 'withdrawn-for-error']);

export const personAt = z.object({ id, name: z.string(), at: z.string() }).nullable();

/** A plan issue as read. */
export const plan = planContent.extend({
  id,
  drawing: z.string(),
  title: z.string(),
  revision: z.string(),
  issue: z.int(),
  state: planState,
  version: z.int(),
  prepared: personAt,
  checked: personAt,
  approved: personAt,
  ended: personAt,
  endedReason: z.string().nullable(),
});
export type Plan = z.output<typeof plan>;

/** Only the content of a plan that is read with its states. */
export function contentOf(plan: PlanContent): PlanContent {
  const { views, criteria, route, rework, effectivity, derived } = plan;
  return { views, criteria, route, rework, effectivity, ...(derived ? { derived } : {}) };
}

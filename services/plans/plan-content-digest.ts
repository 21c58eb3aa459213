import { createHash } from 'node:crypto';
import type { PlanContent } from '@/services/contracts/plan-content';
import { canonicalJson } from '@/services/engine/record/canonical';

/** SHA-256 (hex) of the canonical JSON of a plan's content. */
export function planContentDigest(content: PlanContent): string {
  return createHash('sha256')
    .update(canonicalJson(JSON.parse(JSON.stringify(content))))
    .digest('hex');
}

/** Only the content of a plan that is read with its states. */
export function contentOf(plan: PlanContent): PlanContent {
  const { views, criteria, route, rework, effectivity, derived } = plan;
  return { views, criteria, route, rework, effectivity, ...(derived ? { derived } : {}) };
}

import { createHash } from 'node:crypto';
import type { PlanContent } from '@/services/contracts/plan-content';
import { canonicalJson } from '@/services/engine/record/canonical';

/** SHA-256 (hex) of the canonical JSON of a plan's content. */
export function planContentDigest(content: PlanContent): string {
  return createHash('sha256')
    .update(canonicalJson(JSON.parse(JSON.stringify(content))))
    .digest('hex');
}

import { drawingByNumber } from '@/db/repositories/drawings';
import { planById, plansOfDrawing } from '@/db/repositories/plans';
import type { Reading } from '@/db/work';
import { contentOf, type Plan } from '@/services/contracts/plan-content';
import { notFound, type FieldError } from '@/services/http/problem';
import { Raw } from '@/services/http/route';
import { planFaults } from '@/services/contracts/plan-faults';

async function found(reading: Reading, planId: string): Promise<Plan> {
  const plan = await planById(reading, planId);
  if (!plan) throw notFound('Plan issue');
  return plan;
}

/** One plan issue with its version as ETag. */
export async function readPlan(reading: Reading, planId: string): Promise<Raw> {
  const plan = await found(reading, planId);
  return new Raw(Response.json(plan, { headers: { etag: `"${String(plan.version)}"`, 'cache-control': 'no-store' } }));
}

/** Plan issues of a drawing, newest first. Problem not-found. */
export async function listPlans(reading: Reading, number: string): Promise<{ items: Plan[]; next: null }> {
  if (!(await drawingByNumber(reading, number))) throw notFound(`Drawing ${number}`);
  return { items: await plansOfDrawing(reading, number), next: null };
}

/** What stands against checking and approving a plan issue. */
export async function readPlanFaults(reading: Reading, planId: string): Promise<{ faults: FieldError[] }> {
  return { faults: planFaults(contentOf(await found(reading, planId))) };
}

import { changePlan as changeContract, readPlan as readContract } from '@/services/contracts/plans';
import { route } from '@/services/http/route';
import { changePlan } from '@/services/plans/move-plan';
import { readPlan } from '@/services/plans/read-plan';

export const GET = route({
  contract: readContract,
  who: 'see-plans',
  event: null,
  call: (reading, { params }) => readPlan(reading, params.id),
});

export const PUT = route({
  contract: changeContract,
  who: 'prepare-plans',
  event: 'plan-changed',
  call: (work, { params, body, ifMatch }) => changePlan(work, params.id, body, ifMatch),
});

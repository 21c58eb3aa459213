import { draftPlan as draftContract, listPlans as listContract } from '@/services/contracts/plans';
import { route } from '@/services/http/route';
import { draftPlan } from '@/services/plans/draft-plan';
import { listPlans } from '@/services/plans/read-plan';

export const GET = route({
  contract: listContract,
  who: 'see-plans',
  event: null,
  call: (reading, { params }) => listPlans(reading, params.number),
});

export const POST = route({
  contract: draftContract,
  who: 'prepare-plans',
  event: 'plan-drafted',
  call: (work, { params, body }) => draftPlan(work, params.number, body),
});

import { checkPlan as contract } from '@/services/contracts/plans';
import { route } from '@/services/http/route';
import { checkPlan } from '@/services/plans/move-plan';

export const POST = route({
  contract,
  who: 'approve-plans',
  event: 'plan-checked',
  call: (work, { params }) => checkPlan(work, params.id),
});

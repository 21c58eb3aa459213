import { confirmSignature } from '@/services/accounts/confirm-signature';
import { withdrawPlan as contract } from '@/services/contracts/plans';
import { route } from '@/services/http/route';
import { withdrawPlan } from '@/services/plans/move-plan';

export const POST = route({
  contract,
  who: 'approve-plans',
  event: 'plan-withdrawn',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => withdrawPlan(work, params.id, body.reason),
});

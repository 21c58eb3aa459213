import { confirmSignature } from '@/services/accounts/confirm-signature';
import { approvePlan as contract } from '@/services/contracts/plans';
import { route } from '@/services/http/route';
import { approvePlan } from '@/services/plans/move-plan';

export const POST = route({
  contract,
  who: 'approve-plans',
  event: 'plan-approved',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params }) => approvePlan(work, params.id),
});

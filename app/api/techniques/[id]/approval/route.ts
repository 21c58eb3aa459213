import { confirmSignature } from '@/services/accounts/confirm-signature';
import { approveTechnique as contract } from '@/services/contracts/techniques';
import { route } from '@/services/http/route';
import { approveTechnique } from '@/services/techniques/move-technique';

export const POST = route({
  contract,
  who: 'approve-plans',
  event: 'technique-approved',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params }) => approveTechnique(work, params.id),
});

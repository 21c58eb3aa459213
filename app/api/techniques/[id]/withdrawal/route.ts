import { confirmSignature } from '@/services/accounts/confirm-signature';
import { withdrawTechnique as contract } from '@/services/contracts/techniques';
import { route } from '@/services/http/route';
import { withdrawTechnique } from '@/services/techniques/move-technique';

export const POST = route({
  contract,
  who: 'approve-plans',
  event: 'technique-withdrawn',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => withdrawTechnique(work, params.id, body.reason),
});

import { confirmSignature } from '@/services/accounts/confirm-signature';
import { withdrawAuthorisation as contract } from '@/services/contracts/personnel';
import { route } from '@/services/http/route';
import { withdrawAuthorisation } from '@/services/personnel/keep-authorisations';

export const POST = route({
  contract,
  who: 'approve-personnel',
  event: 'authorisation-withdrawn',
  prepare: (actor, { body }) => confirmSignature(actor, { password: body.password }),
  call: (work, { params, body }) => withdrawAuthorisation(work, params.id, body.reason),
});

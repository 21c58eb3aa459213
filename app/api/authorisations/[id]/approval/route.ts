import { confirmSignature } from '@/services/accounts/confirm-signature';
import { grantAuthorisation as contract } from '@/services/contracts/personnel';
import { route } from '@/services/http/route';
import { grantAuthorisation } from '@/services/personnel/keep-authorisations';

export const POST = route({
  contract,
  who: 'approve-personnel',
  event: 'authorisation-granted',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params }) => grantAuthorisation(work, params.id),
});

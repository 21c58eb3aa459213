import { confirmSignature } from '@/services/accounts/confirm-signature';
import { dispositionFinding as contract } from '@/services/contracts/findings';
import { dispositionFinding } from '@/services/findings/disposition-finding';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'disposition',
  event: 'finding-dispositioned',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => dispositionFinding(work, params.number, body),
});

import { confirmSignature } from '@/services/accounts/confirm-signature';
import { signInspection as contract } from '@/services/contracts/inspections';
import { route } from '@/services/http/route';
import { signInspection } from '@/services/inspections/sign-inspection';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'inspection-signed',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, ifMatch }) => signInspection(work, params.id, ifMatch),
});

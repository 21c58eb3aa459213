import { confirmSignature } from '@/services/accounts/confirm-signature';
import { releaseShipment as contract } from '@/services/contracts/shipments';
import { route } from '@/services/http/route';
import { signRelease } from '@/services/releases/sign-release';

export const POST = route({
  contract,
  who: 'sign-release',
  event: 'release-signed',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params }) => signRelease(work, params.number),
});

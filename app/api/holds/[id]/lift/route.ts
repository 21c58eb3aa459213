import { confirmSignature } from '@/services/accounts/confirm-signature';
import { liftHold as contract } from '@/services/contracts/parts';
import { liftHold } from '@/services/holds/keep-holds';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'lift-hold',
  event: 'hold-lifted',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => liftHold(work, params.id, body.reason),
});

import { confirmSignature } from '@/services/accounts/confirm-signature';
import { signBasket } from '@/services/baskets/sign-basket';
import { signBasket as contract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'basket-signed',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => signBasket(work, params.id, body.count),
});

import { closeBasket } from '@/services/baskets/close-basket';
import { closeBasket as contract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'basket-closed',
  call: (work, { params, body }) => closeBasket(work, params.id, body.reason),
});

import { splitBasket } from '@/services/baskets/split-basket';
import { splitBasket as contract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'basket-split',
  call: (work, { params, body }) => splitBasket(work, params.id, body),
});

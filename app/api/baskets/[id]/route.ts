import { changeBasket } from '@/services/baskets/change-basket';
import { readBasket } from '@/services/baskets/read-basket';
import { changeBasket as changeContract, readBasket as readContract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const GET = route({
  contract: readContract,
  who: 'see-inspections',
  event: null,
  call: (reading, { params }) => readBasket(reading, params.id),
});

export const PATCH = route({
  contract: changeContract,
  who: 'inspect',
  event: 'basket-changed',
  call: (work, { params, body }) => changeBasket(work, params.id, body),
});

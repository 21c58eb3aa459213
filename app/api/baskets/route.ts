import { listBaskets } from '@/services/baskets/read-basket';
import { openBasket } from '@/services/baskets/open-basket';
import { listBaskets as listContract, openBasket as openContract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'see-inspections',
  event: null,
  call: (reading, { query }) => listBaskets(reading, query),
});

export const POST = route({
  contract: openContract,
  who: 'inspect',
  event: 'basket-opened',
  call: (work, { body }) => openBasket(work, body),
});

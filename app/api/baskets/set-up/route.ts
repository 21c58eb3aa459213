import { offerSetUp } from '@/services/baskets/offer-set-up';
import { setUpBasket as contract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'inspect',
  event: null,
  call: (reading, { query }) => offerSetUp(reading, query),
});

import { removePart } from '@/services/baskets/remove-part';
import { removePart as contract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'basket-part-removed',
  call: (work, { params, body }) => removePart(work, params.id, params.part, body.reason),
});

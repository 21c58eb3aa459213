import { scanPart, waitedMsOf } from '@/services/baskets/scan-part';
import { scanPart as contract } from '@/services/contracts/baskets';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'basket-part-scanned',
  call: (work, { params, body, request }) => scanPart(work, params.id, body, waitedMsOf(request)),
});

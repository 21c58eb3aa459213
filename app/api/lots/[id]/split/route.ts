import { splitLot as contract } from '@/services/contracts/parts';
import { route } from '@/services/http/route';
import { splitLot } from '@/services/lots/keep-lots';

export const POST = route({
  contract,
  who: 'enter-parts',
  event: 'lot-split',
  call: (work, { params, body }) => splitLot(work, params.id, body),
});

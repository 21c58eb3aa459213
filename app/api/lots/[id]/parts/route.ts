import { listLotParts as contract } from '@/services/contracts/parts';
import { route } from '@/services/http/route';
import { listLotParts } from '@/services/lots/keep-lots';

export const GET = route({
  contract,
  who: 'see-parts',
  event: null,
  call: (reading, { params, query }) => listLotParts(reading, params.id, query),
});

import { createLot as createContract, listLots as listContract } from '@/services/contracts/parts';
import { route } from '@/services/http/route';
import { createLot, listLots } from '@/services/lots/keep-lots';

export const GET = route({
  contract: listContract,
  who: 'see-parts',
  event: null,
  call: (reading, { query }) => listLots(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'enter-parts',
  event: 'lot-created',
  call: (work, { body }) => createLot(work, body),
});

import { listHolds as listContract, placeHold as placeContract } from '@/services/contracts/parts';
import { listHolds, placeHold } from '@/services/holds/keep-holds';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'see-parts',
  event: null,
  call: (reading, { query }) => listHolds(reading, query),
});

export const POST = route({
  contract: placeContract,
  who: 'raise-hold',
  event: 'hold-placed',
  call: (work, { body }) => placeHold(work, body),
});

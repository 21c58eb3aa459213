import { readSuspects as contract } from '@/services/contracts/suspects';
import { route } from '@/services/http/route';
import { suspectListWith } from '@/services/suspects/read-suspects';

export const GET = route({
  contract,
  who: 'see-equipment',
  event: null,
  call: (reading, { params, query }) => suspectListWith(reading, params.id, query),
});

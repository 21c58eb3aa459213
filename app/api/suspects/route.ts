import { listSuspects as contract } from '@/services/contracts/suspects';
import { route } from '@/services/http/route';
import { listSuspects } from '@/services/suspects/read-suspects';

export const GET = route({
  contract,
  who: 'see-equipment',
  event: null,
  call: (reading, { query }) => listSuspects(reading, query),
});

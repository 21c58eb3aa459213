import { listRecord as contract } from '@/services/contracts/trace';
import { route } from '@/services/http/route';
import { listRecord } from '@/services/record/list-record';

export const GET = route({
  contract,
  who: 'see-record',
  event: null,
  call: (reading, { query }) => listRecord(reading, query),
});

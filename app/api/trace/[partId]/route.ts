import { readTrace as contract } from '@/services/contracts/trace';
import { route } from '@/services/http/route';
import { readTrace } from '@/services/trace/read-trace';

export const GET = route({
  contract,
  who: 'see-trace',
  event: null,
  call: (reading, { params, query }) => readTrace(reading, params.partId, query.recordedBy),
});

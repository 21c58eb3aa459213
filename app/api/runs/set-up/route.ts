import { setUpRun as contract } from '@/services/contracts/runs';
import { route } from '@/services/http/route';
import { offerRunSetUp } from '@/services/runs/read-run';

export const GET = route({
  contract,
  who: 'inspect',
  event: null,
  call: (reading, { query }) => offerRunSetUp(reading, query.technique),
});

import { listFindings as contract } from '@/services/contracts/findings';
import { listFindings } from '@/services/findings/read-finding';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'see-findings',
  event: null,
  call: (reading, { query }) => listFindings(reading, query),
});

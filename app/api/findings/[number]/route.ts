import { readFinding as contract } from '@/services/contracts/findings';
import { readFinding } from '@/services/findings/read-finding';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'see-findings',
  event: null,
  call: (reading, { params }) => readFinding(reading, params.number),
});

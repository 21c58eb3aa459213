import { readPart as contract } from '@/services/contracts/parts';
import { route } from '@/services/http/route';
import { readPart } from '@/services/parts/read-part';

export const GET = route({
  contract,
  who: 'see-parts',
  event: null,
  call: (reading, { params }) => readPart(reading, params.id),
});

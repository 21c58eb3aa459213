import { addRunPart as contract } from '@/services/contracts/runs';
import { route } from '@/services/http/route';
import { addRunPart } from '@/services/runs/add-run-part';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'run-changed',
  call: (work, { params, body }) => addRunPart(work, params.id, body),
});

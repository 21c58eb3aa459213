import { changeRunValues as contract } from '@/services/contracts/runs';
import { route } from '@/services/http/route';
import { changeRunValues } from '@/services/runs/change-run-values';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'run-changed',
  call: (work, { params, body }) => changeRunValues(work, params.id, body),
});

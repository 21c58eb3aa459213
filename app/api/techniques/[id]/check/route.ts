import { checkTechnique as contract } from '@/services/contracts/techniques';
import { route } from '@/services/http/route';
import { checkTechnique } from '@/services/techniques/move-technique';

export const POST = route({
  contract,
  who: 'approve-plans',
  event: 'technique-checked',
  call: (work, { params }) => checkTechnique(work, params.id),
});

import { retireWorkstation as contract } from '@/services/contracts/workstations';
import { route } from '@/services/http/route';
import { retireWorkstation } from '@/services/workstations/keep-workstations';

export const POST = route({
  contract,
  who: 'keep-workstations',
  event: 'workstation-retired',
  call: (work, { params }) => retireWorkstation(work, params.id),
});

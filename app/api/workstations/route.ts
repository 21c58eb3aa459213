import { listWorkstations as listContract, registerWorkstation as registerContract } from '@/services/contracts/workstations';
import { route } from '@/services/http/route';
import { listWorkstations, registerWorkstation } from '@/services/workstations/keep-workstations';

export const GET = route({
  contract: listContract,
  who: 'see-workstations',
  event: null,
  call: (reading) => listWorkstations(reading),
});

export const POST = route({
  contract: registerContract,
  who: 'keep-workstations',
  event: 'workstation-registered',
  call: (work, { body }) => registerWorkstation(work, body),
});

import { readHere as contract } from '@/services/contracts/workstations';
import { route } from '@/services/http/route';
import { readHere } from '@/services/workstations/keep-workstations';

export const GET = route({
  contract,
  who: 'own-account',
  event: null,
  call: (reading, { request }) => readHere(reading, request),
});

import { changeTechnique as changeContract, readTechnique as readContract } from '@/services/contracts/techniques';
import { route } from '@/services/http/route';
import { changeTechnique } from '@/services/techniques/draft-technique';
import { readTechnique } from '@/services/techniques/read-technique';

export const GET = route({
  contract: readContract,
  who: 'see-plans',
  event: null,
  call: (reading, { params }) => readTechnique(reading, params.id),
});

export const PUT = route({
  contract: changeContract,
  who: 'prepare-techniques',
  event: 'technique-changed',
  call: (work, { params, body, ifMatch }) => changeTechnique(work, params.id, body, ifMatch),
});

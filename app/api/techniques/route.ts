import { draftTechnique as draftContract, listTechniques as listContract } from '@/services/contracts/techniques';
import { route } from '@/services/http/route';
import { draftTechnique } from '@/services/techniques/draft-technique';
import { listTechniques } from '@/services/techniques/read-technique';

export const GET = route({
  contract: listContract,
  who: 'see-plans',
  event: null,
  call: (reading, { query }) => listTechniques(reading, query),
});

export const POST = route({
  contract: draftContract,
  who: 'prepare-techniques',
  event: 'technique-drafted',
  call: (work, { body }) => draftTechnique(work, body),
});

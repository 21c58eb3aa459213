import { listAuthorisations as listContract, prepareAuthorisation as prepareContract } from '@/services/contracts/personnel';
import { route } from '@/services/http/route';
import { prepareAuthorisation } from '@/services/personnel/keep-authorisations';
import { listAuthorisations } from '@/services/personnel/list-personnel';

export const GET = route({
  contract: listContract,
  who: 'see-personnel',
  event: null,
  call: (reading, { query }) => listAuthorisations(reading, query),
});

export const POST = route({
  contract: prepareContract,
  who: 'prepare-personnel',
  event: 'authorisation-prepared',
  call: (work, { body }) => prepareAuthorisation(work, body),
});

import { createParts as createContract, listParts as listContract } from '@/services/contracts/parts';
import { route } from '@/services/http/route';
import { createParts } from '@/services/parts/create-parts';
import { listParts } from '@/services/parts/list-parts';

export const GET = route({
  contract: listContract,
  who: 'see-parts',
  event: null,
  call: (reading, { query }) => listParts(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'enter-parts',
  event: 'parts-created',
  call: (work, { body }) => createParts(work, body),
});

import { createDrawing as createContract, listDrawings as listContract } from '@/services/contracts/plans';
import { createDrawing } from '@/services/drawings/create-drawing';
import { listDrawings } from '@/services/drawings/list-drawings';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'see-plans',
  event: null,
  call: (reading, { query }) => listDrawings(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'prepare-plans',
  event: 'drawing-created',
  call: (work, { body }) => createDrawing(work, body),
});

import { listVisionTests as listContract, recordVisionTest as recordContract } from '@/services/contracts/personnel';
import { route } from '@/services/http/route';
import { listVisionTests } from '@/services/personnel/list-personnel';
import { recordVisionTest } from '@/services/personnel/record-vision-test';

export const GET = route({
  contract: listContract,
  who: 'see-personnel',
  event: null,
  call: (reading, { query }) => listVisionTests(reading, query),
});

export const POST = route({
  contract: recordContract,
  who: 'record-vision',
  event: 'vision-recorded',
  call: (work, { body }) => recordVisionTest(work, body),
});

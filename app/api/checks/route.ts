import { listChecks as listContract, recordCheck as recordContract } from '@/services/contracts/checks';
import { route } from '@/services/http/route';
import { listChecks } from '@/services/process-checks/list-checks';
import { recordCheck } from '@/services/process-checks/record-check';

export const GET = route({
  contract: listContract,
  who: 'see-equipment',
  event: null,
  call: (reading, { query }) => listChecks(reading, query),
});

export const POST = route({
  contract: recordContract,
  who: 'record-checks',
  event: 'check-recorded',
  call: (work, { body }) => recordCheck(work, body),
});

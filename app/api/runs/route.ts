import { enterRun as enterContract, listRuns as listContract } from '@/services/contracts/runs';
import { route } from '@/services/http/route';
import { enterRun } from '@/services/runs/enter-run';
import { listRuns } from '@/services/runs/read-run';

export const GET = route({
  contract: listContract,
  who: 'see-inspections',
  event: null,
  call: (reading, { query }) => listRuns(reading, query),
});

export const POST = route({
  contract: enterContract,
  who: 'inspect',
  event: 'run-entered',
  call: (work, { body }) => enterRun(work, body),
});

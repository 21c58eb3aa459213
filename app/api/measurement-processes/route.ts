import {
  listMeasurementProcesses as listContract,
  recordMeasurementProcess as recordContract,
} from '@/services/contracts/techniques';
import { route } from '@/services/http/route';
import { listMeasurementProcesses } from '@/services/techniques/read-technique';
import { recordMeasurementProcess } from '@/services/techniques/record-measurement-process';

export const GET = route({
  contract: listContract,
  who: 'see-plans',
  event: null,
  call: (reading, { query }) => listMeasurementProcesses(reading, query),
});

export const POST = route({
  contract: recordContract,
  who: 'keep-equipment',
  event: 'measurement-process-recorded',
  call: (work, { body }) => recordMeasurementProcess(work, body),
});

import { readRun as contract } from '@/services/contracts/runs';
import { route } from '@/services/http/route';
import { readRun } from '@/services/runs/read-run';

export const GET = route({
  contract,
  who: 'see-inspections',
  event: null,
  call: (reading, { params }) => readRun(reading, params.id),
});

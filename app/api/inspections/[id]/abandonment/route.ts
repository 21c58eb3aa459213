import { abandonInspection as contract } from '@/services/contracts/inspections';
import { route } from '@/services/http/route';
import { abandonInspection } from '@/services/inspections/abandon-inspection';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'inspection-abandoned',
  call: (work, { params, body }) => abandonInspection(work, params.id, body.reason ?? null),
});

import { openInspection as contract } from '@/services/contracts/inspections';
import { route } from '@/services/http/route';
import { openInspection } from '@/services/inspections/open-inspection';

export const POST = route({
  contract,
  who: 'inspect',
  event: 'inspection-opened',
  call: (work, { body }) => openInspection(work, body),
});

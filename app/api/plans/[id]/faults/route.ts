import { readPlanFaults as contract } from '@/services/contracts/plans';
import { route } from '@/services/http/route';
import { readPlanFaults } from '@/services/plans/read-plan';

export const GET = route({
  contract,
  who: 'see-plans',
  event: null,
  call: (reading, { params }) => readPlanFaults(reading, params.id),
});

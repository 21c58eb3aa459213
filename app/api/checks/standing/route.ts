import { readStandingChecks as contract } from '@/services/contracts/checks';
import { route } from '@/services/http/route';
import { standingChecks } from '@/services/process-checks/list-checks';

export const GET = route({
  contract,
  who: 'see-equipment',
  event: null,
  call: (reading) => standingChecks(reading),
});

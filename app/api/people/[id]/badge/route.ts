import { issueBadge as contract } from '@/services/contracts/workstations';
import { route } from '@/services/http/route';
import { issueBadge } from '@/services/workstations/keep-workstations';

export const PUT = route({
  contract,
  who: 'keep-workstations',
  event: 'badge-issued',
  call: (work, { params, body }) => issueBadge(work, params.id, body.badge),
});

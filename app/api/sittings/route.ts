import { sessionIdOf } from '@/services/accounts/sessions';
import { badgeIn as contract } from '@/services/contracts/workstations';
import { callerAddress } from '@/services/http/caller-address';
import { route } from '@/services/http/route';
import { badgeIn, checkBadge } from '@/services/workstations/badge-in';

export const POST = route({
  contract,
  who: 'anyone',
  event: 'badged-in',
  prepare: (_actor, { body, request }) => checkBadge(body, request, callerAddress(request)),
  call: (work, { request }, badged) =>
    badgeIn(work, badged, {
      address: callerAddress(request),
      agent: request.headers.get('user-agent') ?? '',
      earlier: sessionIdOf(request),
    }),
});

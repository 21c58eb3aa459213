import { confirmSignature } from '@/services/accounts/confirm-signature';
import { closeSuspectGroup as contract } from '@/services/contracts/suspects';
import { route } from '@/services/http/route';
import { closeGroup } from '@/services/suspects/close-group';

export const POST = route({
  contract,
  who: 'close-suspects',
  event: 'suspect-group-closed',
  prepare: (actor, { body }) => confirmSignature(actor, body),
  call: (work, { params, body }) => closeGroup(work, params.id, params.group, body),
});

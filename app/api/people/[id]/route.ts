import { changePerson, prepareChange } from '@/services/accounts/people';
import { changePerson as contract } from '@/services/contracts/accounts';
import { route } from '@/services/http/route';

export const PATCH = route({
  contract,
  who: 'keep-accounts',
  event: 'account-changed',
  prepare: (_actor, { params, body }) => prepareChange(params.id, body),
  call: (work, { params, body, ifMatch }, passwordHash) => changePerson(work, params.id, body, ifMatch, passwordHash),
});

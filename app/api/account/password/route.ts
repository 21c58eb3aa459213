import { changePassword, prepareNewPassword } from '@/services/accounts/own-account';
import { changePassword as contract } from '@/services/contracts/accounts';
import { callerAddress } from '@/services/http/caller-address';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'own-account',
  event: 'password-changed',
  prepare: (actor, { body }) => prepareNewPassword(actor, body),
  call: (work, { request }, passwordHash) =>
    changePassword(work, passwordHash, {
      address: callerAddress(request),
      agent: request.headers.get('user-agent') ?? '',
    }),
});

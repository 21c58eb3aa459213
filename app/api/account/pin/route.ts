import { preparePin, setPin } from '@/services/accounts/own-account';
import { setPin as contract } from '@/services/contracts/accounts';
import { route } from '@/services/http/route';

export const PUT = route({
  contract,
  who: 'own-account',
  event: 'pin-set',
  prepare: (actor, { body }) => preparePin(actor, body),
  call: (work, _input, pinHash) => setPin(work, pinHash),
});

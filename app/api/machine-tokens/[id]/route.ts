import { revokeMachineToken } from '@/services/accounts/machine-tokens';
import { revokeMachineToken as contract } from '@/services/contracts/accounts';
import { route } from '@/services/http/route';

export const DELETE = route({
  contract,
  who: 'keep-accounts',
  event: 'machine-token-revoked',
  call: (work, { params }) => revokeMachineToken(work, params.id),
});

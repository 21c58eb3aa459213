import { createMachineToken, listMachineTokens } from '@/services/accounts/machine-tokens';
import { createMachineToken as createContract, listMachineTokens as listContract } from '@/services/contracts/accounts';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'keep-accounts',
  event: null,
  call: (reading) => listMachineTokens(reading),
});

export const POST = route({
  contract: createContract,
  who: 'keep-accounts',
  event: 'machine-token-made',
  call: (work, { body }) => createMachineToken(work, body),
});

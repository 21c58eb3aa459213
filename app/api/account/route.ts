import { changeLocale, readAccount } from '@/services/accounts/own-account';
import { changeAccount as changeContract, readAccount as readContract } from '@/services/contracts/accounts';
import { route } from '@/services/http/route';

export const GET = route({
  contract: readContract,
  who: 'own-account',
  event: null,
  call: (reading) => readAccount(reading, reading.actor),
});

export const PATCH = route({
  contract: changeContract,
  who: 'own-account',
  event: 'account-changed',
  call: (work, { body }) => changeLocale(work, body.locale),
});

import { createPerson, listPeople, prepareInitialPassword } from '@/services/accounts/people';
import { createPerson as createContract, listPeople as listContract } from '@/services/contracts/accounts';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'keep-accounts',
  event: null,
  call: (reading, { query }) => listPeople(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'keep-accounts',
  event: 'account-created',
  prepare: (_actor, { body }) => prepareInitialPassword(body.initialPassword, body.email),
  call: (work, { body }, passwordHash) => createPerson(work, body, passwordHash),
});

import { closeSessions } from '@/services/accounts/close-sessions';
import { sessionIdOf } from '@/services/accounts/sessions';
import { checkSignIn, enter } from '@/services/accounts/sign-in';
import { readSession, signIn, signOut } from '@/services/contracts/session';
import { callerAddress } from '@/services/http/caller-address';
import { route } from '@/services/http/route';
import { workstationOfRequest } from '@/services/workstations/workstation-of-request';

export const POST = route({
  contract: signIn,
  who: 'anyone',
  event: 'signed-in',
  prepare: async (_actor, { body, request }) => ({
    account: await checkSignIn({ ...body, address: callerAddress(request) }),
    workstation: await workstationOfRequest(request),
  }),
  call: async (work, { request }, { account, workstation }) => ({
    answer: undefined,
    headers: {
      'set-cookie': await enter(work, account, {
        address: callerAddress(request),
        agent: request.headers.get('user-agent') ?? '',
        earlier: sessionIdOf(request),
        workstationId: workstation?.id ?? null,
      }),
    },
    events: [{ subject: { kind: 'account', id: account.id }, details: {} }],
  }),
});

export const GET = route({
  contract: readSession,
  who: 'own-account',
  event: null,
  call: ({ actor }) =>
    Promise.resolve({
      user: {
        id: actor.id,
        name: actor.name,
        email: actor.email,
        role: actor.role,
        releaseAuthority: actor.releaseAuthority,
        locale: actor.locale,
        ...(actor.customerName ? { customer: actor.customerName } : {}),
        ...(actor.accessUntil ? { accessUntil: actor.accessUntil } : {}),
      },
    }),
});

export const DELETE = route({
  contract: signOut,
  who: 'own-account',
  event: 'signed-out',
  call: (work, { query }) => closeSessions(work, query.everywhere === 'true'),
});

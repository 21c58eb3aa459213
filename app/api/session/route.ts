import { closeSessions } from '@/services/accounts/close-sessions';
import { sessionIdOf } from '@/services/accounts/sessions';
import { checkSignIn, enter } from '@/services/accounts/sign-in';
import { readSession, signIn, signOut } from '@/services/contracts/session';
import { callerAddress } from '@/services/http/caller-address';
import { route } from '@/services/http/route';

export const POST = route({
  contract: signIn,
  who: 'anyone',
  event: 'signed-in',
  prepare: (_actor, { body, request }) => checkSignIn({ ...body, address: callerAddress(request) }),
  call: async (work, { request }, account) => ({
    answer: undefined,
    headers: {
      'set-cookie': await enter(work, account, {
        address: callerAddress(request),
        agent: request.headers.get('user-agent') ?? '',
        earlier: sessionIdOf(request),
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

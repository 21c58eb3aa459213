import { z } from 'zod';
import { instant, role } from './common';
import { operation } from './operation';

export const signIn = operation({
  name: 'sign-in',
  method: 'POST',
  path: '/api/session',
  summary: 'Sign in; 204 and a session cookie. The same 401, after the same time, for anything wrong.',
  changes: true,
  body: z.strictObject({
    email: z.string().min(1).max(200),
    password: z.string().min(1).max(200),
    code: z.string().max(12).optional(),
  }),
  status: 204,
});

export const readSession = operation({
  name: 'read-session',
  method: 'GET',
  path: '/api/session',
  summary: 'Who is signed in.',
  changes: false,
  response: z.object({
    user: z.object({
      id: z.uuid(),
      name: z.string(),
      email: z.string(),
      role,
      releaseAuthority: z.boolean(),
      customer: z.string().optional(),
      accessUntil: instant.optional(),
      locale: z.enum(['en', 'fr']),
    }),
  }),
  status: 200,
});

export const signOut = operation({
  name: 'sign-out',
  method: 'DELETE',
  path: '/api/session',
  summary: 'Sign out; 204. With ?everywhere=true every session of the account ends.',
  changes: true,
  query: z.object({ everywhere: z.enum(['true', 'false']).optional() }),
  status: 204,
});

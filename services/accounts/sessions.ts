import { Lucia, TimeSpan } from 'lucia';
import { sessionAdapter } from '@/db/session-adapter';
import { accountById, actorOf } from '@/db/repositories/accounts';
import { databaseNow, reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';

declare module 'lucia' {
  interface Register {
    Lucia: typeof lucia;
    UserId: string;
    DatabaseSessionAttributes: { created_at: string; address: string; agent: string };
  }
}

const secure = (process.env.RINGTRUE_BASE_URL ?? '').startsWith('https://');

/** Sessions last one shift and a half from the last use; the cookie is not readable by scripts. */
export const lucia = new Lucia(sessionAdapter, {
  sessionExpiresIn: new TimeSpan(12, 'h'),
  sessionCookie: { name: 'ringtrue-session', expires: true, attributes: { secure, sameSite: 'lax', path: '/' } },
});

/** Opens a session; answers the Set-Cookie value. `at` is database time. */
export async function openSession(accountId: string, at: string, address: string, agent: string): Promise<string> {
  const session = await lucia.createSession(accountId, {
    created_at: at.replace('T', ' ').replace(/Z$/, ''),
    address: address.slice(0, 64),
    agent: agent.slice(0, 200),
  });
  return lucia.createSessionCookie(session.id).serialize();
}

/**
 * The person behind a session cookie's value; null when there is none, it has ended, the account is disabled
 * or the engagement is over (by the database server's clock, at each request).
 */
export async function actorBySession(sessionId: string | null): Promise<Actor | null> {
  if (!sessionId) return null;
  const { session } = await lucia.validateSession(sessionId);
  if (!session) return null;
  const account = await accountById(reading(), session.userId);
  if (!account || account.disabledAt !== null) return null;
  if (account.accessUntil !== null && account.accessUntil <= (await databaseNow())) return null;
  return actorOf(account, sessionId);
}

/** The session id in a request's Cookie header, or null. */
export function sessionIdOf(request: Request): string | null {
  return lucia.readSessionCookie(request.headers.get('cookie') ?? '');
}

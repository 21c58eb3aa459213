import { generateIdFromEntropySize, Lucia, TimeSpan } from 'lucia';
import { sessionAdapter } from '@/db/session-adapter';
import { accountById, actorOf } from '@/db/repositories/accounts';
import { keepSession, sessionClock } from '@/db/repositories/sessions';
import { beginSitting, type SittingPlace } from '@/db/repositories/sittings';
import { inTransaction, reading, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';

declare module 'lucia' {
  interface Register {
    Lucia: typeof lucia;
    UserId: string;
    DatabaseSessionAttributes: { created_at: string; address: string; agent: string };
  }
}

/** One shift and a half. */
const sessionHours = 12;

export const sessionCookieName = 'ringtrue-session';

const secure = (process.env.RINGTRUE_BASE_URL ?? '').startsWith('https://');

/** A session and its cookie last twelve hours from the sign-in; the cookie is not readable by scripts. */
export const lucia = new Lucia(sessionAdapter, {
  sessionExpiresIn: new TimeSpan(sessionHours, 'h'),
  sessionCookie: { name: sessionCookieName, expires: true, attributes: { secure, sameSite: 'lax', path: '/' } },
});

/**
 * Opens a session under a new id and answers the Set-Cookie value. `at` is database time. `within` is the transaction
 * that decides about it; without one the session stands alone. Its sitting begins with it.
 */
export async function openSession(
  accountId: string,
  at: string,
  address: string,
  agent: string,
  within?: Work,
  sitting: SittingPlace = { workstationId: null, provenBy: 'password' },
): Promise<string> {
  // 200 random bits.
  const sessionId = generateIdFromEntropySize(25);
  const keep = async (work: Work) => {
    await keepSession({ ...work, now: at }, { sessionId, accountId, hours: sessionHours, address, agent });
    await beginSitting({ ...work, now: at }, sessionId, accountId, sitting);
  };
  await (within ? keep(within) : inTransaction(null, keep));
  return lucia.createSessionCookie(sessionId).serialize();
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
  const { now, young } = await sessionClock(reading(), sessionId, sessionHours);
  if (!young || (account.accessUntil !== null && account.accessUntil <= now)) return null;
  return actorOf(account, sessionId);
}

/** The session id in a request's Cookie header, or null. */
export function sessionIdOf(request: Request): string | null {
  return lucia.readSessionCookie(request.headers.get('cookie') ?? '');
}

import { storedSessionId } from '../session-adapter';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

export interface NewSession {
  readonly sessionId: string;
  readonly accountId: string;
  readonly hours: number;
  readonly address: string;
  readonly agent: string;
}

/** Keeps a new session; its id is stored hashed. */
export async function keepSession(work: Work, { sessionId, accountId, hours, address, agent }: NewSession): Promise<void> {
  const at = sqlTimeOf(work.now);
  await execute(
    work,
    'INSERT INTO sessions (id, user_id, expires_at, created_at, address, agent) VALUES (?, ?, ? + INTERVAL ? HOUR, ?, ?, ?)',
    [storedSessionId(sessionId), accountId, at, hours, at, address.slice(0, 64), agent.slice(0, 200)],
  );
}

/** Ends one session, whosever it is; answers how many ended. */
export function endSession(work: Work, sessionId: string): Promise<number> {
  return execute(work, 'DELETE FROM sessions WHERE id = ?', [storedSessionId(sessionId)]);
}

/** Ends every session of an account. */
export function endSessionsOf(work: Work, accountId: string): Promise<number> {
  return execute(work, 'DELETE FROM sessions WHERE user_id = ?', [accountId]);
}

/** The database server's clock, and whether this session is younger than its longest life. */
export async function sessionClock(reading: Reading, sessionId: string, hours: number): Promise<{ now: string; young: boolean }> {
  const row = await selectOne<{ now: string; young: number | null }>(
    reading,
    `SELECT ${isoOf('UTC_TIMESTAMP(6)')} AS now, (SELECT created_at + INTERVAL ? HOUR > UTC_TIMESTAMP(6) FROM sessions WHERE id = ?) AS young`,
    [hours, storedSessionId(sessionId)],
  );
  if (!row) throw new Error('the database did not answer its clock');
  return { now: row.now, young: row.young === 1 };
}

export interface OpenSession {
  readonly openedAt: string;
  readonly endsAt: string;
  readonly address: string;
  readonly agent: string;
  readonly current: boolean;
}

/** Sessions of an account that have not run out, newest first. */
export async function sessionsOf(reading: Reading, accountId: string, sessionId: string | null): Promise<OpenSession[]> {
  const rows = await select<Omit<OpenSession, 'current'> & { current: number }>(
    reading,
    `SELECT ${isoOf('created_at')} AS openedAt, ${isoOf('expires_at')} AS endsAt, address, agent, id = ? AS current
     FROM sessions WHERE user_id = ? AND expires_at > UTC_TIMESTAMP() ORDER BY created_at DESC, id LIMIT 50`,
    [sessionId === null ? '' : storedSessionId(sessionId), accountId],
  );
  return rows.map((row) => ({ ...row, current: row.current === 1 }));
}

export interface SignInRow {
  readonly at: string;
  readonly address: string;
  readonly outcome: 'signed-in' | 'refused' | 'limited';
}

/** The last tries to sign in as this person, newest first. */
export function lastSignIns(reading: Reading, emailDigest: string, limit: number): Promise<SignInRow[]> {
  return select(
    reading,
    `SELECT ${isoOf('at')} AS at, address, outcome FROM sign_ins WHERE email_digest = ? ORDER BY at DESC, id DESC LIMIT ?`,
    [emailDigest, limit],
  );
}

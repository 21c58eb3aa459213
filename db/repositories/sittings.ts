import { newId } from '../identity';
import { takeRows } from '../lock';
import { storedSessionId } from '../session-adapter';
import { execute, isoOf, reading, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

/** Minutes without work after which a sitting ends, by the database server's clock. */
export const idleMinutes = 5;

export interface SittingPlace {
  readonly workstationId: string | null;
  readonly provenBy: 'password' | 'badge';
}

/** Begins the sitting of a new session. */
export async function beginSitting(work: Work, sessionId: string, accountId: string, place: SittingPlace): Promise<void> {
  const at = sqlTimeOf(work.now);
  await execute(
    work,
    'INSERT INTO sittings (id, session_id, account_id, workstation_id, proven_by, opened_at, last_act_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [newId(), storedSessionId(sessionId), accountId, place.workstationId, place.provenBy, at, at],
  );
}

/** The password was given: the sitting goes on, or begins anew when it had run out. */
export async function proveSitting(work: Work, sessionId: string): Promise<void> {
  await execute(
    work,
    `UPDATE sittings SET opened_at = IF(last_act_at > UTC_TIMESTAMP(6) - INTERVAL ${String(idleMinutes)} MINUTE, opened_at, UTC_TIMESTAMP(6)),
       proven_by = 'password', last_act_at = UTC_TIMESTAMP(6) WHERE session_id = ? AND ended_at IS NULL`,
    [storedSessionId(sessionId)],
  );
}

// A sitting is written at most this often while its person works.
const touchSeconds = 15;

/** The person did something: a sitting that has not run out goes on. A statement of its own, so that no request waits for another. */
export async function touchSitting(sessionId: string): Promise<void> {
  await reading().sequelize.query(
    `UPDATE sittings SET last_act_at = UTC_TIMESTAMP(6) WHERE session_id = ? AND ended_at IS NULL
     AND last_act_at > UTC_TIMESTAMP(6) - INTERVAL ? MINUTE AND last_act_at < UTC_TIMESTAMP(6) - INTERVAL ? SECOND`,
    { replacements: [storedSessionId(sessionId), idleMinutes, touchSeconds] },
  );
}

export interface SittingStanding {
  readonly state: 'open' | 'idle' | 'ended' | 'none';
  readonly endsAt: string | null;
}

/** How the sitting of a session stands now. */
export async function sittingOf(from: Reading, sessionId: string | null): Promise<SittingStanding> {
  if (sessionId === null) return { state: 'none', endsAt: null };
  const row = await selectOne<{ state: 'open' | 'idle' | 'ended'; endsAt: string }>(
    from,
    `SELECT IF(ended_at IS NOT NULL, 'ended', IF(last_act_at > UTC_TIMESTAMP(6) - INTERVAL ? MINUTE, 'open', 'idle')) AS state,
       ${isoOf('last_act_at + INTERVAL ? MINUTE')} AS endsAt FROM sittings WHERE session_id = ?`,
    [idleMinutes, idleMinutes, storedSessionId(sessionId)],
  );
  return row ? { state: row.state, endsAt: row.state === 'open' ? row.endsAt : null } : { state: 'none', endsAt: null };
}

/** Ends whatever sits at a workstation, with its sessions, under the workstation's row; answers whose they were. */
export async function endSittingsAt(work: Work, workstationId: string): Promise<string[]> {
  await takeRows(work, 'workstations', [workstationId]);
  const rows = await select<{ sessionId: string; accountId: string }>(
    work,
    'SELECT session_id AS sessionId, account_id AS accountId FROM sittings WHERE workstation_id = ? AND ended_at IS NULL ORDER BY id',
    [workstationId],
  );
  if (rows.length === 0) return [];
  const sessions = rows.map(({ sessionId }) => sessionId);
  await execute(work, `UPDATE sittings SET ended_at = ?, ended_reason = 'another-person' WHERE session_id IN (?)`, [
    sqlTimeOf(work.now),
    sessions,
  ]);
  await execute(work, 'DELETE FROM sessions WHERE id IN (?)', [sessions]);
  return rows.map(({ accountId }) => accountId);
}

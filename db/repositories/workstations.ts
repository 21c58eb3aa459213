import type { ScanPrefix, Workstation } from '../../services/contracts/workstations';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';
import { idleMinutes } from './sittings';

interface NewWorkstation {
  readonly id: string;
  readonly name: string;
  readonly place: string | null;
  readonly scanPrefix: ScanPrefix;
  readonly tokenDigest: string;
  readonly by: string;
}

/** Registers a workstation; a name that is taken fails its key. */
export async function keepWorkstation(work: Work, station: NewWorkstation): Promise<void> {
  await execute(
    work,
    'INSERT INTO workstations (id, name, place, scan_prefix, token_digest, registered_by, registered_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [station.id, station.name, station.place, station.scanPrefix, station.tokenDigest, station.by, sqlTimeOf(work.now)],
  );
}

export async function workstationNamed(reading: Reading, name: string): Promise<boolean> {
  return (await selectOne(reading, 'SELECT id FROM workstations WHERE name = ?', [name])) !== undefined;
}

/** The workstation a cookie's token belongs to, unless it was retired. */
export function workstationByToken(
  reading: Reading,
  tokenDigest: string,
): Promise<{ id: string; name: string; scanPrefix: ScanPrefix } | undefined> {
  return selectOne(
    reading,
    'SELECT id, name, scan_prefix AS scanPrefix FROM workstations WHERE token_digest = ? AND retired_at IS NULL',
    [tokenDigest],
  );
}

/** Ends a workstation; false when it had ended. */
export async function endWorkstation(work: Work, workstationId: string, by: string): Promise<boolean> {
  const ended = await execute(
    work,
    'UPDATE workstations SET retired_by = ?, retired_at = ? WHERE id = ? AND retired_at IS NULL',
    [by, sqlTimeOf(work.now), workstationId],
  );
  return ended === 1;
}

type Stored = Omit<Workstation, 'sitting'> & { sitter: string | null; since: string | null };

// A sitting counts as somebody sitting there while its session lives and it has not run out.
const query = `SELECT w.id, w.name, w.place, w.scan_prefix AS scanPrefix, a.name AS registeredBy, ${isoOf('w.registered_at')} AS registeredAt, ${isoOf('w.retired_at')} AS retiredAt,
  p.name AS sitter, ${isoOf('t.opened_at')} AS since FROM workstations w JOIN accounts a ON a.id = w.registered_by
  LEFT JOIN sittings t ON t.id = (SELECT n.id FROM sittings n JOIN sessions s ON s.id = n.session_id WHERE n.workstation_id = w.id AND n.ended_at IS NULL
    AND n.last_act_at > UTC_TIMESTAMP(6) - INTERVAL ${String(idleMinutes)} MINUTE ORDER BY n.opened_at DESC, n.id DESC LIMIT 1)
  LEFT JOIN accounts p ON p.id = t.account_id`;

function toWorkstation({ sitter, since, ...row }: Stored): Workstation {
  return { ...row, sitting: sitter !== null && since !== null ? { name: sitter, since } : null };
}

/** Workstations by name, ended ones last. */
export async function allWorkstations(reading: Reading): Promise<Workstation[]> {
  const rows = await select<Stored>(reading, `${query} ORDER BY w.retired_at IS NOT NULL, w.name LIMIT 300`);
  return rows.map(toWorkstation);
}

export async function workstationById(reading: Reading, workstationId: string): Promise<Workstation | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE w.id = ?`, [workstationId]);
  return row && toWorkstation(row);
}

/** Whose badge this is now. */
export async function accountOfBadge(reading: Reading, digest: string): Promise<string | undefined> {
  const row = await selectOne<{ id: string }>(
    reading,
    'SELECT account_id AS id FROM badges WHERE digest = ? AND withdrawn_at IS NULL',
    [digest],
  );
  return row?.id;
}

/** Gives a badge to a person; the one before is withdrawn. A badge that came back may be given again. */
export async function giveBadge(work: Work, digest: string, accountId: string, by: string): Promise<void> {
  const at = sqlTimeOf(work.now);
  await execute(work, 'UPDATE badges SET withdrawn_at = ? WHERE account_id = ? AND withdrawn_at IS NULL', [at, accountId]);
  await execute(
    work,
    `INSERT INTO badges (digest, account_id, issued_by, issued_at) VALUES (?, ?, ?, ?)
     ON DUPLICATE KEY UPDATE account_id = VALUES(account_id), issued_by = VALUES(issued_by), issued_at = VALUES(issued_at), withdrawn_at = NULL`,
    [digest, accountId, by, at],
  );
}

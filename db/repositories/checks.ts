import type { Check } from '../../services/contracts/checks';
import { newId } from '../identity';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

type Stored = Omit<Check, 'doneBy' | 'suspects'> & {
  byId: string;
  byName: string | null;
  listId: string | null;
  listNumber: string | null;
};

const query = `SELECT c.id, c.scope, c.title, c.method, c.kind, c.result, c.value, c.unit, c.note, ${isoOf('c.at')} AS at, ${isoOf('c.valid_until')} AS validUntil,
  c.done_by AS byId, a.name AS byName, s.id AS listId, s.number AS listNumber
  FROM process_checks c LEFT JOIN accounts a ON a.id = c.done_by LEFT JOIN suspect_lists s ON s.cause_id = c.id`;

function toCheck({ byId, byName, listId, listNumber, ...row }: Stored): Check {
  return {
    ...row,
    doneBy: { id: byId, name: byName ?? '' },
    suspects: listId === null ? null : { id: listId, number: listNumber ?? '' },
  };
}

/** Process checks newest first, before a key of time and id. */
export async function checksBefore(
  reading: Reading,
  filter: { readonly scope?: string | undefined; readonly method?: string | undefined },
  limit: number,
  before: readonly [string, string] | null,
): Promise<Check[]> {
  const where = ['1 = 1'];
  const values: unknown[] = [];
  if (filter.scope !== undefined) {
    where.push('c.scope = ?');
    values.push(filter.scope);
  }
  if (filter.method !== undefined) {
    where.push('c.method = ?');
    values.push(filter.method);
  }
  if (before) {
    where.push('c.at <= ? AND (c.at < ? OR c.id < ?)');
    values.push(sqlTimeOf(before[0]), sqlTimeOf(before[0]), before[1]);
  }
  const sql = `${query} WHERE ${where.join(' AND ')} ORDER BY c.at DESC, c.id DESC LIMIT ?`;
  return (await select<Stored>(reading, sql, [...values, limit])).map(toCheck);
}

export async function checkById(reading: Reading, checkId: string): Promise<Check | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE c.id = ?`, [checkId]);
  return row && toCheck(row);
}

/** The last check of a scope under one title. */
export async function lastCheckOf(reading: Reading, scope: string, title: string): Promise<Check | undefined> {
  const row = await selectOne<Stored>(
    reading,
    `${query} WHERE c.scope = ? AND c.title = ? ORDER BY c.at DESC, c.id DESC LIMIT 1`,
    [scope, title],
  );
  return row && toCheck(row);
}

/** The last check of every scope and title made since an instant, with whether a signed act leaned on its scope after it. */
export async function lastChecks(reading: Reading, since: string): Promise<{ check: Check; leanedOn: boolean }[]> {
  const rows = await select<Stored & { leanedOn: number }>(
    reading,
    `SELECT k.*, EXISTS (SELECT 1 FROM inspection_leans l WHERE l.kind = 'scope' AND l.target = k.scope AND l.at >= REPLACE(REPLACE(k.at, 'T', ' '), 'Z', '')) AS leanedOn
     FROM (${query} JOIN (SELECT id, ROW_NUMBER() OVER (PARTITION BY scope, title ORDER BY at DESC, id DESC) AS place FROM process_checks WHERE at >= ?) n ON n.id = c.id AND n.place = 1) k
     ORDER BY k.scope, k.title LIMIT 500`,
    [sqlTimeOf(since)],
  );
  return rows.map(({ leanedOn, ...row }) => ({ check: toCheck(row), leanedOn: leanedOn === 1 }));
}

export interface NewCheck {
  readonly scope: string;
  readonly title: string;
  readonly method: string;
  readonly kind: Check['kind'];
  readonly result: Check['result'];
  readonly value: string | null;
  readonly unit: string | null;
  readonly note: string | null;
  readonly at: string;
  readonly validHours: number;
}

/** Appends a check, valid for hours from its time on; answers its id. */
export async function keepCheck(work: Work, check: NewCheck, by: string): Promise<string> {
  const id = newId();
  const at = sqlTimeOf(check.at);
  await execute(
    work,
    `INSERT INTO process_checks (id, scope, method, title, kind, result, value, unit, note, at, valid_until, done_by, created_at)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, CAST(? AS DATETIME(6)) + INTERVAL ? HOUR, ?, ?)`,
    [
      ...[id, check.scope, check.method, check.title, check.kind, check.result, check.value, check.unit, check.note],
      ...[at, at, check.validHours, by, sqlTimeOf(work.now)],
    ],
  );
  return id;
}

/** Takes a scope by writing it: acts being signed on it wait, or are seen. */
export async function takeScope(work: Work, scope: string): Promise<void> {
  await execute(work, 'INSERT INTO check_scopes (scope, version) VALUES (?, 1) ON DUPLICATE KEY UPDATE version = version + 1', [
    scope,
  ]);
}

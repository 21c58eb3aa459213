import {
  techniqueContent,
  type MeasurementProcess,
  type Technique,
  type TechniqueContent,
  type TechniqueHead,
} from '../../services/contracts/techniques';
import { newId } from '../identity';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

/** Content as stored. Rows of an earlier time may hold less, or other keys: what is readable of them is read. */
function readContent(stored: string): TechniqueContent {
  const whole: unknown = JSON.parse(stored);
  const strict = techniqueContent.safeParse(whole);
  if (strict.success) return strict.data;
  const shape = techniqueContent.shape;
  const given = (typeof whole === 'object' && whole !== null ? whole : {}) as Record<string, unknown>;
  const known = Object.entries(shape).flatMap(([key, part]) => {
    const parsed = part.safeParse(given[key]);
    return parsed.success ? [[key, parsed.data] as const] : [];
  });
  return techniqueContent.parse(Object.fromEntries(known));
}

interface Stored extends Omit<TechniqueHead, 'author' | 'approved'> {
  content: string;
  endedReason: string | null;
  hands: string | null;
  authorId: string;
  authorName: string | null;
  createdAt: string;
  checkedId: string | null;
  checkedName: string | null;
  checkedAt: string | null;
  approvedId: string | null;
  approvedName: string | null;
  approvedAt: string | null;
  endedId: string | null;
  endedName: string | null;
  endedAt: string | null;
}

const query = `SELECT t.id, t.number, t.issue, t.method, t.title, t.standard, t.customer_approval AS customerApproval, t.state, t.version, t.content, t.ended_reason AS endedReason,
  (SELECT GROUP_CONCAT(h.account_id) FROM technique_hands h WHERE h.technique_id = t.id) AS hands,
  t.author AS authorId, a1.name AS authorName, ${isoOf('t.created_at')} AS createdAt, t.checked_by AS checkedId, a2.name AS checkedName, ${isoOf('t.checked_at')} AS checkedAt,
  t.approved_by AS approvedId, a3.name AS approvedName, ${isoOf('t.approved_at')} AS approvedAt, t.ended_by AS endedId, a4.name AS endedName, ${isoOf('t.ended_at')} AS endedAt
  FROM technique_issues t LEFT JOIN accounts a1 ON a1.id = t.author LEFT JOIN accounts a2 ON a2.id = t.checked_by LEFT JOIN accounts a3 ON a3.id = t.approved_by
  LEFT JOIN accounts a4 ON a4.id = t.ended_by`;

const person = (id: string | null, name: string | null, at: string | null) =>
  id === null || at === null ? null : { id, name: name ?? '', at };

function toHead(row: Stored): TechniqueHead {
  const { id, number, issue, method, title, standard, customerApproval, state, version } = row;
  return {
    ...{ id, number, issue, method, title, standard, customerApproval, state, version },
    author: person(row.authorId, row.authorName, row.createdAt),
    approved: person(row.approvedId, row.approvedName, row.approvedAt),
  };
}

/** A technique issue as stored; faults are the use-case's to find. */
export type StoredTechnique = Omit<Technique, 'faults'>;

export async function techniqueById(reading: Reading, techniqueId: string): Promise<StoredTechnique | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE t.id = ?`, [techniqueId]);
  return (
    row && {
      ...toHead(row),
      checked: person(row.checkedId, row.checkedName, row.checkedAt),
      ended: person(row.endedId, row.endedName, row.endedAt),
      endedReason: row.endedReason,
      content: readContent(row.content),
      hands: [...new Set([row.authorId, ...(row.hands?.split(',') ?? [])])],
    }
  );
}

/** Technique issues by number, newest issue first, after a key of number and issue. */
export async function techniquesAfter(
  reading: Reading,
  filter: { readonly method?: string | undefined; readonly state?: string | undefined; readonly number?: string | undefined },
  limit: number,
  after: readonly [string, number] | null,
): Promise<TechniqueHead[]> {
  const [number, issue] = after ?? ['', Number.MAX_SAFE_INTEGER];
  const pairs = [filter.method, filter.state, filter.number].flatMap((value) => [value ?? null, value ?? null]);
  const rows = await select<Stored>(
    reading,
    `${query} WHERE (? IS NULL OR t.method = ?) AND (? IS NULL OR t.state = ?) AND (? IS NULL OR t.number = ?) AND t.number >= ? AND (t.number > ? OR t.issue < ?)
     ORDER BY t.number, t.issue DESC LIMIT ?`,
    [...pairs, number, number, issue, limit],
  );
  return rows.map(toHead);
}

/** Every approved issue with its content, for what they ask of the plant; at most 1,000. */
export async function approvedTechniques(
  reading: Reading,
): Promise<{ number: string; method: string; content: TechniqueContent }[]> {
  const rows = await select<{ number: string; method: string; content: string }>(
    reading,
    `SELECT number, method, content FROM technique_issues WHERE state = 'approved' AND content <> '{}' ORDER BY number, issue LIMIT 1000`,
  );
  return rows.map((row) => ({ ...row, content: readContent(row.content) }));
}

/** Issues of a number, newest first, locked until commit so that two drafts at once get two issue numbers. */
export function takeIssues(work: Work, number: string): Promise<{ issue: number; method: string; state: string }[]> {
  return select(work, 'SELECT issue, method, state FROM technique_issues WHERE number = ? ORDER BY issue DESC FOR UPDATE', [
    number,
  ]);
}

export interface WrittenTechnique {
  readonly title: string;
  readonly standard: string;
  readonly customerApproval: string | null;
  readonly content: TechniqueContent;
}

export async function keepDraft(
  work: Work,
  row: WrittenTechnique & { readonly number: string; readonly issue: number; readonly method: string },
  author: string,
): Promise<string> {
  const id = newId();
  await execute(
    work,
    `INSERT INTO technique_issues (id, number, issue, method, title, standard, state, content, customer_approval, author, created_at, version) VALUES (?, ?, ?, ?, ?, ?, 'draft', ?, ?, ?, ?, 1)`,
    [
      ...[id, row.number, row.issue, row.method, row.title, row.standard, JSON.stringify(row.content), row.customerApproval],
      ...[author, sqlTimeOf(work.now)],
    ],
  );
  await keepHand(work, id, author);
  return id;
}

export async function keepHand(work: Work, techniqueId: string, accountId: string): Promise<void> {
  await execute(work, 'INSERT IGNORE INTO technique_hands (technique_id, account_id) VALUES (?, ?)', [techniqueId, accountId]);
}

export async function rewriteDraft(work: Work, techniqueId: string, row: WrittenTechnique): Promise<void> {
  await execute(work, 'UPDATE technique_issues SET title = ?, standard = ?, customer_approval = ?, content = ? WHERE id = ?', [
    ...[row.title, row.standard, row.customerApproval, JSON.stringify(row.content), techniqueId],
  ]);
}

export async function markChecked(work: Work, techniqueId: string, by: string): Promise<void> {
  await execute(work, `UPDATE technique_issues SET state = 'checked', checked_by = ?, checked_at = ? WHERE id = ?`, [
    ...[by, sqlTimeOf(work.now), techniqueId],
  ]);
}

/** Approves an issue and supersedes the one before; answers the ids of those superseded. */
export async function markApproved(work: Work, techniqueId: string, number: string, by: string): Promise<string[]> {
  const at = sqlTimeOf(work.now);
  await execute(work, `UPDATE technique_issues SET state = 'approved', approved_by = ?, approved_at = ? WHERE id = ?`, [
    ...[by, at, techniqueId],
  ]);
  const earlier = await select<{ id: string }>(
    work,
    `SELECT id FROM technique_issues WHERE number = ? AND state = 'approved' AND id <> ?`,
    [number, techniqueId],
  );
  for (const { id } of earlier)
    await execute(
      work,
      `UPDATE technique_issues SET state = 'superseded', ended_by = ?, ended_at = ?, ended_reason = 'superseded by a newer issue', version = version + 1 WHERE id = ?`,
      [by, at, id],
    );
  return earlier.map(({ id }) => id);
}

export async function markWithdrawnForError(work: Work, techniqueId: string, by: string, reason: string): Promise<void> {
  await execute(
    work,
    `UPDATE technique_issues SET state = 'withdrawn-for-error', ended_by = ?, ended_at = ?, ended_reason = ? WHERE id = ?`,
    [by, sqlTimeOf(work.now), reason, techniqueId],
  );
}

const processQuery = `SELECT id, technique, characteristic, gauge_kind AS gaugeKind, expanded, k, unit, basis, DATE_FORMAT(valid_from, '%Y-%m-%d') AS validFrom, ${isoOf('created_at')} AS recordedAt FROM measurement_processes`;

/** Measurement processes by id, which rises with time, newest first before a key. */
export function measurementProcessesBefore(
  reading: Reading,
  technique: string | null,
  limit: number,
  before: string | null,
): Promise<MeasurementProcess[]> {
  return select(
    reading,
    `${processQuery} WHERE (? IS NULL OR technique = ?) AND (? IS NULL OR id < ?) ORDER BY id DESC LIMIT ?`,
    [technique, technique, before, before, limit],
  );
}

export async function keepMeasurementProcess(
  work: Work,
  row: Omit<MeasurementProcess, 'id' | 'recordedAt'>,
): Promise<MeasurementProcess> {
  const id = newId();
  await execute(
    work,
    `INSERT INTO measurement_processes (id, technique, characteristic, gauge_kind, expanded, k, unit, basis, valid_from, created_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    [
      ...[id, row.technique, row.characteristic, row.gaugeKind, row.expanded, row.k, row.unit, row.basis, row.validFrom],
      sqlTimeOf(work.now),
    ],
  );
  return { ...row, id, recordedAt: work.now };
}

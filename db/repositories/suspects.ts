import type { SuspectGroup, SuspectInspection, SuspectListHead } from '../../services/contracts/suspects';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

/** What failed, and from when on it cannot be trusted. Days are the plant's calendar days, both included. */
export interface Interval {
  readonly kind: 'equipment' | 'scope' | 'technique';
  /** Id of the equipment or technique issue, or the scope. */
  readonly target: string;
  readonly since: string | null;
  readonly sinceDay: string | null;
  readonly untilDay: string | null;
}

export interface Leaning {
  readonly inspectionId: string;
  readonly partId: string;
  readonly requirementId: string;
  readonly rests: boolean;
  readonly gone: boolean;
}

/** Signed inspections that stand and leaned on something within an interval, by part id. */
export async function leaningInspections(reading: Reading, interval: Interval): Promise<Leaning[]> {
  const { kind, target, since, sinceDay, untilDay } = interval;
  const sinceAt = since && sqlTimeOf(since);
  const rows = await select<Omit<Leaning, 'rests' | 'gone'> & { rests: number; gone: number }>(
    reading,
    `SELECT DISTINCT i.id AS inspectionId, i.part_id AS partId, i.requirement_id AS requirementId, COALESCE(r.inspection_id = i.id, 0) AS rests, p.state IN ('released', 'shipped') AS gone
     FROM inspection_leans l JOIN inspections i ON i.id = l.inspection_id JOIN parts p ON p.id = i.part_id
       LEFT JOIN part_requirements r ON r.part_id = i.part_id AND r.requirement_id = i.requirement_id LEFT JOIN inspection_ends e ON e.inspection_id = i.id
     WHERE l.kind = ? AND l.target = ? AND (? IS NULL OR l.at >= ?) AND (? IS NULL OR l.day >= ?) AND (? IS NULL OR l.day <= ?) AND e.inspection_id IS NULL ORDER BY i.part_id, i.id`,
    [kind, target, sinceAt, sinceAt, sinceDay, sinceDay, untilDay, untilDay],
  );
  return rows.map((row) => ({ ...row, rests: row.rests === 1, gone: row.gone === 1 }));
}

// Scrapped parts stay listed; nothing has to stop them.
const stillHere = `p.state NOT IN ('released', 'shipped', 'scrapped', 'destroyed', 'consumed')`;

const countOf = (what: string, more: string) =>
  `(SELECT COUNT(DISTINCT ${what}) FROM suspect_groups g JOIN suspect_inspections y ON y.group_id = g.id JOIN parts p ON p.id = y.part_id WHERE g.list_id = s.id${more})`;

const headQuery = `SELECT s.id, s.number, s.cause, s.named, s.equipment_id AS equipment, s.scope, s.technique, s.method, s.reason, ${isoOf('s.since_at')} AS since, ${isoOf('s.until_at')} AS until,
  s.opened_by AS openerId, a.name AS openerName, ${isoOf('s.opened_at')} AS openedAt,
  IF(EXISTS (SELECT 1 FROM suspect_groups o WHERE o.list_id = s.id AND o.closed_at IS NULL), 'open', 'closed') AS state,
  ${countOf('y.inspection_id', '')} AS inspections, ${countOf('y.part_id', ` AND g.closed_at IS NULL AND y.rests = 1 AND ${stillHere}`)} AS held,
  ${countOf('y.part_id', ' AND g.closed_at IS NULL AND g.gone = 1')} AS recall
  FROM suspect_lists s JOIN accounts a ON a.id = s.opened_by`;

type HeadStored = Omit<SuspectListHead, 'openedBy'> & { openerId: string; openerName: string };

function toHead({ openerId, openerName, ...row }: HeadStored): SuspectListHead {
  return { ...row, openedBy: { id: openerId, name: openerName } };
}

export async function suspectListById(reading: Reading, listId: string): Promise<SuspectListHead | undefined> {
  const row = await selectOne<HeadStored>(reading, `${headQuery} WHERE s.id = ?`, [listId]);
  return row && toHead(row);
}

/** Lists newest first, before a key of opening time and id. */
export async function suspectListsBefore(
  reading: Reading,
  filter: { readonly equipment?: string | undefined; readonly scope?: string | undefined; readonly open?: boolean | undefined },
  limit: number,
  before: readonly [string, string] | null,
): Promise<SuspectListHead[]> {
  const where = ['1 = 1'];
  const values: unknown[] = [];
  const and = (sql: string, ...given: unknown[]) => {
    where.push(sql);
    values.push(...given);
  };
  if (filter.equipment !== undefined) and('s.equipment_id = ?', filter.equipment);
  if (filter.scope !== undefined) and('s.scope = ?', filter.scope);
  if (filter.open !== undefined)
    and(`${filter.open ? '' : 'NOT '}EXISTS (SELECT 1 FROM suspect_groups o WHERE o.list_id = s.id AND o.closed_at IS NULL)`);
  if (before) {
    const at = sqlTimeOf(before[0]);
    and('s.opened_at <= ? AND (s.opened_at < ? OR s.id < ?)', at, at, before[1]);
  }
  const sql = `${headQuery} WHERE ${where.join(' AND ')} ORDER BY s.opened_at DESC, s.id DESC LIMIT ?`;
  return (await select<HeadStored>(reading, sql, [...values, limit])).map(toHead);
}

interface GroupStored extends Omit<SuspectGroup, 'gone' | 'closing' | 'state'> {
  gone: number;
  how: 'no-effect' | 'repeat' | null;
  reason: string | null;
  byId: string | null;
  byName: string | null;
  at: string | null;
}

/** The groups of a list: released parts first, then in order of drawing and operation. */
export async function groupsOfList(reading: Reading, listId: string): Promise<SuspectGroup[]> {
  const rows = await select<GroupStored>(
    reading,
    `SELECT g.id, d.number AS drawing, q.operation, q.title, g.gone, COUNT(*) AS inspections, COUNT(DISTINCT y.part_id) AS parts, g.closed_how AS how, g.closed_reason AS reason,
       g.closed_by AS byId, a.name AS byName, ${isoOf('g.closed_at')} AS at
     FROM suspect_groups g JOIN suspect_inspections y ON y.group_id = g.id JOIN requirements q ON q.id = g.requirement_id JOIN plan_issues n ON n.id = q.plan_issue_id
       JOIN drawing_revisions v ON v.id = n.drawing_revision_id JOIN drawings d ON d.id = v.drawing_id LEFT JOIN accounts a ON a.id = g.closed_by
     WHERE g.list_id = ? GROUP BY g.id ORDER BY g.gone DESC, d.number, q.position, g.id`,
    [listId],
  );
  return rows.map(({ gone, how, reason, byId, byName, at, ...row }) => ({
    ...row,
    gone: gone === 1,
    state: at === null ? ('open' as const) : ('closed' as const),
    closing: how === null || at === null ? null : { how, reason: reason ?? '', by: { id: byId ?? '', name: byName ?? '' }, at },
  }));
}

interface ItemStored extends Omit<SuspectInspection, 'rests' | 'gone' | 'part' | 'certificates'> {
  rests: number;
  gone: number;
  partId: string;
  serial: string;
  partNumber: string;
  partState: string;
  held: number;
}

/** Inspections of a list, shipped ones first, then by serial; after a key of place, serial and id. */
export async function inspectionsOfList(
  reading: Reading,
  listId: string,
  limit: number,
  after: readonly [number, string, string] | null,
): Promise<SuspectInspection[]> {
  const [place, serial, id] = after ?? [0, '', ''];
  const rows = await select<ItemStored>(
    reading,
    `SELECT i.id, i.number, i.verdict, ${isoOf('i.acted_at')} AS actedAt, g.id AS \`group\`, q.operation, q.title, y.rests, g.gone, p.id AS partId, p.serial, d.number AS partNumber, p.state AS partState, p.held
     FROM suspect_groups g JOIN suspect_inspections y ON y.group_id = g.id JOIN inspections i ON i.id = y.inspection_id JOIN requirements q ON q.id = g.requirement_id
       JOIN parts p ON p.id = y.part_id JOIN drawings d ON d.id = p.drawing_id
     WHERE g.list_id = ? AND (? = '' OR (1 - g.gone) > ? OR ((1 - g.gone) = ? AND (p.serial > ? OR (p.serial = ? AND i.number > ?))))
     ORDER BY g.gone DESC, p.serial, i.number LIMIT ?`,
    [listId, id, place, place, serial, serial, id, limit],
  );
  const partIds = [...new Set(rows.map(({ partId }) => partId))];
  const certificates = await certificatesOfParts(reading, partIds);
  return rows.map(({ rests, gone, partId, partNumber, partState, held, serial: named, ...row }) => ({
    ...row,
    rests: rests === 1,
    gone: gone === 1,
    part: { id: partId, serial: named, partNumber, state: partState, held: held === 1 },
    certificates: certificates.filter(({ part }) => part === partId).map(({ number, customer }) => ({ number, customer })),
  }));
}

function certificatesOfParts(
  reading: Reading,
  partIds: readonly string[],
): Promise<{ part: string; number: string; customer: string }[]> {
  if (partIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    `SELECT rp.part_id AS part, c.number, k.name AS customer FROM release_parts rp JOIN certificates c ON c.release_id = rp.release_id JOIN customers k ON k.id = c.customer_id
     WHERE rp.part_id IN (?) ORDER BY c.number`,
    [partIds],
  );
}

/** Parts and inspections of a group, by part id. */
export async function membersOfGroup(
  reading: Reading,
  groupId: string,
): Promise<{ partId: string; inspectionId: string; requirementId: string; signedBy: string; method: string }[]> {
  return select(
    reading,
    `SELECT y.part_id AS partId, y.inspection_id AS inspectionId, g.requirement_id AS requirementId, i.signed_by AS signedBy, i.method FROM suspect_inspections y
     JOIN suspect_groups g ON g.id = y.group_id JOIN inspections i ON i.id = y.inspection_id WHERE y.group_id = ? ORDER BY y.part_id`,
    [groupId],
  );
}

/** `<inspection number> <cause>` of inspections that a level 3 found unaffected; the cause is its id, or `technique`. */
export async function clearedInspections(reading: Reading, partIds: readonly string[]): Promise<Set<string>> {
  if (partIds.length === 0) return new Set();
  const rows = await select<{ number: string; cause: string; causeId: string }>(
    reading,
    `SELECT i.number, s.cause, s.cause_id AS causeId FROM suspect_inspections y JOIN suspect_groups g ON g.id = y.group_id AND g.closed_how = 'no-effect'
     JOIN suspect_lists s ON s.id = g.list_id JOIN inspections i ON i.id = y.inspection_id WHERE y.part_id IN (?)`,
    [partIds],
  );
  return new Set(rows.map(({ number, cause, causeId }) => `${number} ${cause === 'technique' ? cause : causeId}`));
}

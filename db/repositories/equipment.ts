import type { Calibration, EquipmentHead } from '../../services/contracts/equipment';
import { newId } from '../identity';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

const dayOf = (column: string) => `DATE_FORMAT(${column}, '%Y-%m-%d')`;

/** Does calibration `b` stand in the place of `a`? The same function and range, or the whole of the equipment. */
export const sameFunction = (a: string, b: string) =>
  `(${b}.function = 'all' OR (${b}.function = ${a}.function AND ${b}.range_lower <=> ${a}.range_lower AND ${b}.range_upper <=> ${a}.range_upper AND ${b}.range_unit <=> ${a}.range_unit))`;

/** Was `b` made after `a`? */
export const newerCalibration = (a: string, b: string) =>
  `(${b}.calibrated_on > ${a}.calibrated_on OR (${b}.calibrated_on = ${a}.calibrated_on AND (${b}.created_at > ${a}.created_at OR (${b}.created_at = ${a}.created_at AND ${b}.id > ${a}.id))))`;

/** The newest calibration of each function and range. */
const isCurrent = (a: string) =>
  `NOT EXISTS (SELECT 1 FROM calibrations z WHERE z.equipment_id = ${a}.equipment_id AND ${sameFunction(a, 'z')} AND ${newerCalibration(a, 'z')})`;

// Takes three parameters: the day twice, and the days before a due day at which it is flagged.
const headRows = `SELECT e.id, e.number, e.title, e.kind, e.method, e.location, ${dayOf('c.calibratedOn')} AS calibratedOn, ${dayOf('c.dueOn')} AS dueOn,
    CASE WHEN e.retired_at IS NOT NULL THEN 'retired' WHEN c.equipmentId IS NULL THEN 'uncalibrated' WHEN c.failed > 0 THEN 'failed' WHEN c.dueOn < d.today THEN 'lapsed'
      WHEN c.dueOn <= d.today + INTERVAL ? DAY THEN 'due-soon' ELSE 'valid' END AS state,
    (SELECT COUNT(*) FROM suspect_lists s WHERE s.equipment_id = e.id AND EXISTS (SELECT 1 FROM suspect_groups o WHERE o.list_id = s.id AND o.closed_at IS NULL)) AS openSuspects,
    CONCAT(CASE WHEN e.retired_at IS NOT NULL THEN '3' WHEN c.equipmentId IS NULL OR c.failed > 0 THEN '1' ELSE '2' END, COALESCE(${dayOf('c.dueOn')}, '')) AS sortKey
  FROM (SELECT CAST(? AS DATE) AS today) d JOIN equipment e LEFT JOIN (
    SELECT k.equipment_id AS equipmentId, MAX(k.calibrated_on) AS calibratedOn, MIN(k.due_on) AS dueOn, SUM(k.as_left = 'failed') AS failed FROM calibrations k WHERE ${isCurrent('k')} GROUP BY k.equipment_id) c
    ON c.equipmentId = e.id`;

export interface DueDay {
  /** The plant's calendar day. */
  readonly day: string;
  readonly soonDays: number;
}

type HeadStored = EquipmentHead & { readonly sortKey: string };

/** Equipment with what its calibrations say on a day; failed, lapsed and soonest due first, retired last. */
export function equipmentAfter(
  reading: Reading,
  { day, soonDays }: DueDay,
  filter: {
    readonly method?: string | undefined;
    readonly retired?: boolean | undefined;
    readonly number?: string | undefined;
  },
  limit: number,
  after: readonly [string, string] | null,
): Promise<HeadStored[]> {
  const [key, id] = after ?? ['', '00000000-0000-0000-0000-000000000000'];
  const number = filter.number?.trim() ?? '';
  const retired = filter.retired === undefined ? null : filter.retired ? 1 : 0;
  return select(
    reading,
    `SELECT * FROM (${headRows} WHERE (? IS NULL OR e.method = ?) AND (? IS NULL OR (e.retired_at IS NOT NULL) = ?) AND (? = '' OR LEFT(e.number, CHAR_LENGTH(?)) = ?)) found
     WHERE sortKey >= ? AND (sortKey > ? OR id > ?) ORDER BY sortKey, id LIMIT ?`,
    [
      ...[soonDays, day, filter.method ?? null, filter.method ?? null, retired, retired, number, number, number],
      ...[key, key, id, limit],
    ],
  );
}

export interface EquipmentStored extends HeadStored {
  readonly retiredAt: string | null;
  readonly retiredById: string | null;
  readonly retiredByName: string | null;
  readonly retiredReason: string | null;
  readonly inspections: number;
}

export async function equipmentById(
  reading: Reading,
  { day, soonDays }: DueDay,
  equipmentId: string,
): Promise<EquipmentStored | undefined> {
  const head = await selectOne<HeadStored>(reading, `${headRows} WHERE e.id = ?`, [soonDays, day, equipmentId]);
  const more = await selectOne<Omit<EquipmentStored, keyof HeadStored>>(
    reading,
    `SELECT ${isoOf('e.retired_at')} AS retiredAt, e.retired_by AS retiredById, a.name AS retiredByName, e.retired_reason AS retiredReason,
       (SELECT COUNT(*) FROM inspection_equipment u WHERE u.equipment_id = e.id) AS inspections FROM equipment e LEFT JOIN accounts a ON a.id = e.retired_by WHERE e.id = ?`,
    [equipmentId],
  );
  return head && more && { ...head, ...more };
}

type CalibrationStored = Omit<Calibration, 'recordedBy' | 'current'> & {
  byId: string;
  byName: string | null;
  current: number;
};

/** Calibrations of a piece of equipment, newest first; at most 300. */
export async function calibrationsOf(reading: Reading, equipmentId: string): Promise<Calibration[]> {
  const rows = await select<CalibrationStored>(
    reading,
    `SELECT c.id, c.function, c.range_lower AS rangeLower, c.range_upper AS rangeUpper, c.range_unit AS rangeUnit, c.as_found AS asFound, c.as_left AS asLeft, c.bias, ${dayOf('c.calibrated_on')} AS calibratedOn,
       ${dayOf('c.due_on')} AS dueOn, c.certificate, c.recorded_by AS byId, a.name AS byName, ${isoOf('c.created_at')} AS recordedAt, ${isCurrent('c')} AS current
     FROM calibrations c LEFT JOIN accounts a ON a.id = c.recorded_by WHERE c.equipment_id = ? ORDER BY c.calibrated_on DESC, c.created_at DESC, c.id DESC LIMIT 300`,
    [equipmentId],
  );
  return rows.map(({ byId, byName, current, ...row }) => ({
    ...row,
    recordedBy: byName === null ? null : { id: byId, name: byName },
    current: current === 1,
  }));
}

export interface NewEquipment {
  readonly number: string;
  readonly title: string;
  readonly kind: string;
  readonly method: string;
  readonly location: string | null;
}

export async function keepEquipment(work: Work, { number, title, kind, method, location }: NewEquipment): Promise<string> {
  const id = newId();
  await execute(
    work,
    'INSERT INTO equipment (id, number, title, kind, method, location, created_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [id, number, title, kind, method, location, sqlTimeOf(work.now)],
  );
  return id;
}

export interface NewCalibration {
  readonly function: string;
  readonly rangeLower: string | null;
  readonly rangeUpper: string | null;
  readonly rangeUnit: string | null;
  readonly asFound: Calibration['asFound'];
  readonly asLeft: Calibration['asLeft'];
  readonly bias: string | null;
  readonly calibratedOn: string;
  readonly dueOn: string;
  readonly certificate: string | null;
}

/** Appends a calibration, recorded at an instant; answers its id. */
export async function keepCalibration(
  work: Work,
  equipmentId: string,
  row: NewCalibration,
  by: string,
  at: string,
): Promise<string> {
  const id = newId();
  await execute(
    work,
    `INSERT INTO calibrations (id, equipment_id, \`function\`, range_lower, range_upper, range_unit, as_found, as_left, bias, calibrated_on, due_on, certificate, recorded_by, created_at)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    [
      ...[id, equipmentId, row.function, row.rangeLower, row.rangeUpper, row.rangeUnit, row.asFound, row.asLeft, row.bias],
      ...[row.calibratedOn, row.dueOn, row.certificate, by, sqlTimeOf(at)],
    ],
  );
  return id;
}

export async function markRetired(work: Work, equipmentId: string, by: string, reason: string): Promise<void> {
  await execute(work, 'UPDATE equipment SET retired_at = ?, retired_by = ?, retired_reason = ? WHERE id = ?', [
    sqlTimeOf(work.now),
    by,
    reason,
    equipmentId,
  ]);
}

/**
 * Holds what an act leans on, shared, until its signing is committed: equipment found out of tolerance or a check that
 * failed at the same instant either sees the signed act, or the act sees the failure.
 */
export async function shareLeanedOn(work: Work, equipmentIds: readonly string[], scopes: readonly string[]): Promise<void> {
  if (equipmentIds.length > 0)
    await select(work, 'SELECT id FROM equipment WHERE id IN (?) ORDER BY id LOCK IN SHARE MODE', [equipmentIds]);
  if (scopes.length > 0)
    await select(work, 'SELECT scope FROM check_scopes WHERE scope IN (?) ORDER BY scope LOCK IN SHARE MODE', [scopes]);
}

/** Equipment found out of tolerance over an act: by a calibration recorded after it, with none in between. */
export function foundOutSince(
  reading: Reading,
  equipmentIds: readonly string[],
  at: string,
  day: string,
): Promise<{ id: string; calibratedOn: string }[]> {
  if (equipmentIds.length === 0) return Promise.resolve([]);
  return select(
    reading,
    `SELECT k.equipment_id AS id, ${dayOf('MIN(k.calibrated_on)')} AS calibratedOn FROM calibrations k
     WHERE k.equipment_id IN (?) AND k.as_found = 'failed' AND k.created_at >= ? AND (k.as_left = 'failed' OR k.calibrated_on >= ?)
       AND NOT EXISTS (SELECT 1 FROM calibrations g WHERE g.equipment_id = k.equipment_id AND ${sameFunction('k', 'g')} AND g.created_at < k.created_at AND g.calibrated_on > ?)
     GROUP BY k.equipment_id`,
    [equipmentIds, sqlTimeOf(at), day, day],
  );
}

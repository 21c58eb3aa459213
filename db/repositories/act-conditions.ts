import { newerCalibration, sameFunction } from './equipment';
import { isoOf, select, selectOne, sqlTimeOf, type Reading } from '../work';

/** What must be valid for an act to count: technique, uncertainty, equipment, people, process checks. */

export interface TechniqueInForce {
  readonly id: string;
  readonly number: string;
  readonly issue: number;
  readonly title: string;
  readonly standard: string;
  readonly content: Record<string, unknown>;
}

/** The newest approved issue of a technique. */
export async function techniqueInForce(reading: Reading, number: string): Promise<TechniqueInForce | undefined> {
  const row = await selectOne<Omit<TechniqueInForce, 'content'> & { content: string }>(
    reading,
    `SELECT id, number, issue, title, standard, content FROM technique_issues WHERE number = ? AND state = 'approved' ORDER BY issue DESC LIMIT 1`,
    [number],
  );
  return row && { ...row, content: JSON.parse(row.content) as Record<string, unknown> };
}

export interface UncertaintyRow {
  readonly characteristic: string;
  readonly gaugeKind: string;
  readonly expanded: string;
  readonly k: string;
  readonly unit: string;
  readonly basis: string;
}

/** Uncertainties of a technique on a day: of each characteristic and kind of gauge the newest that is valid. */
export async function uncertaintiesOf(
  reading: Reading,
  technique: string,
  characteristics: readonly string[],
  day: string,
): Promise<UncertaintyRow[]> {
  if (characteristics.length === 0) return [];
  return select<UncertaintyRow>(
    reading,
    `SELECT m.characteristic, m.gauge_kind AS gaugeKind, m.expanded, m.k, m.unit, m.basis FROM measurement_processes m
     WHERE m.technique = ? AND m.characteristic IN (?) AND m.valid_from <= ?
       AND NOT EXISTS (SELECT 1 FROM measurement_processes n WHERE n.technique = m.technique AND n.characteristic = m.characteristic AND n.gauge_kind = m.gauge_kind AND n.valid_from > m.valid_from AND n.valid_from <= ?)
     ORDER BY m.characteristic, m.gauge_kind`,
    [technique, [...characteristics], day, day],
  );
}

export interface EquipmentRow {
  readonly id: string;
  readonly number: string;
  readonly title: string;
  readonly kind: string;
  readonly method: string;
  readonly location: string | null;
  readonly calibrationId: string | null;
  readonly asLeft: 'good' | 'failed' | null;
  readonly calibratedOn: string | null;
  readonly dueOn: string | null;
  readonly certificate: string | null;
}

// Of several functions and ranges the one that counts least decides: left failed, or due soonest. Takes the day twice.
const equipmentQuery = `SELECT e.id, e.number, e.title, e.kind, e.method, e.location, c.id AS calibrationId, c.as_left AS asLeft,
  DATE_FORMAT(c.calibrated_on, '%Y-%m-%d') AS calibratedOn, DATE_FORMAT(c.due_on, '%Y-%m-%d') AS dueOn, c.certificate
  FROM equipment e LEFT JOIN calibrations c ON c.id = (
    SELECT n.id FROM calibrations n WHERE n.equipment_id = e.id AND n.calibrated_on <= ? AND NOT EXISTS (
      SELECT 1 FROM calibrations m WHERE m.equipment_id = n.equipment_id AND m.calibrated_on <= ? AND ${sameFunction('n', 'm')} AND ${newerCalibration('n', 'm')})
    ORDER BY n.as_left = 'failed' DESC, n.due_on, n.id LIMIT 1)`;

/** Equipment in use for a method, with its last calibration on or before a day. */
export async function equipmentOfMethod(reading: Reading, method: string, day: string): Promise<EquipmentRow[]> {
  return select<EquipmentRow>(
    reading,
    `${equipmentQuery} WHERE e.method = ? AND e.retired_at IS NULL ORDER BY e.number LIMIT 300`,
    [day, day, method],
  );
}

/** Named equipment with the calibration that counted on a day. */
export async function equipmentByIds(reading: Reading, ids: readonly string[], day: string): Promise<EquipmentRow[]> {
  if (ids.length === 0) return [];
  return select<EquipmentRow>(reading, `${equipmentQuery} WHERE e.id IN (?) ORDER BY e.number`, [day, day, [...ids]]);
}

export interface AuthorisationRow {
  readonly id: string;
  readonly accountId: string;
  readonly technique: string | null;
  readonly level: 'trainee' | '1' | '1-limited' | '2' | '3';
  readonly products: string | null;
  readonly validFrom: string;
  readonly validTo: string;
  readonly withdrawnAt: string | null;
}

/** Granted authorisations of people in a method, whatever their dates. */
export async function authorisationsFor(
  reading: Reading,
  method: string,
  accountIds: readonly string[],
): Promise<AuthorisationRow[]> {
  if (accountIds.length === 0) return [];
  return select<AuthorisationRow>(
    reading,
    `SELECT id, account_id AS accountId, technique, level, products, DATE_FORMAT(valid_from, '%Y-%m-%d') AS validFrom, DATE_FORMAT(valid_to, '%Y-%m-%d') AS validTo,
       ${isoOf('withdrawn_at')} AS withdrawnAt FROM authorisations WHERE method = ? AND account_id IN (?) AND granted_at IS NOT NULL ORDER BY valid_to DESC, level DESC, id`,
    [method, [...accountIds]],
  );
}

export interface VisionRow {
  readonly id: string;
  readonly accountId: string;
  readonly test: 'near-vision' | 'colour-perception';
  readonly result: 'pass' | 'fail';
  readonly corrected: boolean;
  readonly testedOn: string;
}

/** Vision tests of people, newest first. */
export async function visionOf(reading: Reading, accountIds: readonly string[]): Promise<VisionRow[]> {
  if (accountIds.length === 0) return [];
  const rows = await select<Omit<VisionRow, 'corrected'> & { corrected: number }>(
    reading,
    `SELECT id, account_id AS accountId, test, result, corrected, DATE_FORMAT(tested_on, '%Y-%m-%d') AS testedOn FROM vision_tests WHERE account_id IN (?)
     ORDER BY tested_on DESC, created_at DESC, id DESC`,
    [[...accountIds]],
  );
  return rows.map((row) => ({ ...row, corrected: row.corrected === 1 }));
}

/** Inspectors and reviewers who may be named in an act. */
export async function benchPeople(reading: Reading): Promise<{ id: string; name: string }[]> {
  return select(
    reading,
    `SELECT id, name FROM accounts WHERE role IN ('inspector', 'reviewer') AND disabled_at IS NULL ORDER BY name, id LIMIT 300`,
  );
}

export async function peopleByIds(reading: Reading, ids: readonly string[]): Promise<{ id: string; name: string }[]> {
  if (ids.length === 0) return [];
  return select(reading, 'SELECT id, name FROM accounts WHERE id IN (?)', [[...ids]]);
}

export interface CheckRow {
  readonly id: string;
  readonly scope: string;
  readonly title: string;
  readonly kind: 'opening' | 'bracketing';
  readonly result: 'good' | 'failed';
  readonly at: string;
  readonly validUntil: string | null;
}

const checkColumns = `id, scope, title, kind, result, ${isoOf('at')} AS at, ${isoOf('valid_until')} AS validUntil`;

/** The checks of a scope under one title that stand around an instant: the last at or before it, and the first after. */
export interface ChecksAround {
  readonly title: string;
  readonly before: CheckRow | undefined;
  readonly after: CheckRow | undefined;
}

/** The checks around an instant, title by title: a good look at the lamp says nothing about the panel. */
export async function checksAround(reading: Reading, scope: string, at: string): Promise<ChecksAround[]> {
  const instant = sqlTimeOf(at);
  const nearest = await select<{ title: string; beforeId: string | null; afterId: string | null }>(
    reading,
    `SELECT t.title, (SELECT b.id FROM process_checks b WHERE b.scope = ? AND b.title = t.title AND b.at <= ? ORDER BY b.at DESC, b.id DESC LIMIT 1) AS beforeId,
       (SELECT a.id FROM process_checks a WHERE a.scope = ? AND a.title = t.title AND a.at > ? ORDER BY a.at, a.id LIMIT 1) AS afterId
     FROM (SELECT DISTINCT title FROM process_checks WHERE scope = ?) t ORDER BY t.title`,
    [scope, instant, scope, instant, scope],
  );
  const ids = nearest.flatMap(({ beforeId, afterId }) => [beforeId, afterId]).filter((id) => id !== null);
  if (ids.length === 0) return [];
  const rows = await select<CheckRow>(reading, `SELECT ${checkColumns} FROM process_checks WHERE id IN (?)`, [ids]);
  const byId = new Map(rows.map((row) => [row.id, row]));
  return nearest.map(({ title, beforeId, afterId }) => ({
    title,
    before: byId.get(beforeId ?? ''),
    after: byId.get(afterId ?? ''),
  }));
}

/** The plant's time zone, e.g. `Europe/London`; UTC before a plant is entered. */
export async function plantZone(reading: Reading): Promise<string> {
  const row = await selectOne<{ zone: string }>(reading, 'SELECT zone FROM plants ORDER BY code LIMIT 1');
  return row?.zone ?? 'UTC';
}

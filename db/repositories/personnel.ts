import type { Authorisation, Level, VisionTest } from '../../services/contracts/personnel';
import { newId } from '../identity';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

export interface Page {
  readonly after: readonly [string, string] | null;
  readonly limit: number;
}

const start = ['', '00000000-0000-0000-0000-000000000000'] as const;
const dayOf = (column: string) => `DATE_FORMAT(${column}, '%Y-%m-%d')`;
const personOf = (id: string | null, name: string | null) => (id === null ? null : { id, name: name ?? '' });

type AuthorisationStored = Omit<Authorisation, 'person' | 'preparedBy' | 'grantedBy'> & {
  personId: string;
  personName: string;
  preparedId: string | null;
  preparedName: string | null;
  grantedId: string | null;
  grantedName: string | null;
};

function toAuthorisation(row: AuthorisationStored): Authorisation {
  const { personId, personName, preparedId, preparedName, grantedId, grantedName, ...rest } = row;
  return {
    ...rest,
    person: { id: personId, name: personName },
    preparedBy: personOf(preparedId, preparedName),
    grantedBy: personOf(grantedId, grantedName),
  };
}

// Takes two parameters: the day, and the day up to which a lapse is near.
const authorisationRows = `SELECT x.id, x.account_id AS personId, p.name AS personName, x.method, x.technique, x.level, x.products,
    ${dayOf('x.valid_from')} AS validFrom, ${dayOf('x.valid_to')} AS validTo, b.id AS preparedId, b.name AS preparedName, g.id AS grantedId, g.name AS grantedName,
    ${isoOf('x.granted_at')} AS grantedAt, ${isoOf('x.withdrawn_at')} AS withdrawnAt, x.withdrawn_reason AS withdrawnReason,
    CASE WHEN x.withdrawn_at IS NOT NULL THEN 'withdrawn' WHEN x.granted_at IS NULL THEN 'prepared' WHEN x.valid_to < d.today THEN 'expired'
      WHEN x.valid_from > d.today THEN 'not-yet-valid' WHEN x.valid_to <= d.today + INTERVAL ? DAY THEN 'due-soon' ELSE 'valid' END AS state
  FROM (SELECT CAST(? AS DATE) AS today) d JOIN authorisations x JOIN accounts p ON p.id = x.account_id
    LEFT JOIN accounts b ON b.id = x.prepared_by LEFT JOIN accounts g ON g.id = x.granted_by`;

export interface Today {
  /** The plant's calendar day. */
  readonly day: string;
  readonly lapsingDays: number;
}

/** Authorisations by person's name, keyset-paged. */
export async function authorisationsAfter(
  reading: Reading,
  { day, lapsingDays }: Today,
  filter: { readonly person?: string | undefined; readonly method?: string | undefined; readonly state?: string | undefined },
  page: Page,
): Promise<Authorisation[]> {
  const [name, id] = page.after ?? start;
  const rows = await select<AuthorisationStored>(
    reading,
    `SELECT * FROM (${authorisationRows} WHERE (? IS NULL OR x.account_id = ?) AND (? IS NULL OR x.method = ?)) found
     WHERE (? IS NULL OR state = ?) AND personName >= ? AND (personName > ? OR id > ?) ORDER BY personName, id LIMIT ?`,
    [
      lapsingDays,
      day,
      filter.person ?? null,
      filter.person ?? null,
      filter.method ?? null,
      filter.method ?? null,
      filter.state ?? null,
      filter.state ?? null,
      name,
      name,
      id,
      page.limit,
    ],
  );
  return rows.map(toAuthorisation);
}

/** One authorisation, with its row locked until commit. */
export async function takeAuthorisation(work: Work, { day, lapsingDays }: Today, id: string): Promise<Authorisation | undefined> {
  await select(work, 'SELECT id FROM authorisations WHERE id = ? FOR UPDATE', [id]);
  const row = await selectOne<AuthorisationStored>(work, `${authorisationRows} WHERE x.id = ?`, [lapsingDays, day, id]);
  return row && toAuthorisation(row);
}

export async function keepAuthorisation(
  work: Work,
  row: {
    readonly person: string;
    readonly method: string;
    readonly technique: string | null;
    readonly level: Level;
    readonly products: string | null;
    readonly validFrom: string;
    readonly validTo: string;
    readonly preparedBy: string;
  },
): Promise<string> {
  const id = newId();
  await execute(
    work,
    `INSERT INTO authorisations (id, account_id, method, technique, level, products, valid_from, valid_to, prepared_by, created_at)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    [
      id,
      row.person,
      row.method,
      row.technique,
      row.level,
      row.products,
      row.validFrom,
      row.validTo,
      row.preparedBy,
      sqlTimeOf(work.now),
    ],
  );
  return id;
}

export async function markGranted(work: Work, id: string, by: string): Promise<void> {
  await execute(work, 'UPDATE authorisations SET granted_by = ?, granted_at = ? WHERE id = ?', [by, sqlTimeOf(work.now), id]);
}

export async function markWithdrawn(work: Work, id: string, reason: string): Promise<void> {
  await execute(work, 'UPDATE authorisations SET withdrawn_at = ?, withdrawn_reason = ? WHERE id = ?', [
    sqlTimeOf(work.now),
    reason,
    id,
  ]);
}

/** Is this person level 3 in the method (or, of a technique's authorisation, at least in that technique) on that day? */
export async function isLevelThree(
  reading: Reading,
  accountId: string,
  method: string,
  technique: string | null,
  day: string,
): Promise<boolean> {
  const row = await selectOne<{ found: number }>(
    reading,
    `SELECT COUNT(*) AS found FROM authorisations WHERE account_id = ? AND method = ? AND level = '3' AND granted_at IS NOT NULL
       AND withdrawn_at IS NULL AND ? BETWEEN valid_from AND valid_to AND (technique IS NULL OR technique = ?)`,
    [accountId, method, day, technique],
  );
  return (row?.found ?? 0) > 0;
}

/** Does an approved or drafted technique of the method have this number? */
export async function techniqueExists(reading: Reading, number: string, method: string): Promise<boolean> {
  const row = await selectOne<{ found: number }>(
    reading,
    'SELECT COUNT(*) AS found FROM technique_issues WHERE number = ? AND method = ?',
    [number, method],
  );
  return (row?.found ?? 0) > 0;
}

type VisionStored = Omit<VisionTest, 'person' | 'recordedBy' | 'corrected'> & {
  personId: string;
  personName: string;
  recordedId: string | null;
  recordedName: string | null;
  corrected: number;
  newest: number;
};

function toVisionTest(row: VisionStored): VisionTest {
  const { personId, personName, recordedId, recordedName, corrected, newest: _newest, ...rest } = row;
  return {
    ...rest,
    corrected: corrected === 1,
    person: { id: personId, name: personName },
    recordedBy: personOf(recordedId, recordedName),
  };
}

const visionRows = `SELECT v.id, v.personId, v.personName, v.test, v.result, v.corrected, v.recordedId, v.recordedName, v.newest,
    ${dayOf('v.testedOn')} AS testedOn, ${dayOf('v.countsTo')} AS countsTo,
    CASE WHEN v.newest > 1 THEN 'superseded' WHEN v.result = 'fail' THEN 'failed' WHEN v.countsTo < d.today THEN 'expired'
      WHEN v.countsTo <= d.today + INTERVAL ? DAY THEN 'due-soon' ELSE 'valid' END AS state
  FROM (SELECT CAST(? AS DATE) AS today) d JOIN (
    SELECT t.id, t.account_id AS personId, p.name AS personName, t.test, t.result, t.corrected, b.id AS recordedId, b.name AS recordedName, t.tested_on AS testedOn,
      IF(t.test = 'near-vision', t.tested_on + INTERVAL 12 MONTH, t.tested_on + INTERVAL 5 YEAR) AS countsTo,
      ROW_NUMBER() OVER (PARTITION BY t.account_id, t.test ORDER BY t.tested_on DESC, t.created_at DESC, t.id DESC) AS newest
    FROM vision_tests t JOIN accounts p ON p.id = t.account_id LEFT JOIN accounts b ON b.id = t.recorded_by) v`;

/** Vision tests by person's name, keyset-paged. */
export async function visionTestsAfter(
  reading: Reading,
  { day, lapsingDays }: Today,
  filter: { readonly person?: string | undefined; readonly newest: boolean },
  page: Page,
): Promise<VisionTest[]> {
  const [name, id] = page.after ?? start;
  const rows = await select<VisionStored>(
    reading,
    `${visionRows} WHERE (? IS NULL OR v.personId = ?) AND (? = 0 OR v.newest = 1) AND v.personName >= ? AND (v.personName > ? OR v.id > ?)
     ORDER BY v.personName, v.id LIMIT ?`,
    [lapsingDays, day, filter.person ?? null, filter.person ?? null, filter.newest ? 1 : 0, name, name, id, page.limit],
  );
  return rows.map(toVisionTest);
}

/** Keeps a vision test; answers its id. */
export async function keepVisionTest(
  work: Work,
  row: {
    readonly person: string;
    readonly test: VisionTest['test'];
    readonly result: VisionTest['result'];
    readonly corrected: boolean;
    readonly testedOn: string;
    readonly recordedBy: string;
  },
): Promise<string> {
  const id = newId();
  await execute(
    work,
    'INSERT INTO vision_tests (id, account_id, test, result, corrected, tested_on, recorded_by, created_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?)',
    [id, row.person, row.test, row.result, row.corrected ? 1 : 0, row.testedOn, row.recordedBy, sqlTimeOf(work.now)],
  );
  return id;
}

export async function visionTestById(reading: Reading, { day, lapsingDays }: Today, id: string): Promise<VisionTest | undefined> {
  const row = await selectOne<VisionStored>(reading, `${visionRows} WHERE v.id = ?`, [lapsingDays, day, id]);
  return row && toVisionTest(row);
}

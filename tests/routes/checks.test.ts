import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { GET as standing } from '@/app/api/checks/standing/route';
import { GET as list, POST as record } from '@/app/api/checks/route';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { databaseNow, execute, inTransaction, reading, select, sqlTimeOf } from '@/db/work';
import { listChecks, readStandingChecks, type CheckStanding } from '@/services/contracts/checks';
import { scopeStandings, titlesAsked } from '@/services/inspections/check-covers';
import { call, type Person } from './inspection-setting';
import { floor, prepareFloor } from './release-setting';
import { bench } from './signing-setting';
import { checked, checking } from './suspects-setting';

let scope: string;

beforeAll(prepareFloor);
beforeEach(() => {
  scope = `lamp ${newId().slice(-8)}`;
});
afterAll(closeDatabase);

const goodOne = (more: object = {}) => checking({ scope, result: 'good', ...more });
const standingOf = async (): Promise<CheckStanding[]> =>
  readStandingChecks.response
    .parse((await call(standing, { as: bench.auditor })).json)
    .items.filter((one) => one.scope === scope);
const minutesAgo = async (minutes: number) => new Date(Date.parse(await databaseNow()) - minutes * 60_000).toISOString();

/** An approved technique of penetrant that asks for the irradiance of the scope's lamp, at least 1000 µW/cm². */
async function technique(validHours = 12): Promise<string> {
  const number = `FP-${newId().slice(-8)}`;
  const check = { scope, title: 'Irradiance', kind: 'opening', validHours, window: { unit: 'µW/cm²', lower: '1000' } };
  await inTransaction(null, (work) =>
    execute(
      work,
      `INSERT INTO technique_issues (id, number, issue, method, title, standard, state, content, author, created_at) VALUES (?, ?, 1, 'penetrant', 'Lamps', 'plant procedure', 'approved', ?, ?, ?)`,
      [newId(), number, JSON.stringify({ checks: [check] }), floor.reviewer.id, sqlTimeOf(work.now)],
    ),
  );
  return number;
}

describe('who may', () => {
  it('read: staff and auditors; record: inspectors and reviewers', async () => {
    const statuses = async (as: Person | null) => {
      const by = as ? { as } : {};
      return [
        (await call(list, by)).status,
        (await call(standing, by)).status,
        (await call(record, { method: 'POST', body: {}, ...by })).status,
      ];
    };
    expect(await statuses(null)).toEqual([401, 401, 401]);
    expect(await statuses(floor.customer)).toEqual([403, 403, 403]);
    expect(await statuses(bench.auditor)).toEqual([200, 200, 403]);
    expect(await statuses(floor.administrator)).toEqual([200, 200, 403]);
    expect(await statuses(bench.inspector)).toEqual([200, 200, 422]);
    expect(await statuses(floor.reviewer)).toEqual([200, 200, 422]);
  });
});

describe('a process check', () => {
  it('is kept with who, when, value and unit as typed, and is an event', async () => {
    const answer = await goodOne({ value: '1840.0', unit: 'µW/cm²', note: 'Centre of the field.', validHours: 12 });
    const { check, suspects } = checked(answer);
    expect([answer.status, suspects]).toEqual([201, null]);
    expect(check).toMatchObject({ scope, value: '1840.0', unit: 'µW/cm²', result: 'good', doneBy: { id: bench.inspector.id } });
    expect(Date.parse(check.validUntil) - Date.parse(check.at)).toBe(12 * 3_600_000);
    const events = await select<{ kind: string }>(reading(), 'SELECT kind FROM events WHERE subject_id = ?', [check.id]);
    expect(events).toEqual([{ kind: 'check-recorded' }]);
    const page = listChecks.response.parse((await call(list, { as: bench.auditor, query: `?scope=${scope}` })).json);
    expect(page.items.map(({ id }) => id)).toEqual([check.id]);
  });

  it('is refused with the field that is wrong', async () => {
    const paths = async (more: object) => (await goodOne(more)).errors.map(({ path }) => path).sort();
    expect(await paths({ scope: '', result: 'fine', method: 'x' })).toEqual(['method', 'result', 'scope']);
    expect(await paths({ value: '12' })).toEqual(['unit']);
    expect(await paths({ value: '1,2', unit: 'lx' })).toEqual(['value']);
    expect(await paths({ at: 'yesterday' })).toEqual(['at']);
    expect(await paths({ at: await minutesAgo(-10) })).toEqual(['at']);
    expect(await paths({ at: await minutesAgo(25 * 60) })).toEqual(['at']);
    expect(await paths({ unknown: 1 })).toEqual(['unknown']);
  });

  it('is not put before one that is on record', async () => {
    expect((await goodOne()).status).toBe(201);
    expect((await goodOne({ at: await minutesAgo(30) })).errors[0]).toMatchObject({
      path: 'at',
      message: expect.stringContaining('before the last one on record') as string,
    });
  });

  it('takes time and window from the technique that asks for it', async () => {
    const number = await technique(6);
    const irradiance = { title: 'Irradiance', unit: 'µW/cm²' };
    expect((await goodOne(irradiance)).errors.map(({ path }) => path)).toEqual(['value']);
    const low = await goodOne({ ...irradiance, value: '999.9' });
    expect(low.errors).toEqual([{ path: 'result', message: expect.stringContaining('outside its window 1000 to –') as string }]);
    expect((await goodOne({ title: 'Irradiance', value: '50', unit: 'lx' })).errors.map(({ path }) => path)).toEqual(['unit']);
    expect((await goodOne({ ...irradiance, value: '1200', method: 'radiography' })).errors.map(({ path }) => path)).toEqual([
      'method',
    ]);
    // At the edge of its window is in it; what the technique gives is not stretched, and may be cut.
    const { check } = checked(await goodOne({ ...irradiance, value: '1000', validHours: 48 }));
    expect(Date.parse(check.validUntil) - Date.parse(check.at)).toBe(6 * 3_600_000);
    // 12 W/m² are 1200 µW/cm².
    const inWatts = await goodOne({ title: 'Irradiance', value: '12', unit: 'W/m²' });
    expect([inWatts.status, checked(inWatts).check.value]).toEqual([201, '12']);
    expect((await standingOf()).map(({ techniques, window }) => [techniques, window?.lower])).toEqual([[[number], '1000']]);
  });

  it('stands as never made, good, due soon, lapsed or failed', async () => {
    await technique(12);
    const states = async () => (await standingOf()).map(({ title, state }) => `${title}: ${state}`);
    expect(await states()).toEqual(['Irradiance: never']);
    const irradiance = { title: 'Irradiance', value: '1500', unit: 'µW/cm²', validHours: 12 };
    await goodOne({ ...irradiance, at: await minutesAgo(13 * 60) });
    expect(await states()).toEqual(['Irradiance: lapsed']);
    await goodOne({ ...irradiance, at: await minutesAgo(11 * 60) });
    expect(await states()).toEqual(['Irradiance: due-soon']);
    await goodOne(irradiance);
    expect(await states()).toEqual(['Irradiance: good']);
    await goodOne({ ...irradiance, value: '400', result: 'failed' });
    expect(await states()).toEqual(['Irradiance: failed']);
    await goodOne({ title: 'Filter clean' });
    expect(await states()).toEqual(['Irradiance: failed', 'Filter clean: good']);
  });

  it('sent twice with one key is recorded once', async () => {
    const headers = { 'idempotency-key': newId() };
    const body = { scope, title: 'Panel', method: 'penetrant', result: 'good' };
    const send = () => call(record, { method: 'POST', as: bench.inspector, headers, body });
    const [first, second] = [await send(), await send()];
    expect([first.status, second.status, checked(second).check.id]).toEqual([201, 201, checked(first).check.id]);
  });
});

describe('an act leans on a scope', () => {
  const at = '2026-03-09T10:00:00.000000Z';
  const one = (title: string, more: object = {}) => ({
    ...{ id: title, scope: 'booth 3', title, kind: 'opening' as const, result: 'good' as const },
    ...{ at: '2026-03-09T06:00:00.000000Z', validUntil: '2026-03-09T14:00:00.000000Z', ...more },
  });
  const states = (titles: readonly string[], ...rows: ReturnType<typeof one>[]) =>
    scopeStandings(
      'booth 3',
      at,
      rows.map((before) => ({ title: before.title, before, after: undefined })),
      titles,
    ).map(({ state, reason }) => `${state} ${reason ?? ''}`.trim());

  it('by every check that its technique asks for: a good one does not stand for a missing or lapsed one', () => {
    const lapsed = { validUntil: '2026-03-09T09:00:00.000000Z' };
    expect(states(['Panel', 'Light'], one('Panel'), one('Light'))).toEqual(['good', 'good']);
    expect(states(['Panel', 'Light'], one('Light'))).toEqual([
      'missed no process check of booth 3 (Panel) is on record before the act',
      'good',
    ]);
    expect(states(['Panel', 'Light'], one('Panel', lapsed), one('Light'))).toEqual([
      'missed the process check of booth 3 (Panel) had run out at 2026-03-09T09:00:00.000000Z',
      'good',
    ]);
  });

  it('by the last one where no technique asks, and never past one that stands failed', () => {
    const early = { at: '2026-03-09T05:00:00.000000Z' };
    expect(states([])).toEqual(['missed no process check of booth 3 is on record before the act']);
    expect(states([], one('Panel', early), one('Light'))).toEqual(['good']);
    const failed = { ...early, result: 'failed' };
    expect(states([], one('Panel', failed), one('Light'))).toEqual([
      'good',
      'failed the process check of booth 3 (Panel) had failed before the act',
    ]);
    expect(states(['Light'], one('Panel', failed), one('Light')).length).toBe(2);
  });

  it('reads what a technique asks for, and nothing of what is not of its form', () => {
    expect(
      titlesAsked(
        {
          checks: [
            { scope: 'booth 3', title: 'Panel' },
            { scope: 'line 1', title: 'Rinse' },
          ],
        },
        'booth 3',
      ),
    ).toEqual(['Panel']);
    for (const content of [{}, null, undefined, { checks: 'Panel' }, { checks: [{ scope: 'booth 3' }] }])
      expect(titlesAsked(content, 'booth 3')).toEqual([]);
  });
});

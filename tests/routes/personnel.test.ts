import { beforeAll, describe, expect, it } from 'vitest';
import { POST as grant } from '@/app/api/authorisations/[id]/approval/route';
import { POST as withdraw } from '@/app/api/authorisations/[id]/withdrawal/route';
import { GET as listAuthorisations, POST as prepare } from '@/app/api/authorisations/route';
import { GET as listVision, POST as recordVision } from '@/app/api/vision-tests/route';
import { thePlant } from '@/db/repositories/plants';
import { databaseNow, reading, select } from '@/db/work';
import {
  listAuthorisations as listContract,
  listVisionTests as visionContract,
  prepareAuthorisation as prepareContract,
} from '@/services/contracts/personnel';
import { plantDay } from '@/services/inspections/plant-day';
import { call, person, qualify, setting, signingPassword, type Answer, type Person, type Setting } from './inspection-setting';

const foreignId = '01900000-0000-7000-8000-000000000000';
let administrator: Person;
let inspector: Person;
let levelThree: Person;
let otherReviewer: Person;
let today: string;
let plan: Setting;

/** A day so many days from the plant's today. */
function daysOn(days: number): string {
  const [year = 0, month = 1, day = 1] = today.split('-').map(Number);
  return new Date(Date.UTC(year, month - 1, day + days)).toISOString().slice(0, 10);
}

const preparing = (more: object = {}, as = administrator): Promise<Answer> =>
  call(prepare, {
    ...{ method: 'POST', as },
    body: { person: inspector.id, method: 'penetrant', level: '2', validFrom: today, validTo: daysOn(365), ...more },
  });
const prepared = async (more: object = {}, as = administrator) =>
  prepareContract.response.parse((await preparing(more, as)).json).id;
const granting = (id: string, as: Person, password = signingPassword) =>
  call(grant, { method: 'POST', as, params: { id }, body: { password } });
const listed = async (query: string) =>
  listContract.response.parse((await call(listAuthorisations, { as: administrator, query: `?limit=200&${query}` })).json).items;

beforeAll(async () => {
  [administrator, inspector, levelThree, otherReviewer] = [
    await person('administrator'),
    await person('inspector'),
    await person('reviewer'),
    await person('reviewer'),
  ];
  await qualify(levelThree, 'penetrant', '3');
  await qualify(levelThree, 'ultrasonic-thickness', '3');
  await qualify(otherReviewer, 'penetrant', '2');
  plan = await setting(levelThree);
  today = plantDay(await databaseNow(), (await thePlant(reading())).zone);
});

describe('who may', () => {
  it('read: staff and auditors; prepare: administrators and reviewers; grant: reviewers; record vision: administrators', async () => {
    const statuses = async (as: Person | undefined) => {
      const by = as ? { as } : {};
      return [
        (await call(listAuthorisations, by)).status,
        (await call(listVision, by)).status,
        (await call(prepare, { method: 'POST', body: {}, ...by })).status,
        (await call(grant, { method: 'POST', body: {}, params: { id: foreignId }, ...by })).status,
        (await call(withdraw, { method: 'POST', body: {}, params: { id: foreignId }, ...by })).status,
        (await call(recordVision, { method: 'POST', body: {}, ...by })).status,
      ];
    };
    expect(await statuses(undefined)).toEqual([401, 401, 401, 401, 401, 401]);
    expect(await statuses(inspector)).toEqual([200, 200, 403, 403, 403, 403]);
    expect(await statuses(await person('auditor'))).toEqual([200, 200, 403, 403, 403, 403]);
    expect(await statuses(await person('customer-quality'))).toEqual([403, 403, 403, 403, 403, 403]);
    expect(await statuses(levelThree)).toEqual([200, 200, 422, 422, 422, 403]);
    expect(await statuses(administrator)).toEqual([200, 200, 422, 403, 403, 422]);
  });
});

describe('an authorisation', () => {
  it('counts once a level 3 of the method has granted it with the password', async () => {
    const id = await prepared();
    expect((await listed(`person=${inspector.id}&state=prepared`)).map((row) => row.id)).toContain(id);
    const wrong = await granting(id, levelThree, 'not-the-password');
    expect([wrong.status, wrong.problem]).toEqual([403, 'signature-refused']);
    const granted = await granting(id, levelThree);
    expect(granted.json).toMatchObject({
      id,
      state: 'valid',
      grantedBy: { id: levelThree.id },
      preparedBy: { id: administrator.id },
    });
    expect((await granting(id, levelThree)).problem).toBe('state-refused');
    const told = await select<{ kind: string }>(reading(), 'SELECT kind FROM events WHERE subject_id = ? ORDER BY seq', [id]);
    expect(told.map(({ kind }) => kind)).toEqual(['authorisation-prepared', 'authorisation-granted']);
  });

  it('is granted neither by its person, nor by who prepared it, nor by a level 2, nor by a level 3 of another method', async () => {
    const own = await prepared({ person: levelThree.id });
    const byThree = await prepared({}, levelThree);
    const plain = await prepared();
    const radiography = await prepared({ method: 'radiography' });
    const answers = [
      await granting(own, levelThree),
      await granting(byThree, levelThree),
      await granting(plain, otherReviewer),
      await granting(radiography, levelThree),
    ];
    expect(answers.map(({ status, problem }) => [status, problem])).toEqual(Array(4).fill([403, 'not-permitted']));
    expect((await listed(`person=${inspector.id}&method=radiography`)).map(({ state }) => state)).toEqual(['prepared']);
    expect((await granting(foreignId, levelThree)).status).toBe(404);
  });

  it('is not granted by a level 3 whose own authorisation was withdrawn', async () => {
    const former = await person('reviewer');
    await qualify(former, 'penetrant', '3');
    const [theirs] = await listed(`person=${former.id}`);
    const taken = await call(withdraw, {
      ...{ method: 'POST', as: levelThree, params: { id: theirs?.id ?? '' } },
      body: { reason: 'Left the laboratory', password: signingPassword },
    });
    expect(taken.json).toMatchObject({ state: 'withdrawn', withdrawnReason: 'Left the laboratory' });
    expect((await granting(await prepared(), former)).problem).toBe('not-permitted');
  });

  it('is withdrawn with a reason and the password, once', async () => {
    const id = await prepared();
    await granting(id, levelThree);
    const withdrawing = (body: object) => call(withdraw, { method: 'POST', as: otherReviewer, params: { id }, body });
    expect((await withdrawing({ reason: 'no', password: signingPassword })).errors[0]?.path).toBe('reason');
    expect((await withdrawing({ reason: 'Failed the yearly check', password: 'wrong' })).problem).toBe('signature-refused');
    expect((await withdrawing({ reason: 'Failed the yearly check', password: signingPassword })).json).toMatchObject({
      state: 'withdrawn',
    });
    expect((await withdrawing({ reason: 'Failed the yearly check', password: signingPassword })).problem).toBe('state-refused');
    expect((await granting(id, levelThree)).problem).toBe('state-refused');
  });

  it('says what it counts for today, and flags 30 days before it lapses', async () => {
    const soon = await person('inspector');
    for (const [validFrom, validTo] of [
      [today, daysOn(31)],
      [today, daysOn(30)],
      [today, today],
      [daysOn(1), daysOn(400)],
    ]) {
      const id = await prepared({ person: soon.id, validFrom, validTo });
      expect((await granting(id, levelThree)).status).toBe(200);
    }
    expect((await listed(`person=${soon.id}`)).map(({ state }) => state)).toEqual([
      'valid',
      'due-soon',
      'due-soon',
      'not-yet-valid',
    ]);
    expect(await listed(`person=${soon.id}&state=due-soon`)).toHaveLength(2);
  });

  it('is refused with the field named', async () => {
    const paths = async (more: object) => (await preparing(more)).errors.map(({ path }) => path);
    expect(await paths({ person: administrator.id })).toEqual(['person']);
    expect(await paths({ person: foreignId })).toEqual(['person']);
    expect(await paths({ technique: 'PT-nowhere' })).toEqual(['technique']);
    expect(await paths({ technique: plan.technique })).toEqual(['technique']);
    expect(await paths({ method: 'ultrasonic-thickness', technique: plan.technique })).toEqual([]);
    expect(await paths({ validTo: daysOn(-1), validFrom: daysOn(-9) })).toEqual(['validTo']);
    expect(await paths({ validFrom: daysOn(9), validTo: daysOn(8) })).toEqual(['validTo']);
    expect(await paths({ validTo: daysOn(365 * 5 + 3) })).toEqual(['validTo']);
    expect(await paths({ level: '4' })).toEqual(['level']);
    expect(await paths({ method: 'dowsing' })).toEqual(['method']);
  });

  it('is listed once over the pages', async () => {
    const seen: string[] = [];
    let after = '';
    for (let turn = 0; turn < 50; turn += 1) {
      const query = `?limit=2&person=${inspector.id}${after === '' ? '' : `&after=${after}`}`;
      const page = listContract.response.parse((await call(listAuthorisations, { as: inspector, query })).json);
      seen.push(...page.items.map(({ id }) => id));
      if (page.next === null) break;
      after = page.next;
    }
    expect(seen).toEqual((await listed(`person=${inspector.id}`)).map(({ id }) => id));
    expect(new Set(seen).size).toBe(seen.length);
  });
});

describe('a vision test', () => {
  const recording = (more: object): Promise<Answer> =>
    call(recordVision, {
      ...{ method: 'POST', as: administrator },
      body: { person: inspector.id, test: 'near-vision', result: 'pass', corrected: true, testedOn: today, ...more },
    });
  const statesOf = async (who: Person, query = '') => {
    const answer = await call(listVision, { as: inspector, query: `?person=${who.id}${query}` });
    return visionContract.response.parse(answer.json).items.map(({ test, state, testedOn }) => [test, state, testedOn]);
  };

  it('counts near vision 12 months and colour perception 5 years; a later one stands in its place', async () => {
    const seen = await person('inspector');
    const one = await recording({ person: seen.id, testedOn: daysOn(-340) });
    expect([one.status, one.json]).toEqual([201, expect.objectContaining({ state: 'due-soon', corrected: true })]);
    await recording({ person: seen.id, test: 'colour-perception', testedOn: daysOn(-400) });
    await recording({ person: seen.id, testedOn: daysOn(-370) });
    expect(await statesOf(seen)).toEqual([
      ['near-vision', 'due-soon', daysOn(-340)],
      ['colour-perception', 'valid', daysOn(-400)],
      ['near-vision', 'superseded', daysOn(-370)],
    ]);
    await recording({ person: seen.id, result: 'fail' });
    expect(await statesOf(seen, '&newest=true')).toEqual([
      ['colour-perception', 'valid', daysOn(-400)],
      ['near-vision', 'failed', today],
    ]);
    const old = await person('inspector');
    await recording({ person: old.id, testedOn: daysOn(-370) });
    expect(await statesOf(old)).toEqual([['near-vision', 'expired', daysOn(-370)]]);
  });

  it('is refused for tomorrow, for someone who does not inspect, and with an unknown field', async () => {
    expect((await recording({ testedOn: daysOn(1) })).errors[0]?.path).toBe('testedOn');
    expect((await recording({ person: administrator.id })).errors[0]?.path).toBe('person');
    expect((await recording({ note: 'x' })).errors[0]?.path).toBe('note');
  });
});

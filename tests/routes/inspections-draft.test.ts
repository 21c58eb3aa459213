import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { DELETE as abandonByDelete, GET as read, PATCH as change } from '@/app/api/inspections/[id]/route';
import { POST as abandon } from '@/app/api/inspections/[id]/abandonment/route';
import { POST as open } from '@/app/api/inspections/route';
import { closeDatabase } from '@/db/connection';
import { select, reading } from '@/db/work';
import { inspection } from '@/services/contracts/inspections';
import { call, gauge, partOf, person, setting, type Person, type Setting } from './inspection-setting';

let inspector: Person;
let auditor: Person;
let customer: Person;
let plan: Setting;

beforeAll(async () => {
  inspector = await person('inspector');
  auditor = await person('auditor');
  plan = await setting(inspector);
  customer = await person('customer-quality', plan.customerId);
});
afterAll(closeDatabase);

function opening(partId: string, requirement: string, more: Record<string, unknown> = {}, as: Person = inspector) {
  return call(open, { method: 'POST', as, body: { subject: { part: partId }, requirement, ...more } });
}

function saving(id: string, version: number | null, body: unknown, as: Person = inspector) {
  return call(change, {
    method: 'PATCH',
    as,
    params: { id },
    body,
    headers: version === null ? {} : { 'if-match': `"${String(version)}"` },
  });
}

describe('opening', () => {
  test('two at once get the same draft, by requirement id or by key', async () => {
    const partId = await partOf(plan, inspector);
    const answers = await Promise.all([opening(partId, plan.wall), opening(partId, 'wall'), opening(partId, 'wall')]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 201]);
    expect(new Set(answers.map(({ json }) => inspection.parse(json).id)).size).toBe(1);
    const drafts = await select<{ n: number }>(reading(), 'SELECT COUNT(*) AS n FROM inspection_drafts WHERE part_id = ?', [
      partId,
    ]);
    expect(drafts[0]?.n).toBe(1);
  });

  test('answers what the bench needs', async () => {
    const partId = await partOf(plan, inspector);
    const equipment = await gauge('ultrasonic-thickness', 'ut-gauge');
    const overdue = await gauge('ultrasonic-thickness', 'ut-gauge', -1);
    const answer = inspection.parse((await opening(partId, 'wall')).json);
    expect(answer.state).toBe('draft');
    expect(answer.part.ring.map(({ key, state }) => [key, state])).toEqual([
      ['wall', 'in-work'],
      ['fpi', 'open'],
    ]);
    expect(answer.technique?.number).toBe(plan.technique);
    expect(answer.uncertainties.map(({ characteristic, expanded }) => [characteristic, expanded])).toEqual([
      ['12', '0.020'],
      ['13', '0.020'],
    ]);
    expect((answer.criteria.characteristics as unknown[]).length).toBe(2);
    expect(answer.criteria.indicationRules).toEqual([]);
    expect(answer.equipment.find(({ id }) => id === equipment)?.calibration.state).toBe('in-date');
    expect(answer.equipment.find(({ id }) => id === overdue)?.calibration.state).toBe('overdue');
    expect(answer.people.find(({ id }) => id === inspector.id)?.why).toContain('is not authorised for ultrasonic-thickness');
    expect(answer.neededActs.map(({ kind }) => kind)).toEqual(['block-check-before', 'measured', 'block-check-after']);
    expect(answer.judgement.evaluation?.missing).toEqual([
      { kind: 'reading', number: '12' },
      { kind: 'reading', number: '13' },
    ]);
  });

  test.each([
    ['scrapped', false, 'is scrapped'],
    ['released', false, 'is released'],
    ['serialised', true, 'is held'],
  ] as const)('refuses a %s part (held %s)', async (state, held, words) => {
    const answer = await opening(await partOf(plan, inspector, state, held), 'wall');
    expect([answer.status, answer.problem]).toEqual([409, 'state-refused']);
    expect(answer.detail).toContain(words);
  });

  test('names a requirement or part that is not there', async () => {
    const wrong = await opening(await partOf(plan, inspector), 'no-such-operation');
    expect([wrong.status, wrong.errors[0]?.path]).toEqual([422, 'requirement']);
    const none = await opening('01890000-0000-7000-8000-000000000000', 'wall');
    expect(none.status).toBe(404);
  });
});

describe('saving', () => {
  test('keeps what was typed, names each field that is no reading, and judges the rest', async () => {
    const opened = inspection.parse((await opening(await partOf(plan, inspector), 'wall')).json);
    const readings = ['1,2,3', 'NaN', '1e9', '0.90'].map((value) => ({ characteristic: '12', value, unit: 'mm' }));
    const saved = await saving(opened.id, opened.version, {
      readings: [...readings, { characteristic: '13', value: '20', unit: '°C' }],
    });
    expect(saved.status).toBe(200);
    const answer = inspection.parse(saved.json);
    expect(answer.content.readings.map(({ value }) => value)).toEqual(['1,2,3', 'NaN', '1e9', '0.90', '20']);
    const faulty = new Set(answer.judgement.faults.map(({ path }) => path.split('.').slice(0, 2).join('.')));
    expect([...faulty].sort()).toEqual(['readings.0', 'readings.1', 'readings.2', 'readings.4']);
    expect(answer.judgement.evaluation?.readings.map(({ characteristic, verdict }) => [characteristic, verdict])).toEqual([
      ['12', 'accept'],
    ]);
    expect(answer.judgement.evaluation?.missing).toEqual([{ kind: 'reading', number: '13' }]);
  });

  test('a second tab is told, with what is there now, and nothing is overwritten', async () => {
    const opened = inspection.parse((await opening(await partOf(plan, inspector), 'wall')).json);
    const first = await saving(opened.id, opened.version, { notes: 'first tab' });
    expect(first.headers.get('etag')).toBe(`"${String(opened.version + 1)}"`);
    const second = await saving(opened.id, opened.version, { notes: 'second tab' });
    expect([second.status, second.problem]).toEqual([412, 'changed-meanwhile']);
    expect(second.json).toMatchObject({ present: { notes: 'first tab' }, version: opened.version + 1 });
    const missing = await saving(opened.id, null, { notes: 'no version' });
    expect([missing.status, missing.problem]).toEqual([428, 'version-needed']);
    const now = inspection.parse((await call(read, { as: inspector, params: { id: opened.id } })).json);
    expect(now.content.notes).toBe('first tab');
  });

  test('twenty saves of one version: exactly one is taken', async () => {
    const opened = inspection.parse((await opening(await partOf(plan, inspector), 'wall')).json);
    const answers = await Promise.all(
      Array.from({ length: 20 }, (_, place) => saving(opened.id, opened.version, { notes: `tab ${String(place)}` })),
    );
    expect(answers.filter(({ status }) => status === 200)).toHaveLength(1);
    expect(answers.filter(({ status }) => status === 412)).toHaveLength(19);
  });

  test('a value changed after its verdict was shown keeps what it was, who and when; a red draft is remembered', async () => {
    const opened = inspection.parse((await opening(await partOf(plan, inspector), 'wall')).json);
    const red = inspection.parse(
      (await saving(opened.id, opened.version, { readings: [{ characteristic: '12', value: '0.01', unit: 'mm' }] })).json,
    );
    expect(red.judgement.evaluation?.readings[0]?.verdict).toBe('reject');
    expect(red.shownReject).toBe(true);
    const green = inspection.parse(
      (await saving(opened.id, red.version, { readings: [{ characteristic: '12', value: '0.90', unit: 'mm' }] })).json,
    );
    expect(green.shownReject).toBe(true);
    const kept = await select<{ field: string; before: string; shown: string; by: string }>(
      reading(),
      'SELECT field, before_value AS `before`, verdict_shown AS shown, changed_by AS `by` FROM draft_changes WHERE draft_id = ?',
      [opened.id],
    );
    expect(kept).toHaveLength(1);
    expect(kept[0]).toMatchObject({ field: 'readings.12', shown: 'reject', by: inspector.id });
    expect(JSON.parse(kept[0]?.before ?? '{}')).toMatchObject({ value: '0.01' });
  });

  test('refuses an unknown field by its path', async () => {
    const opened = inspection.parse((await opening(await partOf(plan, inspector), 'wall')).json);
    const answer = await saving(opened.id, opened.version, {
      readings: [{ characteristic: '12', value: '1', unit: 'mm', colour: 'red' }],
    });
    expect([answer.status, answer.errors[0]?.path]).toEqual([422, 'readings.0.colour']);
  });
});

describe('giving up', () => {
  test('keeps the draft and puts the requirement back', async () => {
    const partId = await partOf(plan, inspector);
    const opened = inspection.parse((await opening(partId, 'wall')).json);
    const gone = await call(abandon, {
      method: 'POST',
      as: inspector,
      params: { id: opened.id },
      body: { reason: 'wrong part' },
    });
    const answer = inspection.parse(gone.json);
    expect([gone.status, answer.state, answer.requirement.state]).toEqual([200, 'abandoned', 'open']);
    const again = await saving(opened.id, answer.version, { notes: 'late' });
    expect([again.status, again.problem]).toEqual([409, 'state-refused']);
    const next = inspection.parse((await opening(partId, 'wall')).json);
    expect(next.id).not.toBe(opened.id);
    expect((await call(abandonByDelete, { method: 'DELETE', as: inspector, params: { id: next.id } })).status).toBe(204);
  });
});

describe('refused access', () => {
  test('no session 401, wrong role 403, for every call on a draft', async () => {
    const { id, version } = inspection.parse((await opening(await partOf(plan, inspector), 'wall')).json);
    const headers = { 'if-match': `"${String(version)}"` };
    const calls = [
      (as?: Person) =>
        call(open, { method: 'POST', body: { subject: { part: id }, requirement: 'wall' }, ...(as ? { as } : {}) }),
      (as?: Person) => call(change, { method: 'PATCH', params: { id }, headers, body: { notes: 'x' }, ...(as ? { as } : {}) }),
      (as?: Person) => call(abandon, { method: 'POST', params: { id }, body: {}, ...(as ? { as } : {}) }),
      (as?: Person) => call(abandonByDelete, { method: 'DELETE', params: { id }, ...(as ? { as } : {}) }),
    ];
    for (const one of calls) {
      expect((await one()).status).toBe(401);
      expect((await one(auditor)).status).toBe(403);
      expect((await one(customer)).status).toBe(403);
    }
    expect((await call(read, { params: { id } })).status).toBe(401);
    expect((await call(read, { params: { id }, as: customer })).status).toBe(403);
    expect((await call(read, { params: { id }, as: auditor })).status).toBe(200);
    expect((await call(read, { params: { id: plan.planId }, as: auditor })).status).toBe(404);
  });
});

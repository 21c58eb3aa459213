import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { GET as listProcesses, POST as recordProcess } from '@/app/api/measurement-processes/route';
import { POST as approve } from '@/app/api/techniques/[id]/approval/route';
import { POST as check } from '@/app/api/techniques/[id]/check/route';
import { GET as read, PUT as change } from '@/app/api/techniques/[id]/route';
import { POST as withdraw } from '@/app/api/techniques/[id]/withdrawal/route';
import { GET as list, POST as draft } from '@/app/api/techniques/route';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, select, selectOne } from '@/db/work';
import {
  draftTechnique,
  listMeasurementProcesses,
  listTechniques,
  type Technique,
  withdrawTechnique,
} from '@/services/contracts/techniques';
import { call, person, qualify, signingPassword, type Answer, type Person } from './inspection-setting';
import { floor, freshPlan, partState, prepareFloor, rawPart, signWall } from './release-setting';
import { bench } from './signing-setting';
import { closing, dayOn, listNow } from './suspects-setting';

const nowhere = '01900000-0000-7000-8000-000000000000';
let author: Person;
let second: Person;
let levelThree: Person;

beforeAll(async () => {
  await prepareFloor();
  [author, second, levelThree] = [await person('reviewer'), await person('reviewer'), await person('reviewer')];
  await qualify(levelThree, 'penetrant', '3');
  await qualify(levelThree, 'ultrasonic-thickness', '3');
  await qualify(author, 'penetrant', '3');
  await qualify(second, 'penetrant', '2');
});
afterAll(closeDatabase);

const content = {
  parameters: [
    { name: 'Penetrant dwell', value: '20 to 60', unit: 'min', essential: true },
    { name: 'Brush', value: 'soft' },
  ],
  windows: [{ title: 'Dryer temperature', unit: '°C', upper: '71' }],
  views: ['concave', 'convex'],
  checks: [{ scope: 'booth 9', title: 'Known-defect panel', kind: 'opening', validHours: 24 }],
  indicator: null,
};
const numberOf = () => `FP-${newId().slice(-10)}`;
const drafting = (more: object = {}, as: Person | null = author): Promise<Answer> =>
  call(draft, {
    method: 'POST',
    body: {
      number: numberOf(),
      method: 'penetrant',
      title: 'Fluorescent, water washable',
      standard: 'ASTM E1417',
      content,
      ...more,
    },
    ...(as ? { as } : {}),
  });
const drafted = async (more: object = {}): Promise<Technique> => draftTechnique.response.parse((await drafting(more)).json);
const moving = (handler: typeof check, id: string, as: Person, body: object = {}) =>
  call(handler, { method: 'POST', as, params: { id }, body });
const approving = (id: string, as = levelThree, password = signingPassword) => moving(approve, id, as, { password });
const withdrawing = (id: string, as = levelThree) =>
  moving(withdraw, id, as, { password: signingPassword, reason: 'Dwell was copied wrong.' });
const changing = (id: string, version: number | null, as: Person = author, more: object = {}) =>
  call(change, {
    ...{ method: 'PUT', as, params: { id } },
    body: { title: 'Changed', standard: 'ASTM E1417', content, ...more },
    headers: version === null ? {} : { 'if-match': `"${String(version)}"` },
  });
const state = async (id: string) =>
  (await selectOne<{ state: string }>(reading(), 'SELECT state FROM technique_issues WHERE id = ?', [id]))?.state;

async function approved(more: object = {}): Promise<Technique> {
  const made = await drafted(more);
  expect((await moving(check, made.id, second)).status).toBe(200);
  expect((await approving(made.id)).status).toBe(200);
  return made;
}

describe('who may', () => {
  it('read: staff and auditors; write: reviewers and administrators; check, approve, withdraw: reviewers', async () => {
    const params = { id: nowhere };
    const statuses = async (as: Person | null) => {
      const by = as ? { as } : {};
      const post = { method: 'POST', body: {}, params, ...by };
      return [
        (await call(list, by)).status,
        (await call(read, { params, ...by })).status,
        (await call(draft, post)).status,
        (await call(change, { ...post, method: 'PUT' })).status,
        (await call(check, post)).status,
        (await call(approve, post)).status,
        (await call(withdraw, post)).status,
        (await call(listProcesses, by)).status,
        (await call(recordProcess, post)).status,
      ];
    };
    expect(await statuses(null)).toEqual(Array(9).fill(401));
    expect(await statuses(floor.customer)).toEqual(Array(9).fill(403));
    expect(await statuses(bench.inspector)).toEqual([200, 404, 403, 403, 403, 403, 403, 200, 403]);
    expect(await statuses(bench.auditor)).toEqual([200, 404, 403, 403, 403, 403, 403, 200, 403]);
    expect(await statuses(floor.administrator)).toEqual([200, 404, 422, 422, 403, 403, 403, 200, 422]);
    expect(await statuses(floor.reviewer)).toEqual([200, 404, 422, 422, 404, 422, 422, 200, 422]);
    expect((await approving(nowhere)).status).toBe(404);
    expect((await withdrawing(nowhere)).status).toBe(404);
    expect((await changing(nowhere, 1)).status).toBe(404);
  });
});

describe('a technique', () => {
  it('goes from draft over a second person to a level 3, and supersedes the issue before', async () => {
    const first = await approved();
    expect([first.issue, first.state, await state(first.id)]).toEqual([1, 'draft', 'approved']);
    const { number } = first;
    const next = await approved({ number });
    expect([next.issue, await state(next.id), await state(first.id)]).toEqual([2, 'approved', 'superseded']);
    const listed = listTechniques.response.parse((await call(list, { as: bench.auditor, query: `?number=${number}` })).json);
    expect(listed.items.map(({ issue, state: now }) => [issue, now])).toEqual([
      [2, 'approved'],
      [1, 'superseded'],
    ]);
    const events = await select<{ kind: string }>(reading(), 'SELECT kind FROM events WHERE subject_id = ? ORDER BY seq', [
      next.id,
    ]);
    expect(events.map(({ kind }) => kind)).toEqual(['technique-drafted', 'technique-checked', 'technique-approved']);
  });

  it('is never checked or approved by who wrote in it', async () => {
    const made = await drafted();
    expect((await moving(check, made.id, author)).problem).toBe('not-permitted');
    // Who changed one word of somebody else's draft has written in it too.
    const changed = await changing(made.id, made.version, levelThree);
    expect(changed.status).toBe(200);
    expect((await moving(check, made.id, levelThree)).problem).toBe('not-permitted');
    expect((await moving(check, made.id, second)).status).toBe(200);
    expect((await approving(made.id, author)).problem).toBe('not-permitted');
    expect((await approving(made.id, levelThree)).problem).toBe('not-permitted');
    expect(await state(made.id)).toBe('checked');
  });

  it('is approved by a level 3 of its method only, with the password', async () => {
    const made = await drafted();
    expect((await approving(made.id)).problem).toBe('state-refused');
    expect((await moving(check, made.id, second)).status).toBe(200);
    const refused = await approving(made.id, second);
    expect([refused.problem, refused.detail]).toEqual(['not-permitted', expect.stringContaining('level 3 in penetrant')]);
    expect((await approving(made.id, levelThree, 'wrong')).problem).toBe('signature-refused');
    await inTransaction(null, (work) =>
      execute(
        work,
        `UPDATE authorisations SET valid_to = DATE(?) - INTERVAL 2 DAY WHERE account_id = ? AND method = 'penetrant'`,
        [work.now.slice(0, 10), levelThree.id],
      ),
    );
    expect((await approving(made.id)).problem).toBe('not-permitted');
    await qualify(levelThree, 'penetrant', '3');
    expect((await approving(made.id)).status).toBe(200);
  });

  it('changes as a draft with the version that was read, and not after', async () => {
    const made = await drafted();
    expect((await changing(made.id, null)).status).toBe(428);
    const answer = await changing(made.id, made.version);
    expect([answer.status, answer.headers.get('etag')]).toEqual([200, `"${String(made.version + 1)}"`]);
    const stale = await changing(made.id, made.version);
    expect([stale.status, stale.problem]).toEqual([412, 'changed-meanwhile']);
    expect((await moving(check, made.id, second)).status).toBe(200);
    expect((await changing(made.id, made.version + 2)).problem).toBe('state-refused');
    await expect(
      inTransaction(null, (work) =>
        execute(work, `UPDATE technique_issues SET content = '{"views":[]}' WHERE id = ?`, [made.id]),
      ),
    ).rejects.toThrow(/never changes/);
  });

  it('tells every fault at once before it is checked', async () => {
    const faulty = {
      ...content,
      parameters: [
        { name: 'Brush', value: 'soft' },
        { name: 'Brush', value: 'hard' },
      ],
      windows: [
        { title: 'Rinse', unit: 'kPa', lower: '300', upper: '200' },
        { title: 'Dryer', unit: 'hot' },
      ],
      views: ['a', 'a'],
    };
    const made = await drafted({ content: faulty });
    const paths = [
      'content.parameters',
      'content.parameters.1.name',
      'content.windows.0.upper',
      'content.windows.1.unit',
      'content.windows.1.lower',
      'content.views.1',
    ];
    expect(made.faults.map(({ path }) => path)).toEqual(paths);
    const refused = await moving(check, made.id, second);
    expect([refused.problem, refused.errors.map(({ path }) => path)]).toEqual(['invalid-input', paths]);
  });

  it('is refused as a second draft, under another method, and with fields by their names', async () => {
    const { number } = await drafted();
    expect((await drafting({ number })).problem).toBe('state-refused');
    const done = await approved();
    expect((await drafting({ number: done.number, method: 'radiography' })).errors[0]?.path).toBe('method');
    const refused = await drafting({
      number: 'x y',
      standard: '',
      content: { ...content, windows: [{ title: 'W', unit: 'mm', lower: '1e3' }] },
    });
    expect(refused.errors.map(({ path }) => path).sort()).toEqual(['content.windows.0.lower', 'number', 'standard']);
  });

  it('drafted twice at once gets one issue', async () => {
    const { number } = await approved();
    const answers = await Promise.all([drafting({ number }), drafting({ number }), drafting({ number })]);
    expect(answers.map(({ status }) => status).sort()).toEqual([201, 409, 409]);
  });

  it('stored by an earlier seed with nothing in it stays readable', async () => {
    const row = await selectOne<{ id: string }>(reading(), 'SELECT id FROM technique_issues WHERE number = ?', [
      bench.plan.technique,
    ]);
    const answer = await call(read, { as: bench.auditor, params: { id: row?.id ?? '' } });
    expect([answer.status, answer.json]).toMatchObject([
      200,
      { content: { parameters: [], windows: [], checks: [], indicator: null } },
    ]);
  });

  it('withdrawn for error holds what was inspected by it, until a level 3 finds no effect', async () => {
    await freshPlan();
    const part = await rawPart();
    await signWall(part.id);
    const row = await selectOne<{ id: string }>(reading(), 'SELECT id FROM technique_issues WHERE number = ?', [
      bench.plan.technique,
    ]);
    const answer = await withdrawing(row?.id ?? '');
    const { suspects, state: now } = withdrawTechnique.response.parse(answer.json);
    expect([answer.status, now, (await partState(part.id))?.held]).toEqual([200, 'withdrawn-for-error', 1]);
    const found = await listNow(suspects?.id ?? '');
    expect([found.cause, found.technique, found.items.map((one) => one.part.serial)]).toEqual([
      'technique',
      bench.plan.technique,
      [part.serial],
    ]);
    expect((await closing(found, found.groups[0]?.id ?? '', 'no-effect', levelThree)).status).toBe(200);
    expect((await partState(part.id))?.held).toBe(0);
    expect((await withdrawing(row?.id ?? '')).problem).toBe('state-refused');
    await freshPlan();
  });
});

describe('a measurement process', () => {
  const recording = (more: object = {}, as: Person = floor.administrator) =>
    call(recordProcess, {
      ...{ method: 'POST', as },
      body: {
        ...{
          technique: bench.plan.technique,
          characteristic: '12',
          gaugeKind: 'ut-gauge',
          expanded: '0.010',
          k: '2',
          unit: 'mm',
        },
        ...{ basis: 'budget UB-31: block, velocity, repeatability', validFrom: '2026-01-01', ...more },
      },
    });

  it('is kept as typed, listed by technique, and is an event', async () => {
    const answer = await recording({ validFrom: await dayOn(1) });
    const query = `?technique=${bench.plan.technique}`;
    const { items } = listMeasurementProcesses.response.parse((await call(listProcesses, { as: bench.auditor, query })).json);
    expect([answer.status, items[0]]).toMatchObject([201, { expanded: '0.010', k: '2', characteristic: '12' }]);
    expect(items.length).toBe(3);
    const events = await select<{ kind: string }>(reading(), 'SELECT kind FROM events WHERE subject_id = ?', [items[0]?.id]);
    expect(events).toEqual([{ kind: 'measurement-process-recorded' }]);
    expect((await recording({ validFrom: await dayOn(1) })).problem).toBe('already-exists');
  });

  it('is refused with the field that is wrong', async () => {
    const paths = async (more: object) => (await recording(more)).errors.map(({ path }) => path);
    expect(await paths({ technique: 'XX-1' })).toEqual(['technique']);
    expect(await paths({ expanded: '0.000' })).toEqual(['expanded']);
    expect(await paths({ k: '-2' })).toEqual(['k']);
    expect(await paths({ unit: 'ell' })).toEqual(['unit']);
    expect(await paths({ basis: 'so', expanded: '1e-3' })).toEqual(['expanded', 'basis']);
  });
});

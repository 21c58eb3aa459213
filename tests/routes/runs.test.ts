import { beforeAll, describe, expect, it } from 'vitest';
import { GET as readBasketRoute } from '@/app/api/baskets/[id]/route';
import { POST as open } from '@/app/api/baskets/route';
import { POST as addPart } from '@/app/api/runs/[id]/parts/route';
import { GET as read } from '@/app/api/runs/[id]/route';
import { POST as changeValues } from '@/app/api/runs/[id]/values/route';
import { GET as list, POST as enter } from '@/app/api/runs/route';
import { GET as offer } from '@/app/api/runs/set-up/route';
import { newId } from '@/db/identity';
import { databaseNow, execute, inTransaction, reading, select, selectOne, sqlTimeOf } from '@/db/work';
import { basket, signBasket } from '@/services/contracts/baskets';
import { changeRunValues, listRuns, run, setUpRun, type RunAnswer } from '@/services/contracts/runs';
import { valuesUnderPlan } from '@/services/contracts/plan-windows';
import {
  freshParts,
  openedBasket,
  partNumberOf,
  planForBaskets,
  prepareShop,
  scanInto,
  setUp,
  shop,
  signWith,
  type ScannedPart,
} from './basket-setting';
import { call, setting, type Answer, type Setting } from './inspection-setting';

const technique = `FP-${newId().slice(-10)}`;
let plan: Setting;
let partNumber: string;

/** A technique whose window for the dwell is narrower than the plan's 20 to 60 min. */
async function addTechnique(number: string, windows: object[]): Promise<void> {
  await inTransaction(null, async (work) => {
    await execute(
      work,
      `INSERT INTO technique_issues (id, number, issue, method, title, standard, state, content, author, created_at) VALUES (?, ?, 1, 'penetrant', 'Penetrant, water washable', 'ASTM E1417', 'approved', ?, ?, ?)`,
      [newId(), number, JSON.stringify({ windows }), shop.inspector.id, sqlTimeOf(work.now)],
    );
  });
}

beforeAll(async () => {
  await prepareShop();
  await addTechnique(technique, [{ title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '40' }]);
  plan = await planForBaskets(await setting(shop.inspector), shop.inspector, { technique });
  partNumber = await partNumberOf(plan);
});

const dwell = (value: string) => [{ number: 'W1', value, unit: 'min' }];

async function entering(value: string | null, more: Record<string, unknown> = {}): Promise<Answer> {
  return call(enter, {
    method: 'POST',
    as: shop.inspector,
    body: {
      kind: 'penetrant-load',
      technique,
      line: 'line 1',
      process: value === null ? [] : dwell(value),
      acts: [{ kind: 'processed', person: shop.other.id, at: await databaseNow() }],
      ...more,
    },
  });
}

async function entered(value: string | null, more: Record<string, unknown> = {}): Promise<RunAnswer> {
  const answer = await entering(value, more);
  expect([answer.status, answer.detail]).toEqual([201, '']);
  return run.parse(answer.json);
}

/** A signed basket whose process values are the run's. */
async function signedOn(runId: string, count: number): Promise<{ id: string; parts: ScannedPart[]; answer: Answer }> {
  const { id } = await openedBasket(count, { partNumber, run: runId, process: [] });
  const parts = await freshParts(count, plan);
  for (const { serial } of parts) expect((await scanInto(id, serial)).status).toBe(201);
  return { id, parts, answer: await signWith(id, count) };
}

function changing(id: string, value: string, as = shop.inspector): Promise<Answer> {
  return call(changeValues, {
    method: 'POST',
    as,
    params: { id },
    body: { process: dwell(value), reason: 'the recorder was misread' },
  });
}

async function stateOf(partId: string): Promise<{ state: string; reason: string | null } | undefined> {
  return selectOne(reading(), 'SELECT state, reason FROM part_requirements WHERE part_id = ? AND position = 1', [partId]);
}

describe('entering a run', () => {
  it('offers the windows of the technique, people and equipment', async () => {
    const offered = setUpRun.response.parse((await call(offer, { as: shop.inspector, query: `?technique=${technique}` })).json);
    expect(offered.windows).toEqual([{ number: 'W1', title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '40' }]);
    expect(offered.people.some(({ id }) => id === shop.other.id)).toBe(true);
    expect((await call(offer, { as: shop.inspector, query: '?technique=NO-SUCH' })).status).toBe(404);
  });

  it('takes the plan’s windows where the technique names none', async () => {
    const bare = `FP-${newId().slice(-10)}`;
    await addTechnique(bare, []);
    await planForBaskets(await setting(shop.inspector), shop.inspector, { technique: bare });
    const offered = setUpRun.response.parse((await call(offer, { as: shop.inspector, query: `?technique=${bare}` })).json);
    expect(offered.windows).toEqual([{ number: 'P3', title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '60' }]);
  });

  it.each([
    ['20', 'good'],
    ['40', 'good'],
    ['40.0', 'good'],
    ['40.1', 'void'],
    ['19.99', 'void'],
    [null, 'incomplete'],
  ] as const)('judges a dwell of %s min: %s', async (value, standing) => {
    expect((await entered(value)).standing).toBe(standing);
  });

  it('refuses strangers and readers, and names every wrong field at once', async () => {
    expect((await call(enter, { method: 'POST', body: {} })).status).toBe(401);
    expect((await call(enter, { method: 'POST', as: shop.auditor, body: {} })).status).toBe(403);
    const wrong = await entering('25', {
      acts: [{ kind: 'processed', person: newId(), at: 'yesterday', equipment: [newId()] }],
      parts: [{ part: newId() }],
    });
    expect(wrong.errors.map(({ path }) => path)).toEqual(['acts.0.person', 'acts.0.at', 'acts.0.equipment.0', 'parts.0.part']);
    const value = await entering('a while');
    expect([value.status, value.errors[0]?.path]).toEqual([422, 'process.0.value']);
    const unknown = await entering('25', { technique: 'NO-SUCH' });
    expect(unknown.errors[0]?.path).toBe('technique');
    const nobody = await entering('25', { acts: [] });
    expect(nobody.errors[0]?.path).toBe('acts');
  });

  it('is read, listed newest first, and told to the journal and to its parts', async () => {
    const [part] = await freshParts(1, plan);
    const made = await entered('25', { parts: [{ part: part?.id, place: 'tray 2' }] });
    expect(made.members).toEqual([{ part: part?.id, serial: part?.serial, partNumber, place: 'tray 2' }]);
    expect(made.acts[0]?.name).toBe(shop.other.name);
    const listed = listRuns.response.parse((await call(list, { as: shop.auditor, query: '?limit=1' })).json);
    expect([listed.items[0]?.number, listed.next !== null]).toEqual([made.number, true]);
    const events = await select<{ seq: number }>(
      reading(),
      `SELECT event_seq AS seq FROM event_subjects WHERE subject_kind = 'part' AND subject_id = ?`,
      [part?.id],
    );
    expect(events).toHaveLength(1);
    expect((await call(read, { as: shop.inspector, params: { id: newId() } })).status).toBe(404);
  });

  it('takes parts by scan, each once', async () => {
    const [made, [part]] = [await entered('25'), await freshParts(1, plan)];
    const add = () =>
      call(addPart, { method: 'POST', as: shop.inspector, params: { id: made.id }, body: { scan: part?.serial } });
    const answers = await Promise.all([add(), add(), add()]);
    expect(answers.map(({ status }) => status).sort()).toEqual([200, 200, 201]);
    expect(run.parse((await add()).json).members).toHaveLength(1);
    const unknown = await call(addPart, {
      method: 'POST',
      as: shop.inspector,
      params: { id: made.id },
      body: { scan: 'NOBODY' },
    });
    expect([unknown.status, unknown.errors[0]?.path]).toEqual([422, 'scan']);
  });
});

describe('a basket on a run', () => {
  it('takes its process values from the run, under the plan’s own numbers', async () => {
    const made = await entered('25');
    const { id, answer } = await signedOn(made.id, 2);
    expect([answer.status, answer.detail]).toEqual([201, '']);
    const signed = signBasket.response.parse(answer.json);
    expect(signed.inspections.map(({ verdict }) => verdict)).toEqual(['accept', 'accept']);
    const shown = basket.parse((await call(readBasketRoute, { as: shop.inspector, params: { id } })).json);
    expect(shown.process).toEqual([{ number: 'P3', value: '25', unit: 'min' }]);
    const leaning = run.parse((await call(read, { as: shop.inspector, params: { id: made.id } })).json).inspections;
    expect(leaning.map(({ number }) => number).sort()).toEqual(signed.inspections.map(({ number }) => number).sort());
  });

  it('is not opened on a void run, nor on one of another technique', async () => {
    const made = await entered('90');
    const answer = await call(open, { method: 'POST', as: shop.inspector, body: await setUp(2, { partNumber, run: made.id }) });
    expect([answer.status, answer.errors[0]?.path]).toEqual([422, 'run']);
    const good = await entered('25');
    const other = await call(open, { method: 'POST', as: shop.inspector, body: await setUp(2, { run: good.id }) });
    expect(other.errors[0]?.path).toBe('run');
  });

  it('waits for the values of the run, and follows what is entered after the scans', async () => {
    const made = await entered(null);
    const { id, parts, answer } = await signedOn(made.id, 2);
    expect(answer.errors.map(({ path }) => path).sort()).toEqual(
      parts.map(({ serial }) => `${serial}.missing.process.P3`).sort(),
    );
    expect((await changing(made.id, '33')).status).toBe(200);
    expect((await signWith(id, 2)).status).toBe(201);
  });

  it('cannot be accepted when the run became void after the scans: by the technique refused, by the plan signed as void', async () => {
    const made = await entered('25');
    const { id } = await openedBasket(1, { partNumber, run: made.id, process: [] });
    const [part] = await freshParts(1, plan);
    await scanInto(id, part?.serial ?? '');
    await changing(made.id, '50');
    const narrow = await signWith(id, 1);
    expect([narrow.status, narrow.errors[0]?.message]).toEqual([422, expect.stringContaining('is void')]);
    await changing(made.id, '90');
    const wide = signBasket.response.parse((await signWith(id, 1)).json);
    expect(wide.inspections[0]?.verdict).toBe('not-evaluable');
    expect((await stateOf(part?.id ?? ''))?.state).toBe('to-be-repeated');
  });
});

describe('a value found outside its window afterwards', () => {
  it('voids every inspection that leaned on the run; its parts are to be repeated, the records stay', async () => {
    const made = await entered('25');
    const { parts, answer } = await signedOn(made.id, 3);
    const signed = signBasket.response.parse(answer.json);
    const changed = changeRunValues.response.parse((await changing(made.id, '12')).json);
    expect(changed.run.standing).toBe('void');
    expect(changed.voided.map(({ number }) => number).sort()).toEqual(signed.inspections.map(({ number }) => number).sort());
    for (const { id } of parts) {
      const row = await stateOf(id);
      expect([row?.state, row?.reason?.startsWith(`void: run ${made.number}`)]).toEqual(['to-be-repeated', true]);
    }
    const ends = await select<{ kind: string }>(reading(), 'SELECT kind FROM inspection_ends WHERE inspection_id IN (?)', [
      signed.inspections.map(({ inspection }) => inspection),
    ]);
    expect(ends).toEqual(Array(3).fill({ kind: 'voided' }));
    const again = changeRunValues.response.parse((await changing(made.id, '11')).json);
    expect(again.voided).toEqual([]);
    expect(again.run.values.map(({ process }) => process[0]?.value)).toEqual(['11', '12', '25']);
    const { answer: repeated } = await (async () => {
      const good = await entered('25');
      const { id } = await openedBasket(1, { partNumber, run: good.id, process: [] });
      await scanInto(id, parts[0]?.serial ?? '');
      return { answer: await signWith(id, 1) };
    })();
    expect(repeated.status).toBe(201);
    expect((await stateOf(parts[0]?.id ?? ''))?.state).toBe('met');
  });

  it('holds what was released already, and lists it for recall', async () => {
    const made = await entered('25');
    const { parts } = await signedOn(made.id, 2);
    await inTransaction(null, (work) => execute(work, `UPDATE parts SET state = 'released' WHERE id = ?`, [parts[0]?.id]));
    const changed = changeRunValues.response.parse((await changing(made.id, '12')).json);
    expect(changed.recall.map(({ part }) => part)).toEqual([parts[0]?.id]);
    const held = await select<{ held: number }>(reading(), 'SELECT held FROM parts WHERE id IN (?) ORDER BY held', [
      parts.map(({ id }) => id),
    ]);
    expect(held.map((row) => row.held)).toEqual([0, 1]);
  });

  it('and a signature at the same instant are never both unseen', async () => {
    for (let round = 0; round < 8; round += 1) {
      const made = await entered('25');
      const { id } = await openedBasket(4, { partNumber, run: made.id, process: [] });
      const parts = await freshParts(4, plan);
      for (const { serial } of parts) await scanInto(id, serial);
      // The change meets the signature at another moment in each round.
      const later = new Promise((done) => setTimeout(done, round * 15));
      const [signed, changed] = await Promise.all([signWith(id, 4), later.then(() => changing(made.id, '12'))]);
      const standing = (await stateOf(parts[0]?.id ?? ''))?.state;
      if (changed.status === 200) expect([standing, signed.status]).not.toEqual(['met', 201]);
      else expect([changed.status, standing]).toEqual([409, 'met']);
    }
  });

  it('needs a reason and the right to inspect', async () => {
    const made = await entered('25');
    expect((await changing(made.id, '30', shop.auditor)).status).toBe(403);
    const answer = await call(changeValues, {
      method: 'POST',
      as: shop.inspector,
      params: { id: made.id },
      body: { process: dwell('30'), reason: '' },
    });
    expect(answer.errors[0]?.path).toBe('reason');
    const nowhere = await changing(newId(), '30');
    expect(nowhere.status).toBe(404);
  });
});

describe('values under another plan’s numbers', () => {
  const row = (number: string, title: string, unit: string) => ({ number, title, unit, lower: null, upper: null });

  it('are found by title and unit, never by number: P3 of one plan is the dryer of another', () => {
    const runRows = [row('P3', 'Penetrant dwell', 'min'), row('P4', 'Dryer temperature', '°C')];
    const values = [
      { number: 'P3', value: '25', unit: 'min' },
      { number: 'P4', value: '65', unit: '°C' },
    ];
    const planRows = [
      row('P1', 'penetrant dwell', 'min'),
      row('P3', 'Dryer temperature', '°C'),
      row('P9', 'Rinse pressure', 'kPa'),
    ];
    expect(valuesUnderPlan(runRows, values, planRows)).toEqual([
      { number: 'P1', value: '25', unit: 'min' },
      { number: 'P3', value: '65', unit: '°C' },
    ]);
  });
});

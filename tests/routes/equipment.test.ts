import { afterAll, beforeAll, describe, expect, it } from 'vitest';
import { POST as calibrate } from '@/app/api/equipment/[id]/calibrations/route';
import { POST as retire } from '@/app/api/equipment/[id]/retirement/route';
import { GET as read } from '@/app/api/equipment/[id]/route';
import { GET as list, POST as add } from '@/app/api/equipment/route';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, select } from '@/db/work';
import { addEquipment, listEquipment, readEquipment, type Equipment } from '@/services/contracts/equipment';
import { call, gauge, type Person } from './inspection-setting';
import { floor, prepareFloor, rawPart } from './release-setting';
import { bench, opened, saved, signing, wallContent } from './signing-setting';
import { calibrated, calibrating, dayOn } from './suspects-setting';

const nowhere = '01900000-0000-7000-8000-000000000000';

beforeAll(prepareFloor);
afterAll(closeDatabase);

const numberOf = () => `G/${newId().slice(-10)}`;
const adding = (more: object = {}, as: Person | null = floor.administrator) =>
  call(add, {
    ...{
      method: 'POST',
      body: { number: numberOf(), title: 'Gauge', kind: 'ut-gauge', method: 'ultrasonic-thickness', ...more },
    },
    ...(as ? { as } : {}),
  });
const added = async (more: object = {}) => addEquipment.response.parse((await adding(more)).json);
const shown = async (id: string): Promise<Equipment> =>
  readEquipment.response.parse((await call(read, { as: bench.auditor, params: { id } })).json);
const good = { asFound: 'good' };

/** Reasons about equipment for which a wall thickness measured with it is refused its signature. */
async function reasons(equipment: string): Promise<string[]> {
  const draft = await saved(
    await opened('wall', (await rawPart()).id),
    await wallContent('0.90', '0.90', { equipment: [equipment] }),
  );
  return (await signing(draft.id)).errors.filter(({ path }) => path.includes('equipment')).map(({ message }) => message);
}

describe('who may', () => {
  it('read: staff and auditors; keep: reviewers and administrators', async () => {
    const params = { id: nowhere };
    const statuses = async (as: Person | null) => {
      const by = as ? { as } : {};
      const change = { method: 'POST', body: {}, params, ...by };
      return [
        (await call(list, by)).status,
        (await call(read, { params, ...by })).status,
        (await call(add, change)).status,
        (await call(calibrate, change)).status,
        (await call(retire, change)).status,
      ];
    };
    expect(await statuses(null)).toEqual([401, 401, 401, 401, 401]);
    expect(await statuses(floor.customer)).toEqual([403, 403, 403, 403, 403]);
    expect(await statuses(bench.inspector)).toEqual([200, 404, 403, 403, 403]);
    expect(await statuses(bench.auditor)).toEqual([200, 404, 403, 403, 403]);
    expect(await statuses(floor.reviewer)).toEqual([200, 404, 422, 422, 422]);
    expect(await statuses(floor.administrator)).toEqual([200, 404, 422, 422, 422]);
    expect((await calibrating(nowhere, good)).status).toBe(404);
    expect((await call(retire, { method: 'POST', as: floor.reviewer, params, body: { reason: 'Worn out.' } })).status).toBe(404);
  });
});

describe('equipment', () => {
  it('counts once a calibration is on record', async () => {
    const { id, state } = await added();
    expect([state, await reasons(id)]).toEqual(['uncalibrated', [expect.stringContaining('has no calibration on')]]);
    const answer = await calibrating(id, { ...good, certificate: 'K-1' });
    expect([answer.status, calibrated(answer).equipment.state, await reasons(id)]).toEqual([201, 'valid', []]);
    const events = await select<{ kind: string }>(reading(), 'SELECT kind FROM events WHERE subject_id = ? ORDER BY seq', [id]);
    expect(events.map(({ kind }) => kind)).toEqual(['equipment-added', 'calibration-recorded']);
  });

  it('is refused a number twice, and fields by their names', async () => {
    const number = numberOf();
    await added({ number });
    expect((await adding({ number })).problem).toBe('already-exists');
    const refused = await adding({ number: 'a b', title: ' ', kind: 'ut-gauge', method: 'guessing', extra: 1 });
    expect(refused.errors.map(({ path }) => path).sort()).toEqual(['extra', 'method', 'number', 'title']);
  });

  it('does not count once its calibration has lapsed, and says so from 30 days before', async () => {
    const { id } = await added();
    const states: string[] = [];
    for (const days of [200, 31, 30, 1]) {
      const answer = await calibrating(id, { ...good, dueOn: await dayOn(days) });
      states.push(calibrated(answer).equipment.state);
    }
    expect(states).toEqual(['valid', 'valid', 'due-soon', 'due-soon']);
    const lapsed = await gauge('ultrasonic-thickness', 'ut-gauge', -1);
    expect([(await shown(lapsed)).state, await reasons(lapsed)]).toEqual([
      'lapsed',
      [expect.stringContaining('was due for calibration on')],
    ]);
  });

  it('left failed does not count, and counts again with the next good one', async () => {
    const { id } = await added();
    expect(calibrated(await calibrating(id, { asFound: 'not-taken', asLeft: 'failed' })).equipment.state).toBe('failed');
    expect(await reasons(id)).toEqual([expect.stringContaining('was left failed')]);
    expect(calibrated(await calibrating(id, good)).equipment.state).toBe('valid');
    expect(await reasons(id)).toEqual([]);
  });

  it('with several functions counts as little as the one that counts least', async () => {
    const { id } = await added();
    const range = { rangeLower: '0.5', rangeUpper: '5', rangeUnit: 'mm' };
    await calibrating(id, { ...good, function: 'thickness', ...range });
    const failed = await calibrating(id, { ...good, asLeft: 'failed', function: 'velocity' });
    expect(calibrated(failed).equipment.state).toBe('failed');
    expect(await reasons(id)).toEqual([expect.stringContaining('was left failed')]);
    const { calibrations } = await shown(id);
    expect(calibrations.map((one) => [one.function, one.rangeLower, one.rangeUpper, one.rangeUnit, one.current])).toEqual([
      ['velocity', null, null, null, true],
      ['thickness', '0.5', '5', 'mm', true],
    ]);
    // The whole of it calibrated stands in the place of both.
    expect(calibrated(await calibrating(id, good)).equipment.state).toBe('valid');
    expect((await shown(id)).calibrations.filter(({ current }) => current).map((one) => one.function)).toEqual(['all']);
  });

  it('retired takes no calibration and leaves the bench', async () => {
    const { id, number } = await added();
    await calibrating(id, good);
    const params = { id };
    const answer = await call(retire, { method: 'POST', as: floor.reviewer, params, body: { reason: 'Display broken.' } });
    expect([answer.status, (await shown(id)).retired]).toMatchObject([
      200,
      { by: { id: floor.reviewer.id }, reason: 'Display broken.' },
    ]);
    expect((await calibrating(id, good)).problem).toBe('state-refused');
    expect((await call(retire, { method: 'POST', as: floor.reviewer, params, body: { reason: 'Again so.' } })).problem).toBe(
      'state-refused',
    );
    const listed = listEquipment.response.parse(
      (await call(list, { as: bench.auditor, query: '?retired=false&limit=200' })).json,
    );
    expect(listed.items.some((one) => one.number === number)).toBe(false);
  });
});

describe('a calibration', () => {
  it('is refused with the field that is wrong', async () => {
    const { id } = await added();
    const paths = async (more: object) => (await calibrating(id, { ...good, ...more })).errors.map(({ path }) => path);
    expect(await paths({ calibratedOn: await dayOn(1) })).toEqual(['calibratedOn']);
    expect(await paths({ dueOn: await dayOn(0) })).toEqual(['dueOn']);
    expect(await paths({ rangeLower: '5', rangeUpper: '1', rangeUnit: 'mm' })).toEqual(['rangeUpper']);
    expect(await paths({ bias: '0.02' })).toEqual(['rangeUnit']);
    expect(await paths({ bias: '0,02', rangeUnit: 'mm' })).toEqual(['bias']);
    expect(await paths({ rangeUnit: 'furlong' })).toEqual(['rangeUnit']);
    expect(await paths({ asFound: 'maybe' })).toEqual(['asFound']);
    await calibrating(id, good);
    expect(await paths({ calibratedOn: await dayOn(-3) })).toEqual(['calibratedOn']);
  });

  it('is never changed or taken away', async () => {
    const { id } = await added();
    const { calibration } = calibrated(await calibrating(id, good));
    await expect(
      inTransaction(null, (work) => execute(work, `UPDATE calibrations SET as_found = 'good' WHERE id = ?`, [calibration])),
    ).rejects.toThrow(/denied|append-only/);
    await expect(
      inTransaction(null, (work) => execute(work, 'DELETE FROM calibrations WHERE id = ?', [calibration])),
    ).rejects.toThrow(/denied|append-only/);
  });
});

describe('the list', () => {
  it('begins with what does not count or lapses soonest, page by page, each once', async () => {
    const method = 'airflow';
    const make = async (dueInDays: number) => gauge(method, 'rig', dueInDays);
    const ids = [await make(90), await make(-4), await make(10), (await added({ method, kind: 'rig' })).id];
    const [late, lapsed, soon, never] = ids;
    const seen: string[] = [];
    let after: string | null = '';
    for (let turn = 0; after !== null && turn < 500; turn += 1) {
      const query: string = `?method=${method}&limit=2&after=${after}`;
      const page = listEquipment.response.parse((await call(list, { as: bench.inspector, query })).json);
      seen.push(...page.items.map(({ id }) => id));
      after = page.next;
    }
    expect(new Set(seen).size).toBe(seen.length);
    expect(seen.filter((id) => ids.includes(id))).toEqual([never, lapsed, soon, late]);
  });

  it('finds by how the number begins, and takes a sign of the pattern language for itself', async () => {
    const tag = newId().slice(-8);
    const made = await added({ number: `A${tag}-1` });
    const numbers = async (number: string) =>
      listEquipment.response
        .parse((await call(list, { as: bench.inspector, query: `?number=${encodeURIComponent(number)}` })).json)
        .items.map(({ id }) => id);
    expect(await numbers(`A${tag}`)).toEqual([made.id]);
    expect(await numbers(`A${tag}-2`)).toEqual([]);
    expect(await numbers(`A${tag.slice(0, -1)}_`)).toEqual([]);
    expect(await numbers('%')).toEqual([]);
  });
});

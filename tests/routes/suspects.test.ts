import { afterAll, beforeAll, beforeEach, describe, expect, it } from 'vitest';
import { POST as close } from '@/app/api/suspects/[id]/groups/[group]/closing/route';
import { GET as readList } from '@/app/api/suspects/[id]/route';
import { GET as lists } from '@/app/api/suspects/route';
import { POST as lift } from '@/app/api/holds/[id]/lift/route';
import { POST as place } from '@/app/api/holds/route';
import { GET as readPart } from '@/app/api/parts/[id]/route';
import { GET as readShipment } from '@/app/api/shipments/[number]/route';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { databaseNow, execute, inTransaction, reading, select } from '@/db/work';
import { hold as holdShape, part as partShape } from '@/services/contracts/parts';
import { shipment as shipmentShape } from '@/services/contracts/shipments';
import { listSuspects, suspectList } from '@/services/contracts/suspects';
import { call, gauge, qualify, signingPassword, type Person } from './inspection-setting';
import {
  disposing,
  dropJob,
  finishedPart,
  floor,
  freshPlan,
  partState,
  prepareFloor,
  rawPart,
  released,
  releasing,
  shipmentOf,
  signWall,
} from './release-setting';
import { bench, opened, requirementStates, saved, signing, wallContent } from './signing-setting';
import { calibrated, calibrating, checked, checking, closing, dayOn, listNow } from './suspects-setting';

const nowhere = '01900000-0000-7000-8000-000000000000';

beforeAll(async () => {
  await prepareFloor();
  await qualify(floor.reviewer, 'ultrasonic-thickness', '3');
  await qualify(floor.reviewer, 'penetrant', '3');
});
// Every trial has its own gauge and its own line.
beforeEach(async () => {
  await freshPlan();
  bench.equipment = await gauge('ultrasonic-thickness', 'ut-gauge');
  bench.lamp = await gauge('penetrant', 'uv-a-lamp');
});
afterAll(closeDatabase);

const held = async (id: string) => (await partState(id))?.held;

/** Codes of the gates that stand against a serial, as shown to the signatory. */
async function gates(number: string, serial: string): Promise<string[]> {
  const shown = shipmentShape.parse((await call(readShipment, { as: floor.signatory, params: { number } })).json);
  return (shown.parts.find(({ part }) => part.serial === serial)?.reasons ?? []).map(
    ({ gate, code }) => `${String(gate)} ${code}`,
  );
}

/** What a penetrant inspection is refused its signature for on account of its line, one reason for each act. */
async function lineReasons(partId: string, done?: string): Promise<string[]> {
  const at = done ?? (await databaseNow());
  const person = bench.inspector.id;
  const draft = await saved(await opened('fpi', partId), {
    acts: [
      { kind: 'processed', person, at },
      { kind: 'evaluated', person, at, equipment: [bench.lamp] },
    ],
  });
  return (await signing(draft.id)).errors.filter(({ path }) => path.includes('.checks.')).map(({ message }) => message);
}

describe('who may', () => {
  it('read lists: staff and auditors; close a group: reviewers', async () => {
    const params = { id: nowhere, group: nowhere };
    const statuses = async (as: Person | null) => {
      const by = as ? { as } : {};
      return [
        (await call(lists, by)).status,
        (await call(readList, { params, ...by })).status,
        (await call(close, { method: 'POST', params, body: {}, ...by })).status,
      ];
    };
    expect(await statuses(null)).toEqual([401, 401, 401]);
    expect(await statuses(bench.inspector)).toEqual([200, 404, 403]);
    expect(await statuses(bench.auditor)).toEqual([200, 404, 403]);
    expect(await statuses(floor.administrator)).toEqual([200, 404, 403]);
    expect(await statuses(floor.customer)).toEqual([403, 403, 403]);
    expect(await statuses(floor.reviewer)).toEqual([200, 404, 422]);
  });
});

describe('equipment found out of tolerance', () => {
  it('holds the three parts that rest on it and lists the one that has gone, with its certificate', async () => {
    const gone = await finishedPart();
    const { certificate, job } = await released([gone]);
    await dropJob(job);
    const here = [await finishedPart(), await finishedPart(), await finishedPart()];
    const other = await gauge('ultrasonic-thickness', 'ut-gauge');
    const untouched = await rawPart();
    const draft = await saved(await opened('wall', untouched.id), await wallContent('0.90', '0.90', { equipment: [other] }));
    expect((await signing(draft.id)).status).toBe(201);

    const answer = await calibrating(bench.equipment, { bias: '0.030', rangeUnit: 'mm', function: 'thickness' });
    expect([answer.status, answer.errors]).toEqual([201, []]);
    const { suspects: list } = calibrated(answer);
    if (!list) throw new Error('no list was drawn');
    expect([list.cause, list.state, list.inspections, list.held, list.recall]).toEqual(['calibration', 'open', 4, 3, 1]);
    expect(list.reason).toContain('reading 0.030 mm wrong');
    // Shipped ones first, each with what it went out with.
    expect(list.items.map(({ part }) => part.serial)).toEqual([gone.serial, ...here.map(({ serial }) => serial).sort()]);
    expect(list.items.map(({ gone: away, rests }) => [away, rests])).toEqual([[true, true], ...here.map(() => [false, true])]);
    expect(list.items[0]?.certificates).toEqual([{ number: certificate, customer: 'Kestrel Turbines' }]);
    expect(list.groups.map(({ operation, gone: away, parts, state }) => [operation, away, parts, state])).toEqual([
      ['40', true, 1, 'open'],
      ['40', false, 3, 'open'],
    ]);
    const paged: string[] = [];
    for (let after: string | null = ''; after !== null;) {
      const query: string = `?limit=1&after=${after}`;
      const page = suspectList.parse((await call(readList, { as: bench.auditor, params: { id: list.id }, query })).json);
      paged.push(...page.items.map(({ part }) => part.serial));
      after = page.next;
    }
    expect(paged).toEqual(list.items.map(({ part }) => part.serial));
    for (const { id } of here) expect(await held(id)).toBe(1);
    expect(await held(untouched.id)).toBe(0);
    const shown = partShape.parse((await call(readPart, { as: bench.inspector, params: { id: here[0]?.id ?? '' } })).json);
    expect(shown.holds.map(({ number, target }) => [number, target])).toEqual([[list.number, list.named]]);
    const events = await select<{ kind: string }>(
      reading(),
      `SELECT e.kind FROM events e JOIN event_subjects s ON s.event_seq = e.seq WHERE s.subject_kind = 'part' AND s.subject_id = ? ORDER BY e.seq DESC LIMIT 1`,
      [here[0]?.id],
    );
    expect(events).toEqual([{ kind: 'suspects-opened' }]);
  });

  it('closes the gates until a level 3 says that there was no effect, with a reason', async () => {
    const part = await finishedPart();
    const number = await shipmentOf([part.serial]);
    const list = calibrated(await calibrating(bench.equipment)).suspects;
    if (!list) throw new Error('no list was drawn');
    expect(await gates(number, part.serial)).toEqual(['2 held', '2 suspect']);
    const group = list.groups[0]?.id ?? '';
    expect((await closing(list, group, 'no-effect', floor.reviewer, { password: 'wrong' })).problem).toBe('signature-refused');
    expect((await closing(list, group, 'no-effect', floor.reviewer, { reason: 'none' })).errors[0]?.path).toBe('reason');
    // A reviewer of another method is not enough, and nobody decides about their own inspection.
    expect((await closing(list, group, 'no-effect', floor.second)).problem).toBe('not-permitted');
    const closed = await closing(list, group, 'no-effect');
    expect([closed.status, (await listNow(list.id)).state, await held(part.id)]).toEqual([200, 'closed', 0]);
    expect((await listNow(list.id)).groups[0]?.closing).toMatchObject({
      how: 'no-effect',
      by: { id: floor.reviewer.id },
      reason: 'Measured again on the block: no shift at 1 mm.',
    });
    expect((await closing(list, group, 'no-effect')).problem).toBe('state-refused');
    expect(await gates(number, part.serial)).toEqual([]);
    expect((await releasing(number)).status).toBe(201);
  });

  it('refuses the decision of a reviewer who signed one of the inspections', async () => {
    const part = await rawPart();
    await qualify(floor.second, 'ultrasonic-thickness', '3');
    const draft = await saved(await opened('wall', part.id), await wallContent('0.90', '0.90', { person: floor.second.id }));
    expect((await signing(draft.id, { as: floor.second })).status).toBe(201);
    const list = calibrated(await calibrating(bench.equipment)).suspects;
    if (!list) throw new Error('no list was drawn');
    const refused = await closing(list, list.groups[0]?.id ?? '', 'no-effect', floor.second);
    expect([refused.problem, refused.detail]).toEqual(['not-permitted', expect.stringContaining('You signed')]);
    expect(await held(part.id)).toBe(1);
  });

  it('sends a group to be inspected again, and the part is releasable once that is done', async () => {
    const part = await finishedPart();
    const list = calibrated(await calibrating(bench.equipment)).suspects;
    if (!list) throw new Error('no list was drawn');
    expect((await closing(list, list.groups[0]?.id ?? '', 'repeat')).status).toBe(200);
    expect([await held(part.id), (await requirementStates(part.id)).map(({ state }) => state)]).toEqual([
      0,
      ['to-be-repeated', 'met'],
    ]);
    const number = await shipmentOf([part.serial]);
    expect(await gates(number, part.serial)).toEqual(['1 requirement-not-met', '2 suspect']);
    await signWall(part.id);
    expect(await gates(number, part.serial)).toEqual([]);
  });

  it('does not send away what has gone: that is recalled first', async () => {
    const part = await finishedPart();
    await dropJob((await released([part])).job);
    const list = calibrated(await calibrating(bench.equipment)).suspects;
    if (!list) throw new Error('no list was drawn');
    const refused = await closing(list, list.groups[0]?.id ?? '', 'repeat');
    expect([refused.problem, refused.detail]).toEqual(['state-refused', expect.stringContaining(`${part.serial} is released`)]);
    expect((await listNow(list.id)).state).toBe('open');
  });

  it('keeps a part held while another hold or list still reaches it', async () => {
    const part = await finishedPart();
    const body = { target: { kind: 'part', id: part.id }, reason: 'Dropped at the bench.' };
    const hold = holdShape.parse((await call(place, { method: 'POST', as: bench.inspector, body })).json);
    const list = calibrated(await calibrating(bench.equipment)).suspects;
    if (!list) throw new Error('no list was drawn');
    const lifted = { reason: 'Looked at again.', password: signingPassword };
    expect((await call(lift, { method: 'POST', as: floor.reviewer, params: { id: hold.id }, body: lifted })).status).toBe(200);
    expect(await held(part.id)).toBe(1);
    expect((await closing(list, list.groups[0]?.id ?? '', 'no-effect')).status).toBe(200);
    expect(await held(part.id)).toBe(0);
  });

  it('casts back to the calibration before and no further', async () => {
    const [early, late] = [await finishedPart(), await finishedPart()];
    // `gauge` was calibrated 30 days ago.
    const other = await gauge('ultrasonic-thickness', 'ut-gauge');
    for (const [part, daysAgo] of [
      [early, 40],
      [late, 5],
    ] as const) {
      const day = await dayOn(-daysAgo);
      await inTransaction(null, (work) =>
        execute(
          work,
          `INSERT INTO inspection_leans (inspection_id, kind, target, at, day) SELECT inspection_id, 'equipment', ?, ?, ? FROM part_requirements WHERE part_id = ? AND position = 0`,
          [other, `${day} 09:00:00`, day, part.id],
        ),
      );
    }
    const { suspects: list } = calibrated(await calibrating(other));
    expect(list?.items.map(({ part }) => part.serial)).toEqual([late.serial]);
    expect([await held(early.id), await held(late.id)]).toEqual([0, 1]);
    const [a, b] = [await shipmentOf([early.serial]), await shipmentOf([late.serial])];
    expect([await gates(a, early.serial), await gates(b, late.serial)]).toEqual([[], ['2 held', '2 suspect']]);
  });

  it('lists what was replaced since, and holds nothing for it', async () => {
    const part = await rawPart();
    const { findings } = await signWall(part.id, '0.01');
    expect((await disposing(findings[0]?.number ?? '', { decision: 'rework', repeat: ['wall'] })).status).toBe(201);
    const bad = bench.equipment;
    bench.equipment = await gauge('ultrasonic-thickness', 'ut-gauge');
    await signWall(part.id);
    const { suspects: list } = calibrated(await calibrating(bad));
    expect(list?.items.map(({ part: { serial }, rests }) => [serial, rests])).toEqual([[part.serial, false]]);
    expect([list?.held, await held(part.id)]).toEqual([0, 0]);
  });

  it('refuses a signature on an act that the failure reaches back to', async () => {
    const part = await rawPart();
    const content = await wallContent('0.90', '0.90');
    const draft = await saved(await opened('wall', part.id), content);
    expect((await calibrating(bench.equipment)).status).toBe(201);
    const refused = await signing(draft.id);
    expect([refused.status, refused.errors.map(({ path }) => path)]).toEqual([422, ['acts.1.equipment.0']]);
    expect(refused.errors[0]?.message).toContain('was found out of tolerance');
    // Left good, it counts for an act after it.
    const again = await wallContent('0.90', '0.90');
    await saved({ ...draft, version: draft.version }, again);
    expect((await signing(draft.id)).status).toBe(201);
  });

  it('answers no list where nothing leaned on it', async () => {
    const idle = await gauge('ultrasonic-thickness', 'ut-gauge');
    expect(calibrated(await calibrating(idle)).suspects).toBeNull();
  });

  it('is found among the lists of that equipment, open or closed', async () => {
    await finishedPart();
    const list = calibrated(await calibrating(bench.equipment)).suspects;
    if (!list) throw new Error('no list was drawn');
    const found = async (query: string) =>
      listSuspects.response.parse((await call(lists, { as: bench.auditor, query })).json).items.map(({ id }) => id);
    expect(await found(`?equipment=${bench.equipment}`)).toEqual([list.id]);
    expect(await found(`?equipment=${bench.equipment}&open=false`)).toEqual([]);
    expect(await found(`?equipment=${bench.lamp}`)).toEqual([]);
    expect((await call(lists, { as: bench.auditor, query: '?after=nonsense' })).errors[0]?.path).toBe('after');
    const second = await listNow(list.id, bench.auditor);
    expect(second.number).toBe(list.number);
  });
});

describe('a failed process check', () => {
  it('holds everything on its scope since the last good one, and a good one restarts the line at once', async () => {
    const gone = await finishedPart();
    await dropJob((await released([gone])).job);
    const here = await finishedPart();
    const number = await shipmentOf([here.serial]);
    const { suspects: list } = checked(await checking());
    if (!list) throw new Error('no list was drawn');
    expect([list.cause, list.scope, list.held, list.recall]).toEqual(['check', bench.plan.line, 1, 1]);
    expect(list.items.map(({ part, operation }) => [part.serial, operation])).toEqual([
      [gone.serial, '50'],
      [here.serial, '50'],
    ]);
    expect(await gates(number, here.serial)).toEqual(['2 held', '6 check-failed-since']);

    // The line stands still …
    const waiting = await rawPart();
    await signWall(waiting.id);
    expect(await lineReasons(waiting.id)).toEqual(Array(2).fill(expect.stringContaining('had failed before the act')));
    // … until a good check of the same kind; one of another kind does not hide it.
    expect((await checking({ result: 'good', title: 'Ambient light' })).status).toBe(201);
    const other = await rawPart();
    await signWall(other.id);
    expect(await lineReasons(other.id)).toEqual(Array(2).fill(expect.stringContaining('had failed before the act')));
    expect((await checking({ result: 'good' })).status).toBe(201);
    const next = await finishedPart();
    expect(await gates(await shipmentOf([next.serial]), next.serial)).toEqual([]);
    // What was suspect stays so until somebody decides.
    expect(await gates(number, here.serial)).toEqual(['2 held', '6 check-failed-since']);
    const group = list.groups.find((one) => !one.gone)?.id ?? '';
    expect((await closing(list, group, 'no-effect')).status).toBe(200);
    expect(await gates(number, here.serial)).toEqual([]);
    expect((await listNow(list.id)).state).toBe('open');
  });

  it('refuses a signature on an act that was done before it', async () => {
    const part = await rawPart();
    await signWall(part.id);
    const at = await databaseNow();
    expect((await checking()).status).toBe(201);
    expect((await checking({ result: 'good' })).status).toBe(201);
    expect(await lineReasons(part.id, at)).toEqual(Array(2).fill(expect.stringContaining('failed after the act')));
    expect(await lineReasons((await rawPart()).id)).toEqual([]);
  });

  it('does not list twice what an earlier failed check listed', async () => {
    await finishedPart();
    expect(checked(await checking()).suspects?.items.length).toBe(1);
    expect(checked(await checking()).suspects).toBeNull();
  });

  it('closes the gates too when it was made before an act and entered after its signature', async () => {
    const before = await databaseNow();
    const part = await finishedPart();
    const number = await shipmentOf([part.serial]);
    const answer = await checking({ at: before });
    expect([answer.status, checked(answer).suspects?.items.map((one) => one.part.serial)]).toEqual([201, [part.serial]]);
    expect(await gates(number, part.serial)).toEqual(['2 held', '6 check-failed-since']);
  });

  it('of a bracketing kind casts back over what was done between the two', async () => {
    const key = newId().slice(-8);
    const scope = bench.plan.line;
    expect((await checking({ kind: 'bracketing', result: 'good', title: `Panel ${key}` })).status).toBe(201);
    const part = await finishedPart();
    const number = await shipmentOf([part.serial]);
    expect(await gates(number, part.serial)).toEqual(['6 check-owed']);
    // A good check of another kind on the same scope is not the one that is owed.
    expect((await checking({ result: 'good', title: 'Ambient light' })).status).toBe(201);
    expect(await gates(number, part.serial)).toEqual(['6 check-owed']);
    const failed = checked(await checking({ kind: 'bracketing', title: `Panel ${key}` }));
    expect([failed.suspects?.scope, failed.suspects?.items.length]).toEqual([scope, 1]);
    expect(await gates(number, part.serial)).toEqual(['2 held', '6 check-failed-since']);
  });
});

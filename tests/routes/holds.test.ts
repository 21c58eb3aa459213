import { beforeAll, describe, expect, it } from 'vitest';
import { POST as lift } from '@/app/api/holds/[id]/lift/route';
import { GET as holds, POST as place } from '@/app/api/holds/route';
import { GET as readLot } from '@/app/api/lots/[id]/route';
import { GET as readPart } from '@/app/api/parts/[id]/route';
import { POST as createLot } from '@/app/api/lots/route';
import { POST as createParts } from '@/app/api/parts/route';
import { createParts as partsContract, hold as holdShape, listHolds, lot, lotStory, part } from '@/services/contracts/parts';
import { call, person, signingPassword, type Person } from './inspection-setting';
import { finishedPart, floor, heatLot, prepareFloor, rawPart, released } from './release-setting';
import { bench } from './signing-setting';

let inspector: Person;
const nowhere = '01900000-0000-7000-8000-000000000001';

beforeAll(async () => {
  await prepareFloor();
  inspector = await person('inspector');
});

const placing = (kind: 'part' | 'lot', id: string, as: Person | null = inspector, reason = 'oxygen above its limit') =>
  call(place, { method: 'POST', body: { target: { kind, id }, reason }, ...(as ? { as } : {}) });
const lifting = (id: string, as: Person | null, body: object = {}) =>
  call(lift, {
    method: 'POST',
    params: { id },
    body: { reason: 'analysis repeated', password: signingPassword, ...body },
    ...(as ? { as } : {}),
  });
const placed = async (kind: 'part' | 'lot', id: string) => holdShape.parse((await placing(kind, id)).json);
const isHeld = async (id: string) => part.parse((await call(readPart, { as: inspector, params: { id } })).json).held;

let running = 0;
async function cluster(heat: string): Promise<string> {
  running += 1;
  const number = `C-${heat.slice(-8)}-${String(running)}`;
  const body = { kind: 'cluster', number, quantity: 4, parents: [heat] };
  return lot.parse((await call(createLot, { method: 'POST', as: floor.administrator, body })).json).id;
}

async function givenSerial(clusterId: string, position = '1'): Promise<string> {
  const parts = [{ serial: `S-${clusterId.slice(-10)}-${position}`, cluster: clusterId, position }];
  const answer = await call(createParts, { method: 'POST', as: floor.administrator, body: { plan: bench.plan.planId, parts } });
  return partsContract.response.parse(answer.json).items[0]?.id ?? '';
}

describe('a hold on a heat', () => {
  it('answers what was already released, with its certificate and customer, as the recall list', async () => {
    const heat = await heatLot();
    const gone = await finishedPart(heat);
    const here = await rawPart(heat);
    const { certificate } = await released([gone]);
    const hold = await placed('lot', heat);
    expect(hold.held).toBe(2);
    expect(hold.recall).toEqual([{ part: gone.id, serial: gone.serial, certificate, customer: 'Kestrel Turbines' }]);
    expect([await isHeld(gone.id), await isHeld(here.id)]).toEqual([true, true]);
  });

  it('reaches castings that get their serials while it stands', async () => {
    const heat = await heatLot();
    const clusterId = await cluster(heat);
    const hold = await placed('lot', heat);
    const late = await givenSerial(clusterId);
    expect(await isHeld(late)).toBe(true);
    const told = lotStory.parse((await call(readLot, { as: inspector, params: { id: clusterId } })).json);
    expect([told.held, told.holds.map(({ number }) => number)]).toEqual([true, [hold.number]]);
    expect((await lifting(hold.id, floor.reviewer)).status).toBe(200);
    expect(await isHeld(late)).toBe(false);
  });

  it('and a cut-off at the same instant never leave a free casting, ten times', async () => {
    for (let round = 0; round < 10; round += 1) {
      const heat = await heatLot();
      const clusterId = await cluster(heat);
      const [, id] = await Promise.all([placed('lot', heat), givenSerial(clusterId)]);
      expect([round, await isHeld(id)]).toEqual([round, true]);
    }
  });
});

describe('who may hold and lift', () => {
  it('lets inspectors hold and only reviewers lift, with their own password', async () => {
    const { id } = await rawPart();
    const hold = await placed('part', id);
    expect((await lifting(hold.id, inspector)).status).toBe(403);
    expect((await lifting(hold.id, floor.administrator)).status).toBe(403);
    const wrong = await lifting(hold.id, floor.reviewer, { password: 'not-mine' });
    expect([wrong.status, wrong.problem]).toEqual([403, 'signature-refused']);
    expect(await isHeld(id)).toBe(true);
    const lifted = holdShape.parse((await lifting(hold.id, floor.reviewer)).json);
    expect([lifted.liftedBy, lifted.liftedReason]).toEqual([floor.reviewer.name, 'analysis repeated']);
  });

  it('refuses strangers, customers and auditors', async () => {
    const { id } = await rawPart();
    const hold = await placed('part', id);
    expect((await call(holds, {})).status).toBe(401);
    expect((await placing('part', id, null)).status).toBe(401);
    expect((await lifting(hold.id, null)).status).toBe(401);
    for (const as of [floor.customer, floor.stranger, bench.auditor]) {
      expect((await placing('part', id, as)).status).toBe(403);
      expect((await lifting(hold.id, as)).status).toBe(403);
    }
    expect((await call(holds, { as: floor.customer })).status).toBe(403);
  });

  it('answers 404 for what does not exist and names a reason that says nothing', async () => {
    expect((await placing('part', nowhere)).status).toBe(404);
    expect((await placing('lot', nowhere)).status).toBe(404);
    expect((await lifting(nowhere, floor.reviewer)).status).toBe(404);
    const empty = await placing('part', (await rawPart()).id, inspector, '    ');
    expect([empty.status, empty.errors[0]?.path]).toEqual([422, 'reason']);
  });

  it('lists open holds apart from lifted ones', async () => {
    const open = await placed('part', (await rawPart()).id);
    const gone = await placed('part', (await rawPart()).id);
    await lifting(gone.id, floor.reviewer);
    const list = async (query: string) =>
      listHolds.response.parse((await call(holds, { as: bench.auditor, query })).json).items.map(({ id }) => id);
    const standing = await list('?open=true&limit=20');
    expect([standing.includes(open.id), standing.includes(gone.id)]).toEqual([true, false]);
    expect(await list('?open=false&limit=20')).toContain(gone.id);
  });
});

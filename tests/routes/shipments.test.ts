import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { DELETE as take, POST as change } from '@/app/api/shipments/[number]/parts/route';
import { GET as read } from '@/app/api/shipments/[number]/route';
import { GET as list, POST as gather } from '@/app/api/shipments/route';
import { closeDatabase } from '@/db/connection';
import { reading, select } from '@/db/work';
import { listShipments, shipment as shape } from '@/services/contracts/shipments';
import { call } from './inspection-setting';
import { finishedPart, floor, gathering, orderLine, prepareFloor, rawPart, released, shipmentOf } from './release-setting';
import { bench } from './signing-setting';

beforeAll(prepareFloor);
afterAll(closeDatabase);

const shipment = async (number: string) => shape.parse((await call(read, { as: bench.auditor, params: { number } })).json);
const serialsIn = async (number: string) => (await shipment(number)).parts.map(({ part }) => part.serial);
const changing = (number: string, body: unknown, as = floor.administrator) =>
  call(change, { method: 'POST', as, params: { number }, body });

describe('gathering', () => {
  test('opens a shipment for an order line, by serial and by id', async () => {
    const [one, two] = [await rawPart(), await rawPart()];
    const body = { orderLine: await orderLine(7), serials: [one.serial], parts: [two.id] };
    const answer = await call(gather, { method: 'POST', as: floor.administrator, body });
    expect(answer.status).toBe(201);
    const made = shape.parse(answer.json);
    expect(made.number).toMatch(/^S-\d{4}-\d{5}$/);
    expect(made).toMatchObject({ state: 'open', releasable: false, certificate: null, order: { quantity: 7, released: 0 } });
    expect(made.parts.map(({ part }) => part.serial).sort()).toEqual([one.serial, two.serial].sort());
    const page = listShipments.response.parse((await call(list, { as: bench.auditor, query: '?limit=5' })).json);
    expect(page.items.map(({ number }) => number)).toContain(made.number);
  });

  test('names serials and lines that are not there, each at its place', async () => {
    const part = await rawPart();
    const unknown = await gathering([part.serial, 'NOBODY-1']);
    expect([unknown.status, unknown.errors.map(({ path }) => path)]).toEqual([422, ['serials.1']]);
    const line = await gathering([part.serial], '01900000-0000-7000-8000-000000000000');
    expect([line.status, line.errors[0]?.path]).toEqual([422, 'orderLine']);
  });

  test('a serial is in one shipment only, whoever asks', async () => {
    const part = await rawPart();
    const first = await shipmentOf([part.serial]);
    const again = await gathering([(await rawPart()).serial, part.serial]);
    expect([again.status, again.problem, again.errors]).toEqual([
      409,
      'state-refused',
      [{ path: 'serials.1', message: `${part.serial} is in shipment ${first}` }],
    ]);
  });

  test('two at once for one serial: one wins, fifty times', async () => {
    const line = await orderLine();
    for (let round = 0; round < 50; round += 1) {
      const part = await rawPart();
      const answers = await Promise.all([gathering([part.serial], line), gathering([part.serial], line)]);
      expect(answers.map(({ status }) => status).sort()).toEqual([201, 409]);
      const rows = await select(reading(), 'SELECT shipment_id FROM shipment_parts WHERE part_id = ?', [part.id]);
      expect(rows).toHaveLength(1);
    }
  }, 120_000);
});

describe('an open shipment', () => {
  test('takes serials on and gives them off; a serial given off can go elsewhere', async () => {
    const [one, two] = [await rawPart(), await rawPart()];
    const number = await shipmentOf([one.serial]);
    expect((await changing(number, { add: [two.serial] })).status).toBe(200);
    expect((await serialsIn(number)).sort()).toEqual([one.serial, two.serial].sort());
    const off = await call(take, {
      method: 'DELETE',
      as: floor.administrator,
      params: { number },
      body: { serials: [one.serial] },
    });
    expect(off.status).toBe(200);
    expect(await serialsIn(number)).toEqual([two.serial]);
    expect((await gathering([one.serial])).status).toBe(201);
    const kinds = await select<{ kind: string }>(
      reading(),
      `SELECT e.kind FROM events e JOIN shipments s ON s.number = ? AND e.subject_kind = 'shipment' AND e.subject_id = s.id ORDER BY e.seq`,
      [number],
    );
    expect(kinds.map(({ kind }) => kind)).toEqual(['shipment-created', 'shipment-parts-added', 'shipment-part-removed']);
  });

  test('refuses what makes no sense, and says where', async () => {
    const [one, other] = [await rawPart(), await rawPart()];
    const number = await shipmentOf([one.serial]);
    expect((await changing(number, {})).errors.map(({ path }) => path)).toEqual(['add']);
    expect((await changing(number, { add: ['NOBODY-1'] })).errors.map(({ path }) => path)).toEqual(['add.0']);
    expect((await changing(number, { remove: [other.serial] })).errors.map(({ path }) => path)).toEqual(['remove.0']);
    expect(await serialsIn(number)).toEqual([one.serial]);
  });

  test('no longer changes once it is signed', async () => {
    const part = await finishedPart();
    const { certificate } = await released([part]);
    const [row] = await select<{ number: string }>(
      reading(),
      'SELECT s.number FROM shipments s JOIN releases r ON r.shipment_id = s.id JOIN certificates c ON c.release_id = r.id WHERE c.number = ?',
      [certificate],
    );
    const number = row?.number ?? '';
    expect((await changing(number, { add: [(await rawPart()).serial] })).problem).toBe('state-refused');
    expect((await changing(number, { remove: [part.serial] })).problem).toBe('state-refused');
    expect(await shipment(number)).toMatchObject({ state: 'packed', reasons: [], certificate: { number: certificate } });
  });
});

test('shipments are for staff and auditors; changing them is for those who gather', async () => {
  const number = await shipmentOf([(await rawPart()).serial]);
  const params = { number };
  expect((await call(read, { params })).status).toBe(401);
  expect((await call(list, {})).status).toBe(401);
  for (const who of [floor.customer, floor.stranger]) {
    expect((await call(read, { as: who, params })).status).toBe(403);
    expect((await call(list, { as: who })).status).toBe(403);
  }
  for (const who of [bench.inspector, bench.auditor, floor.customer]) {
    expect((await changing(number, { add: ['A'] }, who)).status).toBe(403);
    expect((await call(take, { method: 'DELETE', as: who, params, body: { serials: ['A'] } })).status).toBe(403);
    expect((await call(gather, { method: 'POST', as: who, body: {} })).status).toBe(403);
  }
  expect((await call(read, { as: bench.auditor, params: { number: 'S-2026-99999' } })).status).toBe(404);
  expect((await changing('S-2026-99999', { add: ['A'] })).status).toBe(404);
});

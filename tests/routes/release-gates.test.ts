import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { POST as hold } from '@/app/api/holds/route';
import { POST as change } from '@/app/api/shipments/[number]/parts/route';
import { GET as read } from '@/app/api/shipments/[number]/route';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, selectOne, sqlTimeOf } from '@/db/work';
import { shipment as shape } from '@/services/contracts/shipments';
import { call, qualify, recordCheck } from './inspection-setting';
import {
  disposing,
  finishedPart,
  floor,
  freshPlan,
  heatLot,
  orderLine,
  partState,
  prepareFloor,
  rawPart,
  released,
  releasing,
  shipmentOf,
  signPenetrant,
  signWall,
} from './release-setting';
import { bench, opened, saved, signing, wallContent } from './signing-setting';

beforeAll(prepareFloor);
afterAll(closeDatabase);

/** Codes of the gates that stand against a serial, as shown before signing to the signatory. */
async function codes(number: string, serial: string): Promise<string[]> {
  const shown = shape.parse((await call(read, { as: floor.signatory, params: { number } })).json);
  return (shown.parts.find(({ part }) => part.serial === serial)?.reasons ?? []).map(
    ({ gate, code }) => `${String(gate)} ${code}`,
  );
}

/** A shipment of one finished part to which something then happens; the gates that this closes. */
async function closedBy(happens: (part: { id: string; serial: string }) => Promise<unknown>): Promise<string[]> {
  const part = await finishedPart();
  const number = await shipmentOf([part.serial]);
  expect(await codes(number, part.serial)).toEqual([]);
  await happens(part);
  const found = await codes(number, part.serial);
  const refused = await releasing(number);
  expect([refused.status, refused.problem, (await partState(part.id))?.state]).toEqual([409, 'gates-closed', 'finished']);
  expect(refused.errors.length).toBe(found.length);
  return found;
}

const change1 = (sql: string, values: readonly unknown[]) => inTransaction(null, (work) => execute(work, sql, values));

describe('the gates', () => {
  test('are open for a part with everything done, and say so beforehand', async () => {
    const part = await finishedPart();
    const number = await shipmentOf([part.serial]);
    const shown = shape.parse((await call(read, { as: floor.signatory, params: { number } })).json);
    expect([shown.releasable, shown.reasons]).toEqual([true, []]);
    expect(shown.sentence).toContain(`I, ${floor.signatory.name}, release 1 serial(s)`);
  });

  test('tell every reason of every serial at once, with who has to act, and sign nothing', async () => {
    const good = await finishedPart();
    const bad = await rawPart(null);
    await signWall(bad.id, '0.01');
    const placed = await call(hold, {
      method: 'POST',
      as: bench.inspector,
      body: { target: { kind: 'part', id: bad.id }, reason: 'Dropped at the bench.' },
    });
    expect(placed.status).toBe(201);
    const open = await rawPart(await heatLot({}));
    const line = await orderLine(2);
    const number = await shipmentOf([good.serial, bad.serial, open.serial], line);
    const refused = await releasing(number);
    expect([refused.status, refused.problem]).toEqual([409, 'gates-closed']);
    const at = (path: string) => refused.errors.filter((one) => one.path === path).map(({ message }) => message);
    expect(at('shipment')).toEqual(['the order line has 2 open; the shipment holds 3 (administrator)']);
    expect(at(`parts.${good.serial}`)).toEqual([]);
    expect(at(`parts.${bad.serial}`)).toEqual([
      '40 Wall thickness is rejected (reviewer)',
      '50 Fluorescent penetrant is open (inspector)',
      '1 finding(s) are not closed (reviewer)',
      expect.stringMatching(/^hold H-\d{4}-\d{5} on part: Dropped at the bench\. \(reviewer\)$/),
      'no heat is on record above the cluster (administrator)',
    ]);
    expect(at(`parts.${open.serial}`)).toEqual([
      '40 Wall thickness is open (inspector)',
      '50 Fluorescent penetrant is open (inspector)',
      expect.stringMatching(/^heat H-.* has no alloy certificate \(administrator\)$/),
    ]);
    const body = refused.json as { gates: { serial: string; reasons: { gate: number }[] }[] };
    expect(body.gates.map(({ serial }) => serial).sort()).toEqual([bad.serial, open.serial].sort());
    expect(await partState(good.id)).toMatchObject({ state: 'finished' });
    const signed = await selectOne(
      reading(),
      'SELECT r.id FROM releases r JOIN shipments s ON s.id = r.shipment_id WHERE s.number = ?',
      [number],
    );
    expect(signed).toBeUndefined();
    const off = { remove: [bad.serial, open.serial] };
    expect((await call(change, { method: 'POST', as: floor.administrator, params: { number }, body: off })).status).toBe(200);
    expect((await releasing(number)).status).toBe(201);
  });

  test('close on a hold of the heat above', async () => {
    const heat = await heatLot();
    const part = await finishedPart(heat);
    const number = await shipmentOf([part.serial]);
    const body = { target: { kind: 'lot', id: heat }, reason: 'Oxygen above its limit.' };
    expect((await call(hold, { method: 'POST', as: bench.inspector, body })).status).toBe(201);
    expect(await codes(number, part.serial)).toEqual(['2 held']);
    expect((await releasing(number)).problem).toBe('gates-closed');
  });

  test('close when the next process check of the line fails, and stay closed when a later one is good', async () => {
    await freshPlan();
    const found = await closedBy(async () => {
      await inTransaction(null, (work) => recordCheck(work, bench.plan.line, 'failed'));
      await inTransaction(null, (work) => recordCheck(work, bench.plan.line, 'good'));
    });
    expect(found).toEqual(['6 check-failed-since']);
    const later = await finishedPart();
    expect(await codes(await shipmentOf([later.serial]), later.serial)).toEqual([]);
  });

  test('close when equipment is found out of tolerance after it was used', async () => {
    await prepareFloor();
    const found = await closedBy(() =>
      inTransaction(null, (work) =>
        execute(
          work,
          `INSERT INTO calibrations (id, equipment_id, \`function\`, as_found, as_left, calibrated_on, due_on, recorded_by, created_at)
           VALUES (?, ?, 'all', 'failed', 'good', DATE(?), DATE(?) + INTERVAL 90 DAY, ?, ?)`,
          [newId(), bench.equipment, sqlTimeOf(work.now), sqlTimeOf(work.now), newId(), sqlTimeOf(work.now)],
        ),
      ),
    );
    expect(found).toEqual(['2 suspect']);
    await prepareFloor();
  });

  test('close when an inspection they rest on was ended', async () => {
    const found = await closedBy(({ id }) =>
      inTransaction(null, (work) =>
        execute(
          work,
          `INSERT INTO inspection_ends (inspection_id, kind, reason, ended_by, ended_at)
           SELECT inspection_id, 'voided', 'wrong file', ?, ? FROM part_requirements WHERE part_id = ? AND position = 0`,
          [floor.reviewer.id, sqlTimeOf(work.now), id],
        ),
      ),
    );
    expect(found).toEqual(['1 inspection-ended']);
  });

  test('close when a requirement stands as met without an inspection', async () => {
    const found = await closedBy(({ id }) =>
      change1('UPDATE part_requirements SET inspection_id = NULL WHERE part_id = ? AND position = 1', [id]),
    );
    expect(found).toEqual(['1 no-accepted-inspection']);
  });

  test('close when a file is missing from the store', async () => {
    const found = await closedBy(() =>
      inTransaction(null, (work) =>
        execute(work, `INSERT INTO evidence_checks (evidence_id, at, outcome) VALUES (?, ?, 'missing')`, [
          floor.photograph,
          sqlTimeOf(work.now),
        ]),
      ),
    );
    expect(found).toEqual(['7 file-not-sound']);
    await prepareFloor();
  });

  test('close when plan issue or technique is withdrawn for error', async () => {
    expect(
      await closedBy(() => change1(`UPDATE plan_issues SET state = 'withdrawn-for-error' WHERE id = ?`, [bench.plan.planId])),
    ).toEqual(['5 plan-not-effective']);
    await freshPlan();
    expect(
      await closedBy(() =>
        change1(`UPDATE technique_issues SET state = 'withdrawn-for-error' WHERE number = ?`, [bench.plan.technique]),
      ),
    ).toEqual(['5 technique-withdrawn']);
    await freshPlan();
  });

  test('close for another revision than the order asks for', async () => {
    const part = await finishedPart();
    const number = await shipmentOf([part.serial], await orderLine(5, 'D'));
    expect(await codes(number, part.serial)).toEqual(['10 other-drawing']);
    expect((await releasing(number)).errors[0]?.message).toContain('revision D');
  });

  test('close for a part that was released before, and for an empty shipment', async () => {
    const part = await finishedPart();
    await released([part]);
    await change1('UPDATE parts SET release_cycle = 1 WHERE id = ?', [part.id]);
    const number = await shipmentOf([part.serial]);
    expect(await codes(number, part.serial)).toEqual(['1 part-state']);
    const off = { remove: [part.serial] };
    expect((await call(change, { method: 'POST', as: floor.administrator, params: { number }, body: off })).status).toBe(200);
    expect((await releasing(number)).errors).toEqual([
      { path: 'shipment', message: 'the shipment holds no serial (administrator)' },
    ]);
  });

  test('keep duties apart: who signed an inspection or decided a finding of the serial does not release it', async () => {
    await qualify(floor.second, 'ultrasonic-thickness');
    const inspected = await rawPart();
    const draft = await saved(await opened('wall', inspected.id), await wallContent('0.90', '0.90', { person: floor.second.id }));
    expect((await signing(draft.id, { as: floor.second })).status).toBe(201);
    await signPenetrant(inspected.id);
    const own = await releasing(await shipmentOf([inspected.serial]), floor.second);
    expect([own.problem, own.errors.length]).toEqual(['gates-closed', 1]);
    expect(own.errors[0]?.message).toContain('the signatory signed inspection');

    const decided = await rawPart();
    const { findings } = await signWall(decided.id, '0.01');
    expect((await disposing(findings[0]?.number ?? '', { decision: 'rework', repeat: [] }, floor.signatory)).status).toBe(201);
    await signWall(decided.id);
    await signPenetrant(decided.id);
    const number = await shipmentOf([decided.serial]);
    const refused = await releasing(number);
    expect([refused.problem, refused.errors.length]).toEqual(['gates-closed', 1]);
    expect(refused.errors[0]?.message).toContain('the signatory decided a finding');
    expect((await releasing(number, floor.second)).status).toBe(201);
  });
});

import sharp from 'sharp';
import { expect } from 'vitest';
import { PUT as link } from '@/app/api/inspections/[id]/evidence/[evidenceId]/route';
import { POST as admit } from '@/app/api/evidence/route';
import { POST as dispose } from '@/app/api/findings/[number]/disposition/route';
import { POST as sign } from '@/app/api/shipments/[number]/release/route';
import { POST as gather } from '@/app/api/shipments/route';
import { newId } from '@/db/identity';
import { databaseNow, execute, inTransaction, reading, selectOne, sqlTimeOf } from '@/db/work';
import { evidenceFile } from '@/services/contracts/evidence';
import { signInspection } from '@/services/contracts/inspections';
import { releaseShipment, shipment as shipmentShape } from '@/services/contracts/shipments';
import { call, partOf, person, setting, signingPassword, type Answer, type Person } from './inspection-setting';
import { bench, opened, prepareBench, saved, signing, wallContent } from './signing-setting';

interface Floor {
  /** Two reviewers with release authority who inspected and decided nothing. */
  signatory: Person;
  second: Person;
  reviewer: Person;
  administrator: Person;
  customer: Person;
  /** Quality contact of another customer. */
  stranger: Person;
  /** A heat with its alloy certificate, above every cluster of `rawPart`. */
  heat: string;
  photograph: string;
}

/** Who and what the tests of findings, shipments and certificates share; filled by `prepareFloor`. */
/** What every order line of these tests wants printed. */
export const orderedStatements = [{ code: 'Q-12', text: 'No weld repair was made.' }];

export const floor = {} as Floor;

async function withReleaseAuthority(): Promise<Person> {
  const signatory = await person('reviewer');
  await inTransaction(null, (work) => execute(work, 'UPDATE accounts SET release_authority = 1 WHERE id = ?', [signatory.id]));
  return signatory;
}

/** A heat; its alloy certificate unless told otherwise. */
export async function heatLot(attributes: Record<string, string> = { alloyCertificate: 'AC-1' }): Promise<string> {
  const id = newId();
  await inTransaction(null, (work) =>
    execute(
      work,
      `INSERT INTO lots (id, kind, number, quantity, attributes, created_by, created_at) VALUES (?, 'heat', ?, 100, ?, ?, ?)`,
      [id, `H-${id.slice(-10)}`, JSON.stringify(attributes), bench.inspector.id, sqlTimeOf(work.now)],
    ),
  );
  return id;
}

/** A new plan with its own drawing and customer for everything that follows, with people of that customer and of another. */
export async function freshPlan(): Promise<void> {
  const foreign = await setting(bench.inspector);
  bench.plan = await setting(bench.inspector);
  floor.customer = await person('customer-quality', bench.plan.customerId);
  floor.stranger = await person('customer-quality', foreign.customerId);
}

/** The bench of `signing-setting`, and the people of review and release. */
export async function prepareFloor(): Promise<void> {
  await prepareBench();
  await freshPlan();
  floor.signatory = await withReleaseAuthority();
  floor.second = await withReleaseAuthority();
  floor.reviewer = await person('reviewer');
  floor.administrator = await person('administrator');
  floor.heat = await heatLot();
  const colour = { r: newId().charCodeAt(35), g: newId().charCodeAt(34), b: newId().charCodeAt(33) };
  const body = new Uint8Array(
    await sharp({ create: { width: 24, height: 20, channels: 3, background: colour } })
      .png()
      .toBuffer(),
  );
  const query = '?kind=photograph&name=seen.png';
  const file = evidenceFile.parse((await call(admit, { method: 'POST', as: bench.inspector, query, body })).json);
  floor.photograph = file.id;
}

/** A serialised part whose cluster was cast from a heat (null: from nothing on record). */
export async function rawPart(heat: string | null = floor.heat): Promise<{ id: string; serial: string }> {
  const id = await partOf(bench.plan, bench.inspector);
  const row = await selectOne<{ serial: string; clusterId: string }>(
    reading(),
    'SELECT serial, cluster_id AS clusterId FROM parts WHERE id = ?',
    [id],
  );
  if (!row) throw new Error('the part just made is not there');
  if (heat !== null)
    await inTransaction(null, (work) =>
      execute(work, 'INSERT INTO lot_parents (lot_id, parent_id, from_at) VALUES (?, ?, ?)', [
        row.clusterId,
        heat,
        sqlTimeOf(work.now),
      ]),
    );
  return { id, serial: row.serial };
}

const signed = (answer: Answer) => {
  expect(answer.errors).toEqual([]);
  return signInspection.response.parse(answer.json);
};

/** Signs the wall thickness of a part; readings of 0.90 are accepted, `0.01` for station 1 is rejected. */
export async function signWall(partId: string, first = '0.90') {
  const draft = await saved(await opened('wall', partId), await wallContent(first, '0.90'));
  return signed(await signing(draft.id));
}

/** Signs a clean penetrant inspection with its photograph. */
export async function signPenetrant(partId: string) {
  const at = await databaseNow();
  const draft = await saved(await opened('fpi', partId), {
    process: [{ number: 'P3', value: '25', unit: 'min' }],
    attributes: [{ number: '40', result: 'conforming' }],
    examined: true,
    acts: [
      { kind: 'processed', person: bench.inspector.id, at },
      { kind: 'evaluated', person: bench.inspector.id, at, equipment: [bench.lamp] },
    ],
  });
  const params = { id: draft.id, evidenceId: floor.photograph };
  const body = { role: 'photograph', view: 'concave' };
  expect((await call(link, { method: 'PUT', as: bench.inspector, params, body })).status).toBe(200);
  return signed(await signing(draft.id));
}

/** A part with every inspection of its route signed and accepted, by the bench's inspector. */
export async function finishedPart(heat: string | null = floor.heat): Promise<{ id: string; serial: string }> {
  const part = await rawPart(heat);
  await signWall(part.id);
  await signPenetrant(part.id);
  return part;
}

/** An order line of the plan's customer for its drawing revision. */
export async function orderLine(quantity = 100, revision = 'C'): Promise<string> {
  const [orderId, lineId] = [newId(), newId()];
  await inTransaction(null, async (work) => {
    const at = sqlTimeOf(work.now);
    await execute(work, 'INSERT INTO orders (id, number, customer_id, purchase_order, created_at) VALUES (?, ?, ?, ?, ?)', [
      orderId,
      `O-${orderId.slice(-12)}`,
      bench.plan.customerId,
      `PO-${orderId.slice(-10)}`,
      at,
    ]);
    await execute(work, 'INSERT IGNORE INTO drawing_revisions (id, drawing_id, revision, created_at) VALUES (?, ?, ?, ?)', [
      newId(),
      bench.plan.drawingId,
      revision,
      at,
    ]);
    await execute(
      work,
      `INSERT INTO order_lines (id, order_id, line, drawing_revision_id, quantity, clauses)
       SELECT ?, ?, 10, id, ?, ? FROM drawing_revisions WHERE drawing_id = ? AND revision = ?`,
      [lineId, orderId, quantity, JSON.stringify({ statements: orderedStatements }), bench.plan.drawingId, revision],
    );
  });
  return lineId;
}

/** Gathers serials for an order line as the administrator; answers the raw answer. */
export async function gathering(serials: readonly string[], line?: string): Promise<Answer> {
  return call(gather, {
    method: 'POST',
    as: floor.administrator,
    body: { orderLine: line ?? (await orderLine()), serials },
  });
}

/** An open shipment; answers its number. */
export async function shipmentOf(serials: readonly string[], line?: string): Promise<string> {
  const answer = await gathering(serials, line);
  expect(answer.status).toBe(201);
  return shipmentShape.parse(answer.json).number;
}

export function releasing(number: string, as: Person | null = floor.signatory, more: { password?: string; key?: string } = {}) {
  return call(sign, {
    method: 'POST',
    params: { number },
    body: { password: more.password ?? signingPassword },
    headers: more.key === undefined ? {} : { 'idempotency-key': more.key },
    ...(as ? { as } : {}),
  });
}

export const releaseAnswer = (answer: Answer) => releaseShipment.response.parse(answer.json);

/** Releases serials in a shipment of their own; answers the certificate's number and the id of its job. */
export async function released(parts: readonly { serial: string }[]): Promise<{ certificate: string; job: string }> {
  const answer = await releasing(await shipmentOf(parts.map(({ serial }) => serial)));
  expect(answer.errors).toEqual([]);
  return releaseAnswer(answer);
}

/** Takes a job out of the outbox: the races make many that nobody needs. */
export async function dropJob(jobId: string): Promise<void> {
  await inTransaction(null, (work) =>
    execute(work, `UPDATE jobs SET state = 'cancelled' WHERE id = ? AND state = 'waiting'`, [jobId]),
  );
}

export function disposing(number: string, body: object, as: Person | null = floor.reviewer): Promise<Answer> {
  return call(dispose, {
    method: 'POST',
    params: { number },
    body: { reason: 'Seen again under the lens.', password: signingPassword, ...body },
    ...(as ? { as } : {}),
  });
}

export async function partState(partId: string) {
  return selectOne<{ state: string; openFindings: number; held: number }>(
    reading(),
    'SELECT state, open_findings AS openFindings, held FROM parts WHERE id = ?',
    [partId],
  );
}

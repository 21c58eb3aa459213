import { newId, nextNumber } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { partIdsOfShipment, shipmentByNumber, type ShipmentRow } from '@/db/repositories/shipments';
import { execute, select, selectOne, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { changeShipmentParts, createShipment as createContract, Shipment } from '@/services/contracts/shipments';
import { notFound, Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { readShipment } from './read-shipment';

type By = Work & { readonly actor: Actor };

interface Found {
  readonly id: string;
  readonly serial: string;
  readonly releaseCycle: number;
}

async function partsBySerial(work: Work, drawingId: string, serials: readonly string[], path: string): Promise<Found[]> {
  if (serials.length === 0) return [];
  const rows = await select<Found>(
    work,
    'SELECT id, serial, release_cycle AS releaseCycle FROM parts WHERE drawing_id = ? AND serial IN (?)',
    [drawingId, serials],
  );
  const errors: FieldError[] = serials.flatMap((serial, at) =>
    rows.some((row) => row.serial === serial)
      ? []
      : [{ path: `${path}.${String(at)}`, message: `${serial} is not a serial of this part number` }],
  );
  if (errors.length > 0) throw new Problem('invalid-input', errors.map(({ message }) => message).join('; '), errors);
  return rows;
}

/** Puts parts into a shipment. `path` names the field a part came from; problem state-refused when one is in another shipment. */
async function addParts(
  work: By,
  shipment: { readonly id: string },
  parts: readonly Found[],
  path: (part: Found) => string,
): Promise<void> {
  await takeRows(
    work,
    'parts',
    parts.map(({ id }) => id),
  );
  const errors: FieldError[] = [];
  for (const part of parts) {
    const elsewhere = await selectOne<{ number: string; id: string }>(
      work,
      'SELECT s.number, s.id FROM shipment_parts sp JOIN shipments s ON s.id = sp.shipment_id WHERE sp.part_id = ? AND sp.release_cycle = ?',
      [part.id, part.releaseCycle],
    );
    if (elsewhere) {
      if (elsewhere.id !== shipment.id)
        errors.push({ path: path(part), message: `${part.serial} is in shipment ${elsewhere.number}` });
      continue;
    }
    await execute(
      work,
      'INSERT INTO shipment_parts (shipment_id, part_id, release_cycle, added_by, added_at) VALUES (?, ?, ?, ?, ?)',
      [shipment.id, part.id, part.releaseCycle, work.actor.id, sqlTimeOf(work.now)],
    );
  }
  if (errors.length > 0) throw new Problem('state-refused', errors.map(({ message }) => message).join('; '), errors);
}

/** Opens a shipment for an order line and puts serials in it. */
export async function createShipment(work: By, body: BodyOf<typeof createContract>): Promise<Recorded<Shipment>> {
  const line = await selectOne<{ id: string; drawingId: string }>(
    work,
    'SELECT ol.id, r.drawing_id AS drawingId FROM order_lines ol JOIN drawing_revisions r ON r.id = ol.drawing_revision_id WHERE ol.id = ?',
    [body.orderLine],
  );
  if (!line)
    throw new Problem('invalid-input', 'orderLine: is not known', [{ path: 'orderLine', message: 'is not a known order line' }]);
  const bySerial = await partsBySerial(work, line.drawingId, body.serials ?? [], 'serials');
  const byId =
    body.parts && body.parts.length > 0
      ? await select<Found>(
          work,
          'SELECT id, serial, release_cycle AS releaseCycle FROM parts WHERE id IN (?) AND drawing_id = ?',
          [body.parts, line.drawingId],
        )
      : [];
  if (byId.length < (body.parts ?? []).length)
    throw new Problem('invalid-input', 'parts: name parts that are not of this part number', [
      { path: 'parts', message: 'name parts that are not of this part number' },
    ]);
  const shipment = { id: newId() };
  const number = await nextNumber(work, 'S');
  await execute(work, 'INSERT INTO shipments (id, number, order_line_id, created_by, created_at) VALUES (?, ?, ?, ?, ?)', [
    shipment.id,
    number,
    line.id,
    work.actor.id,
    sqlTimeOf(work.now),
  ]);
  const parts = [...new Map([...bySerial, ...byId].map((part) => [part.id, part])).values()];
  await addParts(work, shipment, parts, (part) => {
    const place = body.serials?.indexOf(part.serial) ?? -1;
    return place >= 0 ? `serials.${String(place)}` : `parts.${String(body.parts?.indexOf(part.id) ?? 0)}`;
  });
  return {
    answer: await readShipment(work, number),
    events: [
      {
        subject: { kind: 'shipment', id: shipment.id },
        also: parts.map(({ id }) => ({ kind: 'part', id })),
        details: { number, serials: parts.map(({ serial }) => serial) },
      },
    ],
  };
}

async function openShipment(work: By, number: string): Promise<ShipmentRow> {
  const known = await shipmentByNumber(work, number);
  if (!known) throw notFound(`Shipment ${number}`);
  await takeRows(work, 'shipments', [known.id]);
  const row = await shipmentByNumber(work, number);
  if (row?.state !== 'open' || row.certificateNumber !== null)
    throw new Problem('state-refused', `Shipment ${number} is signed or packed; it no longer changes.`);
  return row;
}

async function refuseAbsent(work: Work, shipmentId: string, parts: readonly Found[], asked: readonly string[]): Promise<void> {
  const inside = new Set(await partIdsOfShipment(work, shipmentId));
  const errors = parts
    .filter(({ id }) => !inside.has(id))
    .map(({ serial }) => ({
      path: `remove.${String(asked.indexOf(serial))}`,
      message: `${serial} is not in this shipment`,
    }));
  if (errors.length > 0) throw new Problem('invalid-input', errors.map(({ message }) => message).join('; '), errors);
}

/** Adds serials to an open shipment and takes serials off it. */
export async function changeParts(
  work: By,
  number: string,
  body: BodyOf<typeof changeShipmentParts>,
): Promise<Recorded<Shipment>> {
  const before = await shipmentByNumber(work, number);
  if (!before) throw notFound(`Shipment ${number}`);
  if (!body.add && !body.remove)
    throw new Problem('invalid-input', 'add or remove: name at least one serial', [
      { path: 'add', message: 'name at least one serial to add or to remove' },
    ]);
  const added = await partsBySerial(work, before.drawingId, body.add ?? [], 'add');
  const removed = await partsBySerial(work, before.drawingId, body.remove ?? [], 'remove');
  await takeRows(
    work,
    'parts',
    [...added, ...removed].map(({ id }) => id),
  );
  const shipment = await openShipment(work, number);
  await refuseAbsent(work, shipment.id, removed, body.remove ?? []);
  if (removed.length > 0)
    await execute(work, 'DELETE FROM shipment_parts WHERE shipment_id = ? AND part_id IN (?)', [
      shipment.id,
      removed.map(({ id }) => id),
    ]);
  await addParts(work, shipment, added, ({ serial }) => `add.${String(body.add?.indexOf(serial) ?? 0)}`);
  return {
    answer: await readShipment(work, number),
    events: [
      {
        kind: added.length > 0 ? 'shipment-parts-added' : 'shipment-part-removed',
        subject: { kind: 'shipment', id: shipment.id },
        also: [...added, ...removed].map(({ id }) => ({ kind: 'part', id })),
        details: { number, added: added.map(({ serial }) => serial), removed: removed.map(({ serial }) => serial) },
      },
    ],
  };
}

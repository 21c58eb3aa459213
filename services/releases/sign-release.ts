import { createHash } from 'node:crypto';
import { newId, nextNumber } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { lotsOverParts } from '@/db/repositories/releases';
import { partIdsOfShipment, shipmentByNumber, type ShipmentRow } from '@/db/repositories/shipments';
import { execute, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf } from '@/services/contracts/operation';
import { releaseSentence } from '@/services/contracts/release-sentence';
import type { releaseShipment as contract } from '@/services/contracts/shipments';
import { canonicalJson } from '@/services/engine/record/canonical';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { enqueue } from '@/services/jobs/enqueue';
import { gatesOfParts, shipmentReasons, type GatedPart } from './gates';
import { buildReleaseRecord, newCheckCode } from './release-record';

type By = Work & { readonly actor: Actor };

/** Parts first, in id order; then every lot above them; then the shipment and the order line: the order every decision keeps. */
async function takeAll(work: By, shipment: ShipmentRow): Promise<string[]> {
  const partIds = await partIdsOfShipment(work, shipment.id);
  await takeRows(work, 'parts', partIds);
  await takeRows(work, 'lots', await lotsOverParts(work, partIds));
  await takeRows(work, 'shipments', [shipment.id]);
  await takeRows(work, 'order_lines', [shipment.lineId]);
  const now = await partIdsOfShipment(work, shipment.id);
  // A serial that came in between was not taken: nothing is decided on it.
  if (now.some((partId) => !partIds.includes(partId)))
    throw new Problem('state-refused', `Shipment ${shipment.number} was changed at this moment. Look at it again, then sign.`);
  return now;
}

function refuseClosedGates(shipment: ShipmentRow, gated: readonly GatedPart[]): void {
  const whole = shipmentReasons(shipment, gated.length);
  const errors = [
    ...whole.map(({ message, who }) => ({ path: 'shipment', message: `${message} (${who})` })),
    ...gated.flatMap(({ part, reasons }) =>
      reasons.map(({ message, who }) => ({ path: `parts.${part.serial}`, message: `${message} (${who})` })),
    ),
  ];
  if (errors.length === 0) return;
  const gates = gated
    .filter(({ reasons }) => reasons.length > 0)
    .map(({ part, reasons }) => ({ serial: part.serial, part: part.id, reasons }));
  throw new Problem(
    'gates-closed',
    `${String(errors.length)} reason(s) stand against this release. Nothing was signed.`,
    errors,
    { gates, shipmentReasons: whole },
  );
}

async function store(work: By, shipment: ShipmentRow, gated: readonly GatedPart[], sentence: string) {
  const [releaseId, certificateId, checkCode] = [newId(), newId(), newCheckCode()];
  const number = await nextNumber(work, 'C');
  const record = await buildReleaseRecord(work, shipment, gated, number, checkCode);
  const bytes = Buffer.from(canonicalJson(JSON.parse(JSON.stringify(record))), 'utf8');
  const digest = createHash('sha256').update(bytes).digest('hex');
  const at = sqlTimeOf(work.now);
  await execute(
    work,
    'INSERT INTO releases (id, shipment_id, customer_id, record, record_digest, sentence, signed_by, signed_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?)',
    [releaseId, shipment.id, shipment.customerId, bytes, digest, sentence, work.actor.id, at],
  );
  for (const { part } of gated)
    await execute(work, 'INSERT INTO release_parts (release_id, part_id, release_cycle) VALUES (?, ?, ?)', [
      releaseId,
      part.id,
      part.releaseCycle,
    ]);
  await execute(
    work,
    `INSERT INTO certificates (id, number, release_id, customer_id, state, check_code, signed_at) VALUES (?, ?, ?, ?, 'signed', ?, ?)`,
    [certificateId, number, releaseId, shipment.customerId, checkCode, at],
  );
  await execute(work, `UPDATE parts SET state = 'released' WHERE id IN (?)`, [gated.map(({ part }) => part.id)]);
  await execute(work, 'UPDATE order_lines SET released = released + ? WHERE id = ?', [gated.length, shipment.lineId]);
  await execute(work, `UPDATE shipments SET state = 'packed' WHERE id = ?`, [shipment.id]);
  const job = await enqueue(work, 'issue-certificate', { releaseId }, `issue-${releaseId}`);
  return { certificateId, number, digest, job };
}

/**
 * Signs the release of a shipment: every gate of every serial is computed here, under the rows that could change them.
 * All or nothing. Problems: not-found, state-refused (already signed), gates-closed with every reason.
 */
export async function signRelease(work: By, shipmentNumber: string): Promise<Recorded<AnswerOf<typeof contract>>> {
  const known = await shipmentByNumber(work, shipmentNumber);
  if (!known) throw notFound(`Shipment ${shipmentNumber}`);
  const partIds = await takeAll(work, known);
  const shipment = await shipmentByNumber(work, shipmentNumber);
  if (!shipment) throw notFound(`Shipment ${shipmentNumber}`);
  if (shipment.certificateNumber !== null)
    throw new Problem(
      'state-refused',
      `Shipment ${shipmentNumber} was already released with certificate ${shipment.certificateNumber}.`,
      [],
      { certificate: shipment.certificateNumber },
    );
  const gated = await gatesOfParts(work, partIds, shipment, work.actor.id);
  refuseClosedGates(shipment, gated);
  const sentence = releaseSentence({
    name: work.actor.name,
    count: gated.length,
    partNumber: shipment.partNumber,
    revision: shipment.revision,
    purchaseOrder: shipment.purchaseOrder,
    line: shipment.line,
  });
  const stored = await store(work, shipment, gated, sentence);
  const serials = gated.map(({ part }) => part.serial);
  return {
    answer: { certificate: stored.number, state: 'signed', job: stored.job, serials, sentence },
    headers: { location: `/api/certificates/${stored.number}` },
    events: [
      {
        subject: { kind: 'certificate', id: stored.certificateId },
        also: [{ kind: 'shipment', id: shipment.id }, ...gated.map(({ part }) => ({ kind: 'part', id: part.id }))],
        details: { certificate: stored.number, shipment: shipment.number, serials, digest: stored.digest, sentence },
      },
    ],
  };
}

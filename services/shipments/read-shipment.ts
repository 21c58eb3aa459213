import { listShipments as rowsOf, partIdsOfShipment, shipmentByNumber, type ShipmentRow } from '@/db/repositories/shipments';
import type { Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { releaseSentence } from '@/services/contracts/release-sentence';
import type { listShipments as contract, Shipment, ShipmentSummary } from '@/services/contracts/shipments';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';
import { summaryOf } from '@/services/parts/list-parts';
import { gatesOfParts, shipmentReasons } from '@/services/releases/gates';

export function shipmentSummaryOf(row: ShipmentRow): ShipmentSummary {
  return {
    number: row.number,
    state: row.state,
    order: {
      number: row.orderNumber,
      purchaseOrder: row.purchaseOrder,
      line: row.line,
      lineId: row.lineId,
      quantity: row.quantity,
      released: row.released,
      partNumber: row.partNumber,
      revision: row.revision,
      dueOn: row.dueOn,
    },
    customer: { id: row.customerId, name: row.customerName },
    partCount: row.partCount,
    certificate:
      row.certificateNumber !== null && row.certificateState !== null
        ? { number: row.certificateNumber, state: row.certificateState }
        : null,
    createdAt: row.createdAt,
  };
}

/** Shipments, newest first. */
export async function listShipments(reading: Reading, query: QueryOf<typeof contract>): Promise<AnswerOf<typeof contract>> {
  const before = partsOfKey(query.after, 2);
  const rows = await rowsOf(reading, query.limit + 1, before && [String(before[0]), String(before[1])]);
  return pageOf(rows, query.limit, ({ createdAt, id }) => [createdAt, id], shipmentSummaryOf);
}

/** A shipment with the gates of every serial as they stand now. A signed one shows none. Problem not-found. */
export async function readShipment(reading: Reading & { readonly actor: Actor }, number: string): Promise<Shipment> {
  const row = await shipmentByNumber(reading, number);
  if (!row) throw notFound(`Shipment ${number}`);
  const signed = row.certificateNumber !== null;
  const signatory = reading.actor.releaseAuthority ? reading.actor.id : null;
  const gated = await gatesOfParts(reading, await partIdsOfShipment(reading, row.id), row, signatory);
  const parts = gated.map(({ part, requirements, heat, reasons }) => ({
    part: summaryOf(part, requirements),
    heat,
    reasons: signed ? [] : [...reasons],
  }));
  const reasons = signed ? [] : shipmentReasons(row, parts.length);
  return {
    ...shipmentSummaryOf(row),
    parts,
    reasons,
    releasable: !signed && reasons.length === 0 && parts.every((one) => one.reasons.length === 0),
    sentence: releaseSentence({
      name: reading.actor.name,
      count: parts.length,
      partNumber: row.partNumber,
      revision: row.revision,
      purchaseOrder: row.purchaseOrder,
      line: row.line,
    }),
  };
}

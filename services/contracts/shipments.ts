import { z } from 'zod';
import { id, instant, page, pageQuery, password } from './common';
import { operation } from './operation';
import { partSummary } from './parts';

/** One of the eleven release gates that is not open for a serial: which, why, and who has to act. */
export const gateReason = z.object({ gate: z.int().min(1).max(11), code: z.string(), message: z.string(), who: z.string() });
export type GateReason = z.output<typeof gateReason>;

export const shipmentPart = z.object({ part: partSummary, heat: z.string().nullable(), reasons: z.array(gateReason) });

export const shipmentSummary = z.object({
  number: z.string(),
  state: z.enum(['open', 'packed', 'despatched', 'received', 'received-with-difference']),
  order: z.object({
    number: z.string(),
    purchaseOrder: z.string(),
    line: z.int(),
    lineId: id,
    quantity: z.int(),
    released: z.int(),
    partNumber: z.string(),
    revision: z.string(),
    dueOn: z.string().nullable(),
  }),
  customer: z.object({ id, name: z.string() }),
  partCount: z.int(),
  certificate: z.object({ number: z.string(), state: z.string() }).nullable(),
  createdAt: instant,
});
export type ShipmentSummary = z.output<typeof shipmentSummary>;

export const shipment = shipmentSummary.extend({
  parts: z.array(shipmentPart),
  /** Reasons that concern the shipment as a whole. */
  reasons: z.array(gateReason),
  releasable: z.boolean(),
  /** What the signatory would sign. */
  sentence: z.string(),
});
export type Shipment = z.output<typeof shipment>;

const byNumber = z.object({ number: z.string().max(24) });
const serials = z.array(z.string().trim().min(1).max(40)).min(1).max(500);

export const listShipments = operation({
  name: 'list-shipments',
  method: 'GET',
  path: '/api/shipments',
  summary: 'Shipments, newest first.',
  changes: false,
  query: pageQuery,
  response: page(shipmentSummary),
  status: 200,
});

export const createShipment = operation({
  name: 'create-shipment',
  method: 'POST',
  path: '/api/shipments',
  summary: 'Gather serials for an order line.',
  changes: true,
  body: z.strictObject({ orderLine: id, serials: serials.optional(), parts: z.array(id).max(500).optional() }),
  response: shipment,
  status: 201,
});

export const readShipment = operation({
  name: 'read-shipment',
  method: 'GET',
  path: '/api/shipments/{number}',
  summary: 'One shipment with the gates of every serial.',
  changes: false,
  params: byNumber,
  response: shipment,
  status: 200,
});

export const changeShipmentParts = operation({
  name: 'change-shipment-parts',
  method: 'POST',
  path: '/api/shipments/{number}/parts',
  summary: 'Add serials to an open shipment, or take serials off it.',
  changes: true,
  params: byNumber,
  body: z.strictObject({ add: serials.optional(), remove: serials.optional() }),
  response: shipment,
  status: 200,
});

export const removeShipmentParts = operation({
  name: 'remove-shipment-parts',
  method: 'DELETE',
  path: '/api/shipments/{number}/parts',
  summary: 'Take serials off an open shipment.',
  changes: true,
  params: byNumber,
  body: z.strictObject({ serials }),
  response: shipment,
  status: 200,
});

export const releaseShipment = operation({
  name: 'release-shipment',
  method: 'POST',
  path: '/api/shipments/{number}/release',
  summary: 'Sign the release: all gates of all serials, or 409 with every reason.',
  changes: true,
  params: byNumber,
  body: z.strictObject({ password }),
  response: z.object({
    certificate: z.string(),
    state: z.literal('signed'),
    /** The job that lays out, seals and stores the certificate. */
    job: id,
    serials: z.array(z.string()),
    sentence: z.string(),
  }),
  status: 201,
});

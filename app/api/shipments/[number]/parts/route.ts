import { changeShipmentParts as addContract, removeShipmentParts as removeContract } from '@/services/contracts/shipments';
import { route } from '@/services/http/route';
import { changeParts } from '@/services/shipments/gather-shipment';

export const POST = route({
  contract: addContract,
  who: 'gather-shipment',
  event: 'shipment-parts-added',
  call: (work, { params, body }) => changeParts(work, params.number, body),
});

export const DELETE = route({
  contract: removeContract,
  who: 'gather-shipment',
  event: 'shipment-part-removed',
  call: (work, { params, body }) => changeParts(work, params.number, { remove: body.serials }),
});

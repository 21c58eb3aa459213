import { changeShipmentParts as contract } from '@/services/contracts/shipments';
import { route } from '@/services/http/route';
import { changeParts } from '@/services/shipments/gather-shipment';

export const POST = route({
  contract,
  who: 'gather-shipment',
  event: 'shipment-parts-added',
  call: (work, { params, body }) => changeParts(work, params.number, body),
});

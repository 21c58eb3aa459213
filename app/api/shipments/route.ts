import { createShipment as createContract, listShipments as listContract } from '@/services/contracts/shipments';
import { route } from '@/services/http/route';
import { createShipment } from '@/services/shipments/gather-shipment';
import { listShipments } from '@/services/shipments/read-shipment';

export const GET = route({
  contract: listContract,
  who: 'see-shipments',
  event: null,
  call: (reading, { query }) => listShipments(reading, query),
});

export const POST = route({
  contract: createContract,
  who: 'gather-shipment',
  event: 'shipment-created',
  call: (work, { body }) => createShipment(work, body),
});

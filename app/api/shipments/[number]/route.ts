import { readShipment as contract } from '@/services/contracts/shipments';
import { route } from '@/services/http/route';
import { readShipment } from '@/services/shipments/read-shipment';

export const GET = route({
  contract,
  who: 'see-shipments',
  event: null,
  call: (reading, { params }) => readShipment(reading, params.number),
});

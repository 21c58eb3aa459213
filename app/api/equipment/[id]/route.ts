import { readEquipment as contract } from '@/services/contracts/equipment';
import { readEquipment } from '@/services/equipment/keep-equipment';
import { route } from '@/services/http/route';

export const GET = route({
  contract,
  who: 'see-equipment',
  event: null,
  call: (reading, { params }) => readEquipment(reading, params.id),
});

import { retireEquipment as contract } from '@/services/contracts/equipment';
import { retireEquipment } from '@/services/equipment/keep-equipment';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'keep-equipment',
  event: 'equipment-retired',
  call: (work, { params, body }) => retireEquipment(work, params.id, body.reason),
});

import { addEquipment as addContract, listEquipment as listContract } from '@/services/contracts/equipment';
import { addEquipment, listEquipment } from '@/services/equipment/keep-equipment';
import { route } from '@/services/http/route';

export const GET = route({
  contract: listContract,
  who: 'see-equipment',
  event: null,
  call: (reading, { query }) => listEquipment(reading, query),
});

export const POST = route({
  contract: addContract,
  who: 'keep-equipment',
  event: 'equipment-added',
  call: (work, { body }) => addEquipment(work, body),
});

import { recordCalibration as contract } from '@/services/contracts/equipment';
import { recordCalibration } from '@/services/equipment/record-calibration';
import { route } from '@/services/http/route';

export const POST = route({
  contract,
  who: 'keep-equipment',
  event: 'calibration-recorded',
  call: (work, { params, body }) => recordCalibration(work, params.id, body),
});

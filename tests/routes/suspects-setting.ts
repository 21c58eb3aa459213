import { POST as calibrate } from '@/app/api/equipment/[id]/calibrations/route';
import { POST as recordCheckRoute } from '@/app/api/checks/route';
import { POST as close } from '@/app/api/suspects/[id]/groups/[group]/closing/route';
import { GET as readList } from '@/app/api/suspects/[id]/route';
import { thePlant } from '@/db/repositories/plants';
import { databaseNow, reading } from '@/db/work';
import { recordCalibration } from '@/services/contracts/equipment';
import { recordCheck } from '@/services/contracts/checks';
import { suspectList, type SuspectList } from '@/services/contracts/suspects';
import { plantDay } from '@/services/inspections/plant-day';
import { call, signingPassword, type Answer, type Person } from './inspection-setting';
import { floor } from './release-setting';
import { bench } from './signing-setting';

/** A day so many days from the plant's today. */
export async function dayOn(days: number): Promise<string> {
  const today = plantDay(await databaseNow(), (await thePlant(reading())).zone);
  const [year = 0, month = 1, day = 1] = today.split('-').map(Number);
  return new Date(Date.UTC(year, month - 1, day + days)).toISOString().slice(0, 10);
}

/** Records a calibration of today, found failed and left good unless told, as the administrator. */
export async function calibrating(id: string, more: object = {}, as: Person | null = floor.administrator): Promise<Answer> {
  const body = { function: 'all', asFound: 'failed', asLeft: 'good', calibratedOn: await dayOn(0), dueOn: await dayOn(180) };
  return call(calibrate, { method: 'POST', params: { id }, body: { ...body, ...more }, ...(as ? { as } : {}) });
}

export const calibrated = (answer: Answer) => recordCalibration.response.parse(answer.json);

/** Records a check of the plan's line, failed unless told, as the inspector. */
export function checking(more: object = {}, as: Person | null = bench.inspector): Promise<Answer> {
  const body = { scope: bench.plan.line, title: 'Known-defect panel', method: 'penetrant', result: 'failed', validHours: 8 };
  return call(recordCheckRoute, { method: 'POST', body: { ...body, ...more }, ...(as ? { as } : {}) });
}

export const checked = (answer: Answer) => recordCheck.response.parse(answer.json);

export function closing(
  list: SuspectList,
  group: string,
  decision: 'no-effect' | 'repeat',
  as: Person | null = floor.reviewer,
  more: object = {},
): Promise<Answer> {
  const body = { decision, reason: 'Measured again on the block: no shift at 1 mm.', password: signingPassword, ...more };
  return call(close, { method: 'POST', params: { id: list.id, group }, body, ...(as ? { as } : {}) });
}

export async function listNow(id: string, as: Person = floor.reviewer): Promise<SuspectList> {
  return suspectList.parse((await call(readList, { as, params: { id } })).json);
}

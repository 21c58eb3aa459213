import type { Today } from '@/db/repositories/personnel';
import { thePlant } from '@/db/repositories/plants';
import { databaseNow, type Reading } from '@/db/work';
import { lapsingDays } from '@/services/contracts/personnel';
import { plantDay } from '@/services/inspections/plant-day';

/** The plant's calendar day by the database server's clock. */
export async function plantToday(reading: Reading): Promise<Today> {
  const { zone } = await thePlant(reading);
  return { day: plantDay(await databaseNow(reading), zone), lapsingDays };
}

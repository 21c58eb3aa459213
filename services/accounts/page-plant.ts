import { thePlant, type Plant } from '@/db/repositories/plants';
import { reading } from '@/db/work';

/** The plant as pages show it: its name and the zone times are printed in. */
export function pagePlant(): Promise<Plant> {
  return thePlant(reading());
}

import { selectOne, type Reading } from '../work';

export interface Plant {
  readonly id: string;
  readonly code: string;
  readonly name: string;
  readonly address: string;
  /** IANA time zone. */
  readonly zone: string;
  readonly locale: 'en' | 'fr';
}

/** The plant this installation serves. */
export async function thePlant(reading: Reading): Promise<Plant> {
  const plant = await selectOne<Plant>(reading, 'SELECT id, code, name, address, zone, locale FROM plants ORDER BY code LIMIT 1');
  return plant ?? { id: '', code: '', name: 'Ringtrue', address: '', zone: 'UTC', locale: 'en' };
}

import { newId } from '../identity';
import { execute, inTransaction, sqlTimeOf } from '../work';

/** The foundry and its two customers; answers the customers' ids by code. */
export async function seedPlant(): Promise<Record<'TARN' | 'CORV', string>> {
  return inTransaction(null, async (work) => {
    await execute(work, 'INSERT INTO plants (id, code, name, address, zone, locale) VALUES (?, ?, ?, ?, ?, ?)', [
      newId(),
      'AM',
      'Aldermoor Precision Castings',
      'Kiln Lane Works\nAldermoor\nAM4 2RG',
      'Europe/London',
      'en',
    ]);
    const ids = { TARN: newId(), CORV: newId() };
    const customers = [
      [ids.TARN, 'TARN', 'Tarnside Turbines', 'Fell Gate 7\nTarnside', 'en', 'quality@tarnside.example'],
      [ids.CORV, 'CORV', 'Corvane Rotorcraft', '12 quai des Aubes\nCorvane', 'fr', 'quality@corvane.example'],
    ];
    for (const row of customers) {
      await execute(
        work,
        'INSERT INTO customers (id, code, name, address, locale, quality_email, created_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
        [...row, sqlTimeOf(work.now)],
      );
    }
    return ids;
  });
}

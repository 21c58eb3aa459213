import { selectOne, reading } from '../work';
import { seedBaskets } from './demo-baskets';
import { seedPictures } from './demo-evidence';
import { seedEquipment } from './demo-equipment';
import { seedLots, seedOrders } from './demo-lots';
import { seedPeople } from './demo-people';
import { seedPlans, stations } from './demo-plans';
import { seedPlant } from './demo-plant';
import { seedStory } from './demo-story';
import { seedTechniques } from './demo-techniques';

async function timed<T>(what: string, work: () => Promise<T>): Promise<T> {
  const began = performance.now();
  const result = await work();
  console.log(`  ${what}: ${((performance.now() - began) / 1000).toFixed(1)} s`);
  return result;
}

/** Fills an empty installation with the demo scenario. Answers false when it is already there. */
export async function seedDemo(): Promise<boolean> {
  const present = await selectOne(reading(), `SELECT 1 AS present FROM accounts WHERE email = 'inspector@aldermoor.example'`);
  if (present) return false;
  const customers = await timed('plant and customers', seedPlant);
  const people = await timed('people', () => seedPeople(customers));
  const gauges = await timed('equipment, checks and techniques', async () => {
    await seedTechniques(people);
    return seedEquipment(people, stations);
  });
  const plans = await timed('drawings and plans', () => seedPlans(people));
  const { heats, parts } = await timed('lots and parts', () => seedLots(people, plans));
  const orderLines = await timed('orders', () => seedOrders(customers));
  const pictures = await timed('pictures', () => seedPictures(people));
  await timed('inspections, findings and releases', () => seedStory(people, parts, { gauges, pictures }, { orderLines, heats }));
  await timed('baskets and runs', () => seedBaskets(people, plans['AM-2210'], gauges, heats['H-26-114'] ?? ''));
  return true;
}

import { benchPeople, equipmentOfMethod, plantZone } from '@/db/repositories/act-conditions';
import { requirementsOfParts } from '@/db/repositories/parts';
import { openRunsOf } from '@/db/repositories/runs';
import { approvedPlanOf, partsWithSerial } from '@/db/repositories/scans';
import { databaseNow, type Reading } from '@/db/work';
import type { BasketSetUp, setUpBasket as contract } from '@/services/contracts/baskets';
import { neededActs } from '@/services/contracts/needed-acts';
import type { QueryOf } from '@/services/contracts/operation';
import { readScan } from '@/services/contracts/scan-text';
import { Problem } from '@/services/http/problem';
import { plantDay } from '@/services/inspections/plant-day';
import { metStates } from '@/services/parts/recount-part';
import { basketRefusal } from './clean-content';
import { operationsOf } from './set-up';

interface Named {
  readonly id: string | null;
  readonly serial: string | null;
  readonly partNumber: string;
  readonly title: string;
}

async function named(reading: Reading, { scan, partNumber }: QueryOf<typeof contract>): Promise<Named> {
  if (scan === undefined) {
    const plan = partNumber === undefined ? undefined : await approvedPlanOf(reading, partNumber);
    if (plan && partNumber !== undefined) return { id: null, serial: null, partNumber, title: plan.title };
    throw new Problem('invalid-input', 'partNumber: has no approved plan', [
      { path: 'partNumber', message: 'has no approved plan' },
    ]);
  }
  const read = readScan(scan);
  const candidates = read ? await partsWithSerial(reading, read.serial) : [];
  const part = candidates.find((one) => read?.partNumber === null || one.partNumber === read?.partNumber);
  if (part) return part;
  const message = `No part has the serial ${(read?.serial ?? scan).slice(0, 60)}.`;
  throw new Problem('invalid-input', message, [{ path: 'scan', message }], { why: 'unknown' });
}

/** From one scanned part or a part number, what a basket of its kind can be opened for. Problem invalid-input. */
export async function offerSetUp(reading: Reading, query: QueryOf<typeof contract>): Promise<BasketSetUp> {
  const part = await named(reading, query);
  const route = part.id === null ? [] : ((await requirementsOfParts(reading, [part.id])).get(part.id) ?? []);
  const day = plantDay(await databaseNow(reading), await plantZone(reading));
  const operations: BasketSetUp['operations'] = [];
  for (const { row, asked, windows } of await operationsOf(reading, part.partNumber)) {
    const standing = route.find(({ key }) => key === row.key);
    const equipment = await equipmentOfMethod(reading, row.method, day);
    operations.push({
      key: row.key,
      operation: row.operation,
      title: row.title,
      method: row.method,
      technique: row.technique,
      refusal: basketRefusal(asked),
      waiting: part.id === null || (standing !== undefined && !metStates.includes(standing.state)),
      windows: [...windows],
      neededActs: neededActs(row.method, false),
      indicator: asked.indicator?.required ?? null,
      equipment: equipment.map(({ id, number, title }) => ({ id, number, title })),
      runs: row.technique === null ? [] : await openRunsOf(reading, row.technique),
    });
  }
  return {
    partNumber: part.partNumber,
    title: part.title,
    serial: part.serial,
    operations,
    people: await benchPeople(reading),
  };
}

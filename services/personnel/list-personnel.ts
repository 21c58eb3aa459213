import { peopleWhoInspect } from '@/db/repositories/accounts';
import { authorisationsAfter, visionTestsAfter } from '@/db/repositories/personnel';
import { reading as pool, type Reading } from '@/db/work';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import type {
  listAuthorisations as authorisationsContract,
  listVisionTests as visionContract,
} from '@/services/contracts/personnel';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { plantToday } from './plant-today';

function keyFrom(after: string | undefined): readonly [string, string] | null {
  const parts = partsOfKey(after, 2);
  return parts && [String(parts[0]), String(parts[1])];
}

/** Authorisations by person, each with what it counts for today. */
export async function listAuthorisations(
  reading: Reading,
  { limit, after, ...filter }: QueryOf<typeof authorisationsContract>,
): Promise<AnswerOf<typeof authorisationsContract>> {
  const today = await plantToday(reading);
  const rows = await authorisationsAfter(reading, today, filter, { after: keyFrom(after), limit: limit + 1 });
  return pageOf(
    rows,
    limit,
    ({ person, id }) => [person.name, id],
    (row) => row,
  );
}

/** Vision tests by person; with `newest` only the last of each kind. */
export async function listVisionTests(
  reading: Reading,
  { limit, after, person, newest }: QueryOf<typeof visionContract>,
): Promise<AnswerOf<typeof visionContract>> {
  const today = await plantToday(reading);
  const filter = { person, newest: newest === 'true' };
  const rows = await visionTestsAfter(reading, today, filter, { after: keyFrom(after), limit: limit + 1 });
  return pageOf(
    rows,
    limit,
    ({ person: { name }, id }) => [name, id],
    (row) => row,
  );
}

/** The people an authorisation can be prepared for, for the page. */
export function peopleToAuthorise(): Promise<{ id: string; name: string }[]> {
  return peopleWhoInspect(pool());
}

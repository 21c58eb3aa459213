import { newestEvents } from '@/db/repositories/record';
import type { Reading } from '@/db/work';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import type { listRecord as contract } from '@/services/contracts/trace';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { Problem } from '@/services/http/problem';

/** The journal, newest first; its place in the journal is the key, so new entries never shift a page. */
export async function listRecord(reading: Reading, query: QueryOf<typeof contract>): Promise<AnswerOf<typeof contract>> {
  const before = partsOfKey(query.after, 1);
  if (before && typeof before[0] !== 'number')
    throw new Problem('invalid-input', 'after: is not the `next` of a page', [
      { path: 'after', message: 'is not the `next` of a page' },
    ]);
  const rows = await newestEvents(reading, query.limit + 1, before && Number(before[0]));
  return pageOf(
    rows,
    query.limit,
    ({ seq }) => [seq],
    (row) => row,
  );
}

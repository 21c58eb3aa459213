import { listDrawings as rowsOf } from '@/db/repositories/drawings';
import type { Reading } from '@/db/work';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import type { listDrawings as contract } from '@/services/contracts/plans';
import { pageOf, partsOfKey } from '@/services/http/keyset';

/** Drawings by number, keyset-paged. */
export async function listDrawings(reading: Reading, query: QueryOf<typeof contract>): Promise<AnswerOf<typeof contract>> {
  const after = partsOfKey(query.after, 1);
  const rows = await rowsOf(reading, query.limit + 1, String(after?.[0] ?? ''));
  return pageOf(
    rows,
    query.limit,
    ({ number }) => [number],
    (row) => row,
  );
}

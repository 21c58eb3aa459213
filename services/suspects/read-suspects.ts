import { groupsOfList, inspectionsOfList, suspectListById, suspectListsBefore } from '@/db/repositories/suspects';
import type { Reading } from '@/db/work';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import type { listSuspects as listContract, readSuspects as readContract, SuspectList } from '@/services/contracts/suspects';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';

/** Suspect lists, newest first. */
export async function listSuspects(
  reading: Reading,
  { limit, after, open, equipment, scope }: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const key = partsOfKey(after, 2);
  const before = key && ([String(key[0]), String(key[1])] as const);
  const filter = { equipment, scope, open: open === undefined ? undefined : open === 'true' };
  const rows = await suspectListsBefore(reading, filter, limit + 1, before);
  return pageOf(
    rows,
    limit,
    ({ openedAt, id }) => [openedAt, id],
    (row) => row,
  );
}

/** A list with its groups and a page of its inspections, shipped ones first. Problem not-found. */
export async function suspectListWith(
  reading: Reading,
  listId: string,
  { limit, after }: QueryOf<typeof readContract> = { limit: 200 },
): Promise<SuspectList> {
  const head = await suspectListById(reading, listId);
  if (!head) throw notFound('Suspect list');
  const key = partsOfKey(after, 3);
  const from = key && ([Number(key[0]), String(key[1]), String(key[2])] as const);
  const rows = await inspectionsOfList(reading, listId, limit + 1, from);
  const page = pageOf(
    rows,
    limit,
    ({ gone, part, number }) => [gone ? 0 : 1, part.serial, number],
    (row) => row,
  );
  return { ...head, groups: await groupsOfList(reading, listId), ...page };
}

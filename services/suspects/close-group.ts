import { takeRows } from '@/db/lock';
import { isLevelThree } from '@/db/repositories/personnel';
import { groupsOfList, membersOfGroup, suspectListById } from '@/db/repositories/suspects';
import { execute, select, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import type { closeSuspectGroup as contract, SuspectListHead, SuspectList } from '@/services/contracts/suspects';
import { holdIfReached } from '@/services/holds/keep-holds';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { metStates, recountPart } from '@/services/parts/recount-part';
import { plantToday } from '@/services/personnel/plant-today';
import { suspectListWith } from './read-suspects';

type By = Work & { readonly actor: Actor };
type Member = Awaited<ReturnType<typeof membersOfGroup>>[number];

async function requireLevelThree(work: By, list: SuspectListHead): Promise<void> {
  const { day } = await plantToday(work);
  if (!(await isLevelThree(work, work.actor.id, list.method, list.technique, day)))
    throw new Problem('not-permitted', `Only a level 3 of ${list.method} says that there was no effect.`);
}

/** Sends the operation of every part that still rests on a suspect inspection to be done again. */
async function repeat(work: By, list: SuspectListHead, members: readonly Member[]): Promise<void> {
  const partIds = members.map(({ partId }) => partId);
  const gone = await select<{ serial: string; state: string }>(
    work,
    `SELECT serial, state FROM parts WHERE id IN (?) AND state IN ('released', 'shipped') ORDER BY serial LIMIT 5`,
    [partIds],
  );
  if (gone.length > 0)
    throw new Problem(
      'state-refused',
      `${gone.map(({ serial, state }) => `${serial} is ${state}`).join(', ')}: a part that has gone is recalled before it is inspected again.`,
    );
  for (const { partId, inspectionId, requirementId } of members)
    await execute(
      work,
      `UPDATE part_requirements SET state = 'to-be-repeated', reason = ? WHERE part_id = ? AND requirement_id = ? AND inspection_id = ? AND state IN (?)`,
      [`void: suspect list ${list.number}, ${list.named}`.slice(0, 400), partId, requirementId, inspectionId, metStates],
    );
  for (const partId of new Set(partIds)) await recountPart(work, partId);
}

/**
 * Closes one group and lifts what it held. `no-effect` is said by a level 3 of the method who signed none of it;
 * `repeat` sends the operation to be inspected again. Problems: not-found, not-permitted, state-refused.
 */
export async function closeGroup(
  work: By,
  listId: string,
  groupId: string,
  { decision, reason }: BodyOf<typeof contract>,
): Promise<Recorded<SuspectList>> {
  const list = await suspectListById(work, listId);
  const known = (await groupsOfList(work, listId)).find(({ id }) => id === groupId);
  if (!list || !known) throw notFound('Suspect group');
  const members = await membersOfGroup(work, groupId);
  const partIds = [...new Set(members.map(({ partId }) => partId))];
  await takeRows(work, 'parts', partIds);
  if (members.some(({ signedBy }) => signedBy === work.actor.id))
    throw new Problem('not-permitted', 'You signed an inspection of this group; somebody else decides about it.');
  if (decision === 'no-effect') await requireLevelThree(work, list);
  const closed = await execute(
    work,
    'UPDATE suspect_groups SET closed_how = ?, closed_reason = ?, closed_by = ?, closed_at = ?, version = version + 1 WHERE id = ? AND closed_at IS NULL',
    [decision, reason, work.actor.id, sqlTimeOf(work.now), groupId],
  );
  if (closed === 0) throw new Problem('state-refused', 'This group is closed already.');
  if (decision === 'repeat') await repeat(work, list, members);
  for (const partId of partIds) await holdIfReached(work, partId);
  const { number, named } = list;
  const { operation, title, drawing } = known;
  return {
    answer: await suspectListWith(work, listId),
    events: [
      {
        subject: { kind: 'suspect-list', id: listId },
        also: partIds.map((id) => ({ kind: 'part', id })),
        details: { number, named, drawing, operation, title, decision, reason, parts: partIds.length },
      },
    ],
  };
}

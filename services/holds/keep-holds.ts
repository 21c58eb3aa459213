import { newId, nextNumber } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { holdById, listHolds as rowsOf, partsUnder } from '@/db/repositories/holds';
import { lotById, lotsAbove } from '@/db/repositories/lots';
import { holdsOver } from '@/db/repositories/part-story';
import { partById } from '@/db/repositories/parts';
import { execute, selectOne, sqlTimeOf, type Reading, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf, QueryOf } from '@/services/contracts/operation';
import type { Hold, listHolds as listContract, placeHold as placeContract } from '@/services/contracts/parts';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';

type By = Work & { readonly actor: Actor };

/** Holds, newest first. */
export async function listHolds(reading: Reading, query: QueryOf<typeof listContract>): Promise<AnswerOf<typeof listContract>> {
  const before = partsOfKey(query.after, 2);
  const open = query.open === undefined ? null : query.open === 'true';
  const rows = await rowsOf(reading, open, query.limit + 1, before && [String(before[0]), String(before[1])]);
  return pageOf(
    rows,
    query.limit,
    ({ placedAt, id }) => [placedAt, id],
    (row) => row,
  );
}

async function requireTarget(work: Work, target: BodyOf<typeof placeContract>['target']): Promise<void> {
  const found = target.kind === 'part' ? await partById(work, target.id) : await lotById(work, target.id);
  if (!found) throw notFound(target.kind === 'part' ? 'Part' : 'Lot');
}

/** Takes the parts a target reaches, then the lot, then the parts that got their serials while the lot was waited for. */
async function takeReached(work: Work, target: { readonly kind: 'part' | 'lot'; readonly id: string }): Promise<string[]> {
  const first = await partsUnder(work, target);
  await takeRows(work, 'parts', first);
  if (target.kind === 'part') return first;
  await takeRows(work, 'lots', [target.id]);
  const now = await partsUnder(work, target);
  const known = new Set(first);
  await takeRows(
    work,
    'parts',
    now.filter((id) => !known.has(id)),
  );
  return now;
}

/**
 * Holds a part, or a lot with everything downstream. The part rows are written first, in id order, and the lot after
 * them: a release at the same instant either sees the hold or was first and is answered as a recall.
 */
export async function placeHold(work: By, body: BodyOf<typeof placeContract>): Promise<Recorded<Hold>> {
  await requireTarget(work, body.target);
  const partIds = await takeReached(work, body.target);
  const id = newId();
  const number = await nextNumber(work, 'H');
  await execute(
    work,
    'INSERT INTO holds (id, number, target_kind, target_id, reason, placed_by, placed_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [id, number, body.target.kind, body.target.id, body.reason, work.actor.id, sqlTimeOf(work.now)],
  );
  if (partIds.length > 0) await execute(work, 'UPDATE parts SET held = 1 WHERE id IN (?)', [partIds]);
  const hold = await holdById(work, id);
  if (!hold) throw new Error('the hold just placed is not there');
  return {
    answer: hold,
    events: [
      {
        subject: { kind: body.target.kind, id: body.target.id },
        also: [
          { kind: 'hold', id },
          ...partIds.filter((partId) => partId !== body.target.id).map((partId) => ({ kind: 'part', id: partId })),
        ],
        details: {
          number,
          reason: body.reason,
          parts: partIds.length,
          recall: hold.recall.map(({ serial, certificate }) => ({ serial, certificate })),
        },
      },
    ],
  };
}

/** Lifts a hold; a part stays held while another hold reaches it. Problems: not-found, state-refused. */
export async function liftHold(work: By, holdId: string, reason: string): Promise<Recorded<Hold>> {
  const known = await holdById(work, holdId);
  if (!known) throw notFound('Hold');
  const partIds = await takeReached(work, known.target);
  const lifted = await execute(
    work,
    'UPDATE holds SET lifted_by = ?, lifted_at = ?, lifted_reason = ?, version = version + 1 WHERE id = ? AND lifted_at IS NULL',
    [work.actor.id, sqlTimeOf(work.now), reason, holdId],
  );
  if (lifted === 0) throw new Problem('state-refused', `Hold ${known.number} was already lifted.`);
  for (const partId of partIds) await holdIfReached(work, partId);
  const hold = await holdById(work, holdId);
  if (!hold) throw notFound('Hold');
  return {
    answer: hold,
    events: [
      {
        subject: { kind: known.target.kind, id: known.target.id },
        also: [
          { kind: 'hold', id: holdId },
          ...partIds.filter((id) => id !== known.target.id).map((id) => ({ kind: 'part', id })),
        ],
        details: { number: known.number, reason },
      },
    ],
  };
}

/** Takes the mark off a part that no open hold or suspect list reaches any more. */
export async function holdIfReached(work: Work, partId: string): Promise<void> {
  const row = await selectOne<{ clusterId: string }>(work, 'SELECT cluster_id AS clusterId FROM parts WHERE id = ?', [partId]);
  if (!row) return;
  const lots = await lotsAbove(work, row.clusterId);
  const others = await holdsOver(
    work,
    partId,
    lots.map(({ id }) => id),
  );
  if (others.length === 0) await execute(work, 'UPDATE parts SET held = 0 WHERE id = ?', [partId]);
}

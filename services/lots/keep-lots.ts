import { newId } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { insert, insertAll } from '@/db/models/table';
import { listLots as rowsOf, lotById, lotParents, lots, lotsAbove, progressBelow } from '@/db/repositories/lots';
import { holdsOver } from '@/db/repositories/part-story';
import { execute, select, type Reading, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf, QueryOf } from '@/services/contracts/operation';
import type {
  createLot as createContract,
  listLotParts as partsContract,
  listLots as listContract,
  Lot,
  LotStory,
  splitLot as splitContract,
} from '@/services/contracts/parts';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { pageOfParts } from '@/services/parts/list-parts';

type By = Work & { readonly actor: Actor };

/** Lots newest first. */
export async function listLots(reading: Reading, query: QueryOf<typeof listContract>): Promise<AnswerOf<typeof listContract>> {
  const before = partsOfKey(query.after, 2);
  const rows = await rowsOf(reading, query, query.limit + 1, before && [String(before[0]), String(before[1])]);
  return pageOf(
    rows,
    query.limit,
    ({ createdAt, id }) => [createdAt, id],
    (row) => row,
  );
}

/** One lot with the holds over it and how far everything downstream has come. Problem not-found. */
export async function readLot(reading: Reading, lotId: string): Promise<LotStory> {
  const lot = await requireLot(reading, lotId);
  const above = await lotsAbove(reading, lotId);
  // A lot is no part: its own id only fills the place of one.
  const holds = await holdsOver(
    reading,
    lotId,
    above.map(({ id }) => id),
  );
  return { ...lot, holds, progress: await progressBelow(reading, lotId) };
}

async function requireLot(reading: Reading, lotId: string): Promise<Lot> {
  const lot = await lotById(reading, lotId);
  if (!lot) throw notFound('Lot');
  return lot;
}

/** Everything downstream of a lot. */
export async function listLotParts(
  reading: Reading,
  lotId: string,
  query: QueryOf<typeof partsContract>,
): Promise<AnswerOf<typeof partsContract>> {
  await requireLot(reading, lotId);
  return pageOfParts(reading, { belowLotId: lotId }, { sort: 'serial', limit: query.limit, after: query.after });
}

/** Enters a lot; its parents must exist. */
export async function createLot(work: By, body: BodyOf<typeof createContract>): Promise<Recorded<Lot>> {
  const parents = [...new Set(body.parents)];
  const known = parents.length === 0 ? [] : await select<{ id: string }>(work, 'SELECT id FROM lots WHERE id IN (?)', [parents]);
  const ids = new Set(known.map(({ id }) => id));
  const errors = body.parents.flatMap((id, at) =>
    ids.has(id) ? [] : [{ path: `parents.${String(at)}`, message: 'is not a known lot' }],
  );
  if (errors.length > 0) throw new Problem('invalid-input', 'parents: name lots that are not known', errors);
  const same = await select<{ id: string }>(work, 'SELECT id FROM lots WHERE kind = ? AND number = ?', [body.kind, body.number]);
  if (same.length > 0)
    throw new Problem('already-exists', `There already is a ${body.kind} ${body.number}.`, [
      { path: 'number', message: 'is already entered' },
    ]);
  const id = newId();
  await insert(work, lots, {
    id,
    kind: body.kind,
    number: body.number,
    quantity: body.quantity,
    attributes: body.attributes,
    version: 0,
    createdBy: work.actor.id,
    createdAt: work.now,
  });
  await insertAll(
    work,
    lotParents,
    parents.map((parentId) => ({ lotId: id, parentId, fromAt: work.now })),
  );
  return {
    answer: await requireLot(work, id),
    events: [
      {
        subject: { kind: 'lot', id },
        also: parents.map((parentId) => ({ kind: 'lot', id: parentId })),
        details: { kind: body.kind, number: body.number, quantity: body.quantity },
      },
    ],
  };
}

/** Takes a quantity into a new lot of the same kind and origin; the remainder stays. */
export async function splitLot(work: By, lotId: string, body: BodyOf<typeof splitContract>): Promise<Recorded<Lot>> {
  await takeRows(work, 'lots', [lotId]);
  const lot = await requireLot(work, lotId);
  if (body.quantity >= lot.quantity)
    throw new Problem('invalid-input', 'quantity: must leave a remainder', [
      { path: 'quantity', message: `must be less than ${String(lot.quantity)}, so that a remainder stays` },
    ]);
  await execute(work, 'UPDATE lots SET quantity = quantity - ? WHERE id = ?', [body.quantity, lotId]);
  const made = await createLot(work, {
    kind: lot.kind,
    number: body.number,
    quantity: body.quantity,
    parents: [lotId],
    attributes: lot.attributes,
  });
  return {
    answer: made.answer,
    events: [
      {
        subject: { kind: 'lot', id: lotId },
        also: [{ kind: 'lot', id: made.answer.id }],
        details: { number: lot.number, into: body.number, quantity: body.quantity },
      },
    ],
  };
}

import { takeRows } from '@/db/lock';
import {
  calibrationsOf,
  equipmentAfter,
  equipmentById,
  keepEquipment,
  markRetired,
  type DueDay,
} from '@/db/repositories/equipment';
import type { Reading, Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import {
  calibrationSoonDays,
  type addEquipment as addContract,
  type Equipment,
  type listEquipment as listContract,
} from '@/services/contracts/equipment';
import type { AnswerOf, BodyOf, QueryOf } from '@/services/contracts/operation';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { plantToday } from '@/services/personnel/plant-today';

type By = Work & { readonly actor: Actor };

/** The plant's day, and how near a due day is flagged. */
export async function dueDay(reading: Reading): Promise<DueDay> {
  return { day: (await plantToday(reading)).day, soonDays: calibrationSoonDays };
}

/** Equipment, what needs somebody first. */
export async function listEquipment(
  reading: Reading,
  { limit, after, method, retired, number }: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const key = partsOfKey(after, 2);
  const from = key && ([String(key[0]), String(key[1])] as const);
  const filter = { method, number, retired: retired === undefined ? undefined : retired === 'true' };
  const rows = await equipmentAfter(reading, await dueDay(reading), filter, limit + 1, from);
  return pageOf(
    rows,
    limit,
    ({ sortKey, id }) => [sortKey, id],
    ({ sortKey: _place, ...row }) => row,
  );
}

/** One piece of equipment with its calibrations. Problem not-found. */
export async function readEquipment(reading: Reading, equipmentId: string): Promise<Equipment> {
  const row = await equipmentById(reading, await dueDay(reading), equipmentId);
  if (!row) throw notFound('Equipment');
  const { sortKey: _place, retiredAt, retiredById, retiredByName, retiredReason, ...head } = row;
  const by = retiredById === null ? null : { id: retiredById, name: retiredByName ?? '' };
  return {
    ...head,
    retired: retiredAt === null ? null : { at: retiredAt, by, reason: retiredReason },
    calibrations: await calibrationsOf(reading, equipmentId),
  };
}

/** Enters equipment; it counts once a calibration is on record. Problem already-exists. */
export async function addEquipment(work: By, body: BodyOf<typeof addContract>): Promise<Recorded<Equipment>> {
  const id = await keepEquipment(work, { ...body, location: body.location ?? null });
  return {
    answer: await readEquipment(work, id),
    headers: { location: `/api/equipment/${id}` },
    events: [{ subject: { kind: 'equipment', id }, details: { ...body } }],
  };
}

/** Takes equipment out of use. Problems: not-found, state-refused. */
export async function retireEquipment(work: By, equipmentId: string, reason: string): Promise<Recorded<Equipment>> {
  await takeRows(work, 'equipment', [equipmentId]);
  const { number, retired } = await readEquipment(work, equipmentId);
  if (retired) throw new Problem('state-refused', `${number} is retired already.`);
  await markRetired(work, equipmentId, work.actor.id, reason);
  return {
    answer: await readEquipment(work, equipmentId),
    events: [{ subject: { kind: 'equipment', id: equipmentId }, details: { number, reason } }],
  };
}

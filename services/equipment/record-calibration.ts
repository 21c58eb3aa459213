import { takeRows } from '@/db/lock';
import { keepCalibration, type NewCalibration } from '@/db/repositories/equipment';
import type { Interval } from '@/db/repositories/suspects';
import { databaseNow, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { Calibration, Equipment, recordCalibration as contract } from '@/services/contracts/equipment';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import { compare, rationalOf } from '@/services/engine/quantity/decimal';
import { unitOf } from '@/services/engine/quantity/units';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { plantToday } from '@/services/personnel/plant-today';
import { openSuspects, takeLeaning } from '@/services/suspects/open-suspects';
import { readEquipment } from './keep-equipment';

type By = Work & { readonly actor: Actor };
type Body = BodyOf<typeof contract>;

function rangeFaults({ rangeLower, rangeUpper, rangeUnit, bias }: Body): FieldError[] {
  const asks = rangeLower ?? rangeUpper ?? bias;
  return [
    ...(asks !== undefined && rangeUnit === undefined
      ? [{ path: 'rangeUnit', message: 'is needed with a range or a bias' }]
      : []),
    ...(rangeUnit !== undefined && !unitOf(rangeUnit)
      ? [{ path: 'rangeUnit', message: `${rangeUnit} is not a known unit` }]
      : []),
    ...(rangeLower !== undefined && rangeUpper !== undefined && compare(rationalOf(rangeLower), rationalOf(rangeUpper)) >= 0
      ? [{ path: 'rangeUpper', message: 'must be above the lower end' }]
      : []),
  ];
}

/** The calibration that counted before: of the same function and range, or of the whole equipment. */
function before(calibrations: readonly Calibration[], body: Body): Calibration | undefined {
  return calibrations.find(
    (one) =>
      one.function === 'all' ||
      (one.function === body.function &&
        one.rangeLower === (body.rangeLower ?? null) &&
        one.rangeUpper === (body.rangeUpper ?? null) &&
        one.rangeUnit === (body.rangeUnit ?? null)),
  );
}

function refuse(equipment: Equipment, body: Body, today: string): void {
  if (equipment.retired) throw new Problem('state-refused', `${equipment.number} is retired.`);
  const last = before(equipment.calibrations, body);
  const errors = [
    ...rangeFaults(body),
    ...(body.calibratedOn > today ? [{ path: 'calibratedOn', message: 'lies in the future' }] : []),
    ...(last && body.calibratedOn < last.calibratedOn
      ? [{ path: 'calibratedOn', message: `is before the last calibration, of ${last.calibratedOn}` }]
      : []),
    ...(body.dueOn <= body.calibratedOn && body.asLeft === 'good'
      ? [{ path: 'dueOn', message: 'must be after the calibration' }]
      : []),
  ];
  if (errors.length > 0)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path}: ${message}`).join('; '), errors);
}

/** What an as-found failure casts back on: to the calibration before, of which the day is included. */
function intervalOf(equipment: Equipment, body: Body): Interval {
  return {
    kind: 'equipment',
    target: equipment.id,
    since: null,
    sinceDay: before(equipment.calibrations, body)?.calibratedOn ?? null,
    // Left good, it counts again from the next day on; of its own day nobody knows the hour.
    untilDay: body.asLeft === 'good' ? body.calibratedOn : null,
  };
}

function rowOf(body: Body): NewCalibration {
  const { rangeLower = null, rangeUpper = null, rangeUnit = null, bias = null, certificate = null, ...rest } = body;
  return { ...rest, rangeLower, rangeUpper, rangeUnit, bias, certificate };
}

function reasonOf({ number }: Equipment, { function: done, bias, rangeUnit, calibratedOn }: Body): string {
  const by = bias === undefined ? '' : `, reading ${bias} ${rangeUnit ?? ''} wrong`;
  return `${number} was found out of tolerance on ${calibratedOn}${done === 'all' ? '' : ` (${done})`}${by}`;
}

/**
 * Records a calibration. Found failed, every part that rests on a measurement since the one before is held in the same
 * transaction: part rows first, in id order, then the equipment; a release at the same instant sees the hold, or was
 * first and is listed as gone. Problems: not-found, state-refused (retired), invalid-input.
 */
export async function recordCalibration(work: By, equipmentId: string, body: Body): Promise<Recorded<AnswerOf<typeof contract>>> {
  const known = await readEquipment(work, equipmentId);
  const { day } = await plantToday(work);
  refuse(known, body, day);
  const failed = body.asFound === 'failed';
  const first = failed ? await takeLeaning(work, intervalOf(known, body)) : [];
  await takeRows(work, 'equipment', [equipmentId]);
  // Somebody may have recorded another calibration, or signed with this equipment, while the rows were waited for.
  const equipment = await readEquipment(work, equipmentId);
  refuse(equipment, body, day);
  const taken = new Set(first.map(({ partId }) => partId));
  const leaning = failed ? await takeLeaning(work, intervalOf(equipment, body), taken) : [];
  const at = await databaseNow(work);
  const calibration = await keepCalibration(work, equipmentId, rowOf(body), work.actor.id, at);
  const sinceDay = before(equipment.calibrations, body)?.calibratedOn;
  const opened = await openSuspects(
    work,
    {
      ...{ cause: 'calibration', causeId: calibration, method: equipment.method, technique: null, equipmentId, scope: null },
      ...{ named: equipment.number, reason: reasonOf(equipment, body), until: at },
      since: sinceDay === undefined ? null : `${sinceDay}T00:00:00.000000Z`,
    },
    leaning,
  );
  return {
    answer: { equipment: await readEquipment(work, equipmentId), calibration, suspects: opened?.list ?? null },
    events: [
      {
        subject: { kind: 'equipment', id: equipmentId },
        details: { number: equipment.number, calibration, ...body, suspects: opened?.list.number ?? null },
      },
      ...(opened ? [opened.event] : []),
    ],
  };
}

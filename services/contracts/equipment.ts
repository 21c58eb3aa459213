import { z } from 'zod';
import { day, decimalText, id, instant, mark, method, page, pageQuery, words } from './common';
import { operation } from './operation';
import { suspectList } from './suspects';

const person = z.object({ id, name: z.string() });

const equipmentState = z.enum(['failed', 'uncalibrated', 'lapsed', 'due-soon', 'valid', 'retired']);

/** Days before a calibration is due at which it is flagged. */
export const calibrationSoonDays = 30;

const equipmentHead = z.object({
  id,
  number: z.string(),
  title: z.string(),
  kind: z.string(),
  method: z.string(),
  location: z.string().nullable(),
  state: equipmentState,
  calibratedOn: day.nullable(),
  /** The earliest due day of its functions. */
  dueOn: day.nullable(),
  openSuspects: z.int(),
});
export type EquipmentHead = z.output<typeof equipmentHead>;

const calibration = z.object({
  id,
  function: z.string(),
  rangeLower: z.string().nullable(),
  rangeUpper: z.string().nullable(),
  rangeUnit: z.string().nullable(),
  asFound: z.enum(['good', 'failed', 'not-taken']),
  asLeft: z.enum(['good', 'failed']),
  bias: z.string().nullable(),
  calibratedOn: day,
  dueOn: day,
  certificate: z.string().nullable(),
  recordedBy: person.nullable(),
  recordedAt: instant,
  /** The newest of its function and range: it decides whether the equipment counts. */
  current: z.boolean(),
});
export type Calibration = z.output<typeof calibration>;

const equipment = equipmentHead.extend({
  retired: z.object({ at: instant, by: person.nullable(), reason: z.string().nullable() }).nullable(),
  inspections: z.int(),
  calibrations: z.array(calibration),
});
export type Equipment = z.output<typeof equipment>;

const byId = z.object({ id });

export const listEquipment = operation({
  name: 'list-equipment',
  method: 'GET',
  path: '/api/equipment',
  summary: 'Equipment: what is failed, lapsed or due soonest first, retired last.',
  changes: false,
  query: pageQuery.extend({
    method: method.optional(),
    retired: z.enum(['true', 'false']).optional(),
    /** How the number begins. */
    number: z.string().max(40).optional(),
  }),
  response: page(equipmentHead),
  status: 200,
});

export const addEquipment = operation({
  name: 'add-equipment',
  method: 'POST',
  path: '/api/equipment',
  summary: 'Enter a gauge, lamp, detector, block or other equipment; it counts once a calibration is on record.',
  changes: true,
  body: z.strictObject({ number: mark, title: words(160), kind: mark, method, location: words(80).optional() }),
  response: equipment,
  status: 201,
});

export const readEquipment = operation({
  name: 'read-equipment',
  method: 'GET',
  path: '/api/equipment/{id}',
  summary: 'One piece of equipment with its calibrations, newest first.',
  changes: false,
  params: byId,
  response: equipment,
  status: 200,
});

export const recordCalibration = operation({
  name: 'record-calibration',
  method: 'POST',
  path: '/api/equipment/{id}/calibrations',
  summary:
    'Record a calibration of one function and range. Found failed: everything that leaned on it since the last good one is answered as a suspect list and held.',
  changes: true,
  params: byId,
  body: z.strictObject({
    function: words(80),
    rangeLower: decimalText.optional(),
    rangeUpper: decimalText.optional(),
    rangeUnit: words(12).optional(),
    asFound: z.enum(['good', 'failed', 'not-taken']),
    asLeft: z.enum(['good', 'failed']),
    /** What it read wrong by, as found, in the range's unit. */
    bias: decimalText.optional(),
    calibratedOn: day,
    dueOn: day,
    certificate: words(80).optional(),
  }),
  response: z.object({ equipment, calibration: id, suspects: suspectList.nullable() }),
  status: 201,
});

export const retireEquipment = operation({
  name: 'retire-equipment',
  method: 'POST',
  path: '/api/equipment/{id}/retirement',
  summary: 'Take equipment out of use; what was done with it stays.',
  changes: true,
  params: byId,
  body: z.strictObject({ reason: words(400, 5) }),
  response: equipment,
  status: 200,
});

import { addEquipment } from '@/services/equipment/keep-equipment';
import { recordCalibration } from '@/services/equipment/record-calibration';
import { recordCheck } from '@/services/process-checks/record-check';
import { recordMeasurementProcess } from '@/services/techniques/record-measurement-process';
import { databaseNow } from '../work';
import { castMember, type Cast } from './demo-people';
import { perform } from './perform';

interface Gauge {
  readonly number: string;
  readonly title: string;
  readonly kind: string;
  readonly method: 'ultrasonic-thickness' | 'penetrant' | 'radiography' | 'mass';
  readonly calibratedDaysAgo?: number;
  readonly dueInDays: number;
  readonly range?: readonly [lower: string, upper: string, unit: string];
}

const gauges: readonly Gauge[] = [
  {
    number: 'UT-07',
    title: 'Ultrasonic thickness gauge, 15 MHz delay line',
    kind: 'ut-gauge',
    method: 'ultrasonic-thickness',
    dueInDays: 120,
    range: ['0.5', '10', 'mm'],
  },
  {
    number: 'UT-04',
    title: 'Ultrasonic thickness gauge, 10 MHz delay line',
    kind: 'ut-gauge',
    method: 'ultrasonic-thickness',
    calibratedDaysAgo: 170,
    dueInDays: 12,
    range: ['0.5', '10', 'mm'],
  },
  {
    number: 'SB-02',
    title: 'Step block 1-2-3 mm, columnar nickel',
    kind: 'step-block',
    method: 'ultrasonic-thickness',
    dueInDays: 300,
  },
  { number: 'UV-11', title: 'UV-A lamp, booth 3', kind: 'uv-a-lamp', method: 'penetrant', dueInDays: 60 },
  { number: 'UV-08', title: 'UV-A lamp, spare', kind: 'uv-a-lamp', method: 'penetrant', calibratedDaysAgo: 371, dueInDays: -6 },
  { number: 'DD-02', title: 'Digital detector 2, 100 µm', kind: 'digital-detector', method: 'radiography', dueInDays: 200 },
  { number: 'XT-02', title: 'X-ray tube 225 kV, cell 2', kind: 'x-ray-tube', method: 'radiography', dueInDays: 21 },
  { number: 'BA-01', title: 'Balance 2 kg', kind: 'balance', method: 'mass', dueInDays: 250, range: ['1', '2000', 'g'] },
];

export type Gauges = Readonly<Record<string, string>>;

/** Serials whose walls were measured with the gauge that is later found out of tolerance. */
export const measuredWithOldGauge: readonly string[] = ['B20103', 'B20106', 'T10420', 'G30101'];

function dayFrom(now: string, days: number): string {
  return new Date(Date.parse(now) + days * 86_400_000).toISOString().slice(0, 10);
}

async function addGauge(people: Cast, now: string, gauge: Gauge): Promise<string> {
  const administrator = castMember(people, 'administrator');
  const { number, title, kind, method, calibratedDaysAgo = 40, dueInDays, range } = gauge;
  const { id } = await perform(administrator, 'equipment-added', (work) =>
    addEquipment(work, { number, title, kind, method, location: 'Inspection hall' }),
  );
  await perform(administrator, 'calibration-recorded', (work) =>
    recordCalibration(work, id, {
      function: range ? 'reading' : 'all',
      ...(range ? { rangeLower: range[0], rangeUpper: range[1], rangeUnit: range[2] } : {}),
      ...{ asFound: 'good', asLeft: 'good', calibratedOn: dayFrom(now, -calibratedDaysAgo), dueOn: dayFrom(now, dueInDays) },
      certificate: `K-${number}-26`,
    }),
  );
  return id;
}

const checks = [
  ['booth 3', 'penetrant', 'Known-defect panel', 72, 0],
  ['booth 3', 'penetrant', 'UV-A irradiance at the part', 72, 0, '1850', 'µW/cm²'],
  ['booth 3', 'penetrant', 'Ambient light', 72, 0, '8', 'lx'],
  ['line 1', 'penetrant', 'Rinse, dryer and developer', 72, 0],
  ['detector 2', 'radiography', 'Stability and bad-pixel map', 72, 0],
  ['detector 1', 'radiography', 'Stability and bad-pixel map', 8, 20],
  ['booth 1', 'penetrant', 'Ambient light', 8, 2, '34', 'lx'],
] as const;

async function seedChecks(people: Cast, now: string): Promise<void> {
  for (const [scope, method, title, validHours, hoursAgo, value, unit] of checks) {
    const at = new Date(Date.parse(now) - Math.max(hoursAgo * 3_600_000, 1_800_000)).toISOString();
    // Booth 1 is too bright: its check fails, and nothing had been inspected there.
    const result = scope === 'booth 1' ? 'failed' : 'good';
    const read = value === undefined ? {} : { value, unit };
    await perform(castMember(people, 'inspector'), 'check-recorded', (work) =>
      recordCheck(work, { scope, method, title, kind: 'opening', result, at, validHours, ...read }),
    );
  }
}

/** Equipment with calibrations, uncertainties of the wall-thickness process, and the checks that cover today. */
export async function seedEquipment(people: Cast, stations: readonly string[]): Promise<Gauges> {
  const now = await databaseNow();
  const found: Record<string, string> = {};
  for (const gauge of gauges) found[gauge.number] = await addGauge(people, now, gauge);
  const validFrom = dayFrom(now, -300);
  const wall = { technique: 'UT-110', gaugeKind: 'ut-gauge', expanded: '0.020', k: '2', unit: 'mm', validFrom };
  for (const characteristic of stations)
    await perform(castMember(people, 'reviewer'), 'measurement-process-recorded', (work) =>
      recordMeasurementProcess(work, {
        ...{ ...wall, characteristic },
        basis: 'budget UB-14: gauge, block, velocity, repeatability',
      }),
    );
  await perform(castMember(people, 'reviewer'), 'measurement-process-recorded', (work) =>
    recordMeasurementProcess(work, {
      ...{ technique: 'MA-030', characteristic: 'M1', gaugeKind: 'balance', expanded: '0.1', k: '2', unit: 'g', validFrom },
      basis: 'budget UB-20',
    }),
  );
  await seedChecks(people, now);
  return found;
}

/** The gauge comes back from calibration: it read high. What was measured with it is held, one part has gone. */
export async function findGaugeOut(people: Cast, gauges: Gauges): Promise<void> {
  const now = await databaseNow();
  await perform(castMember(people, 'administrator'), 'calibration-recorded', (work) =>
    recordCalibration(work, gauges['UT-04'] ?? '', {
      ...{ function: 'reading', rangeLower: '0.5', rangeUpper: '10', rangeUnit: 'mm' },
      ...{ asFound: 'failed', asLeft: 'good', bias: '0.031', calibratedOn: dayFrom(now, 0), dueOn: dayFrom(now, 180) },
      certificate: 'K-UT-04-27',
    }),
  );
}

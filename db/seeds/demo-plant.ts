import { newId } from '../identity';
import { execute, inTransaction, sqlTimeOf, type Work } from '../work';
import { castMember, type Cast } from './demo-people';

/** The foundry and its two customers; answers the customers' ids by code. */
export async function seedPlant(): Promise<Record<'TARN' | 'CORV', string>> {
  return inTransaction(null, async (work) => {
    await execute(work, 'INSERT INTO plants (id, code, name, address, zone, locale) VALUES (?, ?, ?, ?, ?, ?)', [
      newId(),
      'AM',
      'Aldermoor Precision Castings',
      'Kiln Lane Works\nAldermoor\nAM4 2RG',
      'Europe/London',
      'en',
    ]);
    const ids = { TARN: newId(), CORV: newId() };
    const customers = [
      [ids.TARN, 'TARN', 'Tarnside Turbines', 'Fell Gate 7\nTarnside', 'en', 'quality@tarnside.example'],
      [ids.CORV, 'CORV', 'Corvane Rotorcraft', '12 quai des Aubes\nCorvane', 'fr', 'quality@corvane.example'],
    ];
    for (const row of customers) {
      await execute(
        work,
        'INSERT INTO customers (id, code, name, address, locale, quality_email, created_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
        [...row, sqlTimeOf(work.now)],
      );
    }
    return ids;
  });
}

interface Gauge {
  readonly number: string;
  readonly title: string;
  readonly kind: string;
  readonly method: string;
  readonly dueInDays: number;
  readonly asFound?: 'good' | 'failed';
}

const gauges: readonly Gauge[] = [
  {
    number: 'UT-07',
    title: 'Ultrasonic thickness gauge, 15 MHz delay line',
    kind: 'ut-gauge',
    method: 'ultrasonic-thickness',
    dueInDays: 120,
  },
  {
    number: 'UT-04',
    title: 'Ultrasonic thickness gauge, found reading high',
    kind: 'ut-gauge',
    method: 'ultrasonic-thickness',
    dueInDays: 90,
    asFound: 'failed',
  },
  {
    number: 'SB-02',
    title: 'Step block 1-2-3 mm, columnar nickel',
    kind: 'step-block',
    method: 'ultrasonic-thickness',
    dueInDays: 300,
  },
  { number: 'UV-11', title: 'UV-A lamp, booth 3', kind: 'uv-a-lamp', method: 'penetrant', dueInDays: 60 },
  { number: 'DD-02', title: 'Digital detector 2, 100 µm', kind: 'digital-detector', method: 'radiography', dueInDays: 200 },
  { number: 'XT-02', title: 'X-ray tube 225 kV, cell 2', kind: 'x-ray-tube', method: 'radiography', dueInDays: 21 },
  { number: 'BA-01', title: 'Balance 2 kg', kind: 'balance', method: 'mass', dueInDays: 250 },
];

export type Gauges = Readonly<Record<string, string>>;

async function addGauge(work: Work, gauge: Gauge, recordedBy: string): Promise<string> {
  const id = newId();
  const at = sqlTimeOf(work.now);
  await execute(
    work,
    'INSERT INTO equipment (id, number, title, kind, method, location, created_at) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [id, gauge.number, gauge.title, gauge.kind, gauge.method, 'Inspection hall', at],
  );
  await execute(
    work,
    `INSERT INTO calibrations (id, equipment_id, \`function\`, as_found, as_left, calibrated_on, due_on, certificate, recorded_by, created_at)
     VALUES (?, ?, 'all', ?, 'good', DATE(?) - INTERVAL 40 DAY, DATE(?) + INTERVAL ? DAY, ?, ?, ?)`,
    [newId(), id, gauge.asFound ?? 'good', at, at, gauge.dueInDays, `K-${gauge.number}-26`, recordedBy, at],
  );
  return id;
}

const checks = [
  ['booth 3', 'penetrant', 'Known-defect panel, lamp irradiance and ambient light'],
  ['line 1', 'penetrant', 'Rinse, dryer and developer'],
  ['detector 2', 'radiography', 'Stability and bad-pixel map'],
] as const;

/** Equipment with calibrations, uncertainties of the wall-thickness process, and the checks that cover today. */
export async function seedEquipment(people: Cast, stations: readonly string[]): Promise<Gauges> {
  return inTransaction(null, async (work) => {
    const at = sqlTimeOf(work.now);
    const reviewer = castMember(people, 'reviewer');
    const found: Record<string, string> = {};
    for (const gauge of gauges) found[gauge.number] = await addGauge(work, gauge, reviewer.id);
    for (const station of stations) {
      await execute(
        work,
        `INSERT INTO measurement_processes (id, technique, characteristic, gauge_kind, expanded, k, unit, basis, valid_from, created_at)
         VALUES (?, 'UT-110', ?, 'ut-gauge', '0.020', '2', 'mm', 'budget UB-14: gauge, block, velocity, repeatability', DATE(?) - INTERVAL 300 DAY, ?)`,
        [newId(), station, at, at],
      );
    }
    await execute(
      work,
      `INSERT INTO measurement_processes (id, technique, characteristic, gauge_kind, expanded, k, unit, basis, valid_from, created_at)
       VALUES ('${newId()}', 'MA-030', 'M1', 'balance', '0.1', '2', 'g', 'budget UB-20', DATE(?) - INTERVAL 300 DAY, ?)`,
      [at, at],
    );
    for (const [scope, method, title] of checks) {
      await execute(
        work,
        `INSERT INTO process_checks (id, scope, method, title, kind, result, at, valid_until, done_by, created_at)
         VALUES (?, ?, ?, ?, 'opening', 'good', ? - INTERVAL 30 MINUTE, ? + INTERVAL 72 HOUR, ?, ?)`,
        [newId(), scope, method, title, at, at, castMember(people, 'inspector').id, at],
      );
    }
    return found;
  });
}

const techniques = [
  ['UT-110', 'ultrasonic-thickness', 'Wall thickness by contact pulse-echo with delay line', 'ASTM E797'],
  ['FP-210', 'penetrant', 'Fluorescent penetrant, type I, method D, sensitivity 3', 'ASTM E1417'],
  ['DR-310', 'radiography', 'Digital radiography of hollow airfoils', 'ASTM E2698'],
  ['VI-010', 'visual', 'Visual inspection of castings', 'plant procedure VI-010'],
  ['MK-020', 'marking', 'Laser mark and read back', 'plant procedure MK-020'],
  ['MA-030', 'mass', 'Weighing', 'plant procedure MA-030'],
] as const;

/** Techniques: one approved issue each, written by one level 3 and approved by another. */
export async function seedTechniques(people: Cast): Promise<void> {
  await inTransaction(null, async (work) => {
    const at = sqlTimeOf(work.now);
    for (const [number, method, title, standard] of techniques) {
      await execute(
        work,
        `INSERT INTO technique_issues (id, number, issue, method, title, standard, state, content, author, created_at, approved_by, approved_at)
         VALUES (?, ?, 1, ?, ?, ?, 'approved', '{}', ?, ?, ?, ?)`,
        [newId(), number, method, title, standard, castMember(people, 'reviewer2').id, at, castMember(people, 'reviewer').id, at],
      );
    }
  });
}

import { planContent, type Plan, type PlanContent } from '@/services/contracts/plan-content';
import { createDrawing } from '@/services/drawings/create-drawing';
import { draftPlan } from '@/services/plans/draft-plan';
import { approvePlan, checkPlan } from '@/services/plans/move-plan';
import { castMember, type Cast } from './demo-people';
import { perform } from './perform';
import type { DemoPartNumber } from './pictures/part-forms';
import { criteriaZones, partViews } from './pictures/part-view';

/** Ultrasonic stations of every demo part, in drawing order. */
export const stations = ['21', '22', '23', '24', '25', '26', '27', '28'] as const;

const drawings = [
  { number: 'AM-2210', title: 'First-stage vane, two cavities', revision: 'C', customer: 'TARN' },
  { number: 'AM-3175', title: 'Third-stage blade, three cavities', revision: 'B', customer: 'TARN' },
  { number: 'AM-4402', title: 'Guide-vane pair', revision: 'A', customer: 'CORV' },
] as const;

function characteristics(): Record<string, unknown>[] {
  const walls = stations.map((number, place) => ({
    number,
    title: `Wall, section ${place < 4 ? 'B-B' : 'C-C'}, station ${String((place % 4) + 1)}`,
    unit: 'mm',
    nominal: '0.90',
    lower: '0.75',
    upper: '1.05',
    uncertaintyMax: '0.03',
    decision: { rule: 'guarded', form: 'non-binary', g: '1' },
  }));
  return [
    ...walls,
    { number: 'M1', title: 'Mass', unit: 'g', nominal: '412.0', lower: '404.0', upper: '420.0', decision: { rule: 'simple' } },
  ];
}

const processValues = [
  { number: 'P1', title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '60' },
  { number: 'P2', title: 'Rinse pressure', unit: 'kPa', upper: '275' },
  { number: 'P3', title: 'Dryer temperature', unit: '°C', upper: '71' },
  { number: 'P4', title: 'UV-A irradiance at the part', unit: 'µW/cm²', lower: '1000' },
  { number: 'P5', title: 'Ambient light', unit: 'lx', upper: '20' },
];

function rules(zones: readonly { readonly id: string }[]): Record<string, unknown>[] {
  const all = zones.map(({ id }) => id);
  return [
    {
      id: 'N7',
      clause: 'Note 7',
      zones: all,
      methods: ['penetrant'],
      types: ['*'],
      recordable: '0.20',
      rules: [
        { kind: 'not-allowed', types: ['cold-shut'], classes: ['linear'] },
        { kind: 'max-size', class: 'rounded', limit: '0.75' },
        {
          kind: 'size-bands',
          counting: 'this-band-and-above',
          bands: [
            { to: '0.40', count: 6 },
            { to: '0.75', count: 2 },
          ],
        },
        { kind: 'min-separation', limit: '1.5' },
      ],
    },
    {
      id: 'N9',
      clause: 'Note 9',
      zones: all,
      methods: ['radiography'],
      types: ['*'],
      recordable: '0.15',
      rules: [
        { kind: 'not-allowed', types: ['residual-core'] },
        { kind: 'max-size', limit: '0.80' },
        { kind: 'max-count', limit: 5 },
      ],
    },
  ];
}

function route(views: readonly string[]): Record<string, unknown>[] {
  return [
    {
      key: 'wall',
      operation: '110',
      title: 'Ultrasonic wall thickness',
      method: 'ultrasonic-thickness',
      technique: 'UT-110',
      characteristics: [...stations],
      blockCheck: { unit: 'mm', steps: ['1.00', '2.00', '3.00'].map((nominal) => ({ nominal, tolerance: '0.02' })) },
    },
    { key: 'visual', operation: '120', title: 'Visual after cut-off', method: 'visual', technique: 'VI-010', attributes: ['40'] },
    {
      key: 'penetrant',
      operation: '210',
      title: 'Fluorescent penetrant',
      method: 'penetrant',
      technique: 'FP-210',
      views: [...views],
      process: processValues.map(({ number }) => number),
      indicationRules: ['N7'],
      evidence: [{ role: 'photograph', minimum: 1 }],
      checks: ['booth 3', 'line 1'],
    },
    {
      key: 'radiograph',
      operation: '310',
      title: 'Digital radiography',
      method: 'radiography',
      technique: 'DR-310',
      views: [...views],
      attributes: ['41'],
      indicationRules: ['N9'],
      evidence: [{ role: 'radiograph', minimum: 1 }],
      indicator: { required: 'W13' },
      checks: ['detector 2'],
    },
    { key: 'mass', operation: '410', title: 'Weighing', method: 'mass', technique: 'MA-030', characteristics: ['M1'] },
    { key: 'marking', operation: '420', title: 'Mark and read back', method: 'marking', technique: 'MK-020', attributes: ['42'] },
  ];
}

function contentOf(partNumber: DemoPartNumber): PlanContent {
  const views = partViews[partNumber].map((one) => ({
    name: one.view,
    title: one.view === 'concave' ? 'Concave side' : 'Convex side',
    widthUm: one.widthUm,
    heightUm: one.heightUm,
    outline: one.outline,
  }));
  const zones = criteriaZones(partNumber);
  return planContent.parse({
    views,
    criteria: {
      lengthUnit: 'mm',
      linear: { ratio: '3', at: 'above' },
      characteristics: characteristics(),
      attributes: [
        { number: '40', title: 'No shell or core left, no mechanical damage' },
        { number: '41', title: 'No residual core in any cavity' },
        { number: '42', title: 'Mark read back equals the serial' },
      ],
      process: processValues,
      zones,
      indicationRules: rules(zones),
    },
    route: route(views.map(({ name }) => name)),
    rework: [
      {
        kind: 'blend',
        title: 'Blend to 0.10 mm in zones B and C',
        inspectorMayOrder: true,
        mostCycles: 2,
        reopens: ['wall', 'penetrant'],
      },
      { kind: 're-leach', title: 'Leach again', mostCycles: 1, reopens: ['radiograph'] },
    ],
  });
}

/** Three drawings with an approved plan issue each, and one draft that waits for its second person. */
export async function seedPlans(people: Cast): Promise<Record<DemoPartNumber, Plan>> {
  const [administrator, checker, approver] = ['administrator', 'reviewer2', 'reviewer'].map((key) => castMember(people, key));
  if (!administrator || !checker || !approver) throw new Error('the cast is not complete');
  const found: Partial<Record<DemoPartNumber, Plan>> = {};
  for (const drawing of drawings) {
    await perform(administrator, 'drawing-created', (work) => createDrawing(work, drawing));
    const content = contentOf(drawing.number);
    const draft = await perform(administrator, 'plan-drafted', (work) => draftPlan(work, drawing.number, content));
    await perform(checker, 'plan-checked', (work) => checkPlan(work, draft.id));
    found[drawing.number] = await perform(approver, 'plan-approved', (work) => approvePlan(work, draft.id));
  }
  await perform(administrator, 'plan-drafted', (work) => draftPlan(work, 'AM-2210', contentOf('AM-2210')));
  return found as Record<DemoPartNumber, Plan>;
}

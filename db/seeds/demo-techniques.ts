import { techniqueContent } from '@/services/contracts/techniques';
import { draftTechnique } from '@/services/techniques/draft-technique';
import { approveTechnique, checkTechnique } from '@/services/techniques/move-technique';
import { castMember, type Cast } from './demo-people';
import { perform } from './perform';

const essential = (name: string, value: string, unit: string | null = null) => ({ name, value, unit, essential: true });
const other = (name: string, value: string, unit: string | null = null) => ({ name, value, unit, essential: false });
const check = (scope: string, title: string, window: object | null = null) => ({
  ...{ scope, title, kind: 'opening', validHours: 72 },
  window,
});

const techniques = [
  {
    number: 'UT-110',
    method: 'ultrasonic-thickness',
    title: 'Wall thickness by contact pulse-echo with delay line',
    standard: 'ASTM E797',
    content: {
      parameters: [
        essential('Transducer', '15 MHz, 6 mm, delay line'),
        essential('Velocity', '5940', 'm/s'),
        essential('Step block', '1-2-3 mm, columnar nickel, before and after'),
        other('Couplant', 'glycerine gel'),
      ],
      views: ['section B-B', 'section C-C'],
    },
  },
  {
    number: 'FP-210',
    method: 'penetrant',
    title: 'Fluorescent penetrant, type I, method D, sensitivity 3',
    standard: 'ASTM E1417',
    content: {
      parameters: [
        essential('Penetrant', 'type I, method D, sensitivity level 3'),
        essential('Emulsifier dwell, longest', '120', 's'),
        essential('Developer', 'form a, dry powder'),
        other('Wiping', 'solvent, once'),
      ],
      windows: [
        { title: 'Penetrant dwell', unit: 'min', lower: '20', upper: '60' },
        { title: 'Rinse pressure', unit: 'kPa', upper: '275' },
        { title: 'Dryer temperature', unit: '°C', upper: '71' },
        { title: 'UV-A irradiance at the part', unit: 'µW/cm²', lower: '1000' },
        { title: 'Ambient light', unit: 'lx', upper: '20' },
      ],
      views: ['concave', 'convex', 'platform', 'root'],
      checks: [
        check('booth 3', 'Known-defect panel'),
        check('booth 3', 'UV-A irradiance at the part', { unit: 'µW/cm²', lower: '1000' }),
        check('booth 3', 'Ambient light', { unit: 'lx', upper: '20' }),
        check('line 1', 'Rinse, dryer and developer'),
      ],
    },
  },
  {
    number: 'DR-310',
    method: 'radiography',
    title: 'Digital radiography of hollow airfoils',
    standard: 'ASTM E2698',
    content: {
      parameters: [
        essential('Voltage', '160', 'kV'),
        essential('Current and time', '4 mA, 12 s'),
        essential('Distance', '900', 'mm'),
        other('Filter at the tube', 'copper 0.5 mm'),
      ],
      views: ['concave', 'convex'],
      checks: [check('detector 2', 'Stability and bad-pixel map')],
      indicator: 'W13',
    },
  },
  {
    number: 'VI-010',
    method: 'visual',
    title: 'Visual inspection of castings',
    standard: 'plant procedure VI-010',
    content: { parameters: [essential('White light at the part, least', '1000', 'lx')], views: ['all around'] },
  },
  {
    number: 'MK-020',
    method: 'marking',
    title: 'Laser mark and read back',
    standard: 'plant procedure MK-020',
    content: { parameters: [essential('Code', 'Data Matrix ECC 200')] },
  },
  {
    number: 'MA-030',
    method: 'mass',
    title: 'Weighing',
    standard: 'plant procedure MA-030',
    content: { parameters: [essential('Balance', '2 kg, 0.1 g')] },
  },
] as const;

/** Techniques: one approved issue each, written by one level 3, checked by a second person, approved by another level 3; and a draft. */
export async function seedTechniques(people: Cast): Promise<void> {
  const [author, second, approver] = ['reviewer2', 'signatory', 'reviewer'].map((key) => castMember(people, key));
  if (!author || !second || !approver) throw new Error('the cast is not complete');
  for (const { content, ...technique } of techniques) {
    const { id } = await perform(author, 'technique-drafted', (work) =>
      draftTechnique(work, { ...technique, content: techniqueContent.parse(content) }),
    );
    await perform(second, 'technique-checked', (work) => checkTechnique(work, id));
    await perform(approver, 'technique-approved', (work) => approveTechnique(work, id));
  }
  const [next] = techniques.filter(({ number }) => number === 'DR-310');
  if (next)
    await perform(author, 'technique-drafted', (work) =>
      draftTechnique(work, { ...next, content: techniqueContent.parse({ ...next.content, indicator: 'W14' }) }),
    );
}

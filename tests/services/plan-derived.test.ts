import { expect, test } from 'vitest';
import { contentOf, planContent } from '@/services/contracts/plan-content';
import { planContentDigest } from '@/services/plans/plan-content-digest';
import { planFaults } from '@/services/contracts/plan-faults';

const wall = { characteristic: '7', quantity: 'thickness-by-velocity' };
const inputs = [
  { name: 'velocity', value: '5820', unit: 'm/s' },
  { name: 'transit', unit: 'µs' },
];

function faultsOf(derived: unknown) {
  const content = planContent.parse({
    criteria: {
      characteristics: [
        { number: '7', unit: 'mm', lower: '0.750', decision: { rule: 'simple' } },
        { number: '8', unit: '°', upper: '12', decision: { rule: 'simple' } },
      ],
    },
    route: [{ operation: '10', title: 'Wall', method: 'ultrasonic-thickness', characteristics: ['7', '8'] }],
    ...(derived === undefined ? {} : { derived }),
  });
  return planFaults(content).map(({ path, message }) => `${path}: ${message}`);
}

test('a characteristic can name a derived quantity, with inputs fixed by the plan or entered', () => {
  expect(faultsOf(undefined)).toEqual([]);
  expect(faultsOf([{ ...wall, inputs }])).toEqual([]);
  expect(
    faultsOf([
      { ...wall, inputs },
      {
        characteristic: '8',
        quantity: 'orientation-angle',
        inputs: ['phi1', 'capital-phi', 'phi2'].map((name) => ({ name, unit: '°' })),
      },
    ]),
  ).toEqual([]);
});

test('every fault of derived characteristics is named where it is, all at once', () => {
  expect(
    faultsOf([
      { characteristic: '9', quantity: 'thickness-by-velocity', inputs },
      { ...wall, inputs: [{ name: 'velocity', value: '-1', unit: 'm/s' }, { name: 'transit', unit: 'mm' }, { name: 'echo' }] },
      { ...wall, quantity: 'wall', inputs: [] },
      {
        characteristic: '8',
        quantity: 'chord',
        inputs: [
          { name: 'leading-x', unit: 'mm' },
          { name: 'leading-x', unit: 'mm' },
        ],
      },
    ]),
  ).toEqual([
    'derived.0.characteristic: 9 is not in the plan',
    'derived.1.inputs.0.value: velocity must be above 0, not -1.',
    'derived.1.inputs.1.unit: transit needs a unit of time.',
    'derived.1.inputs.2.name: echo is not an input of thickness-by-velocity',
    'derived.2.characteristic: 7 is derived twice',
    'derived.2.quantity: wall is not a derived quantity',
    'derived.3.quantity: chord is a length, which ° does not measure',
    'derived.3.inputs.1.name: leading-x is given twice',
    'derived.3.inputs: leading-y is missing',
    'derived.3.inputs: trailing-x is missing',
    'derived.3.inputs: trailing-y is missing',
  ]);
});

test('a plan that leaves nothing to be entered is refused, and so are units where there is none', () => {
  expect(faultsOf([{ ...wall, inputs: [inputs[0], { name: 'transit', value: '1', unit: 'µs' }] }])).toEqual([
    'derived.0.inputs: leave nothing to be entered: every part would have the same reading',
  ]);
  expect(
    faultsOf([
      {
        characteristic: '7',
        quantity: 'least-source-distance-by-class',
        inputs: [
          { name: 'focal-spot', unit: 'mm' },
          { name: 'object-to-detector', unit: 'mm' },
          { name: 'testing-class', unit: 'mm' },
        ],
      },
    ]),
  ).toEqual(['derived.0.inputs.2.unit: testing-class has no unit.']);
});

test('derived characteristics are part of what is signed; a plan without them keeps its digest', () => {
  const without = planContent.parse({ route: [] });
  const withOne = planContent.parse({ route: [], derived: [{ ...wall, inputs }] });
  expect(Object.keys(contentOf(without))).not.toContain('derived');
  expect(contentOf(withOne).derived).toEqual([{ ...wall, inputs }]);
  expect(planContentDigest(contentOf(withOne))).not.toBe(planContentDigest(contentOf(without)));
});

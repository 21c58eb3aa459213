import { bench, describe } from 'vitest';
import { evaluate } from '@/services/engine/evaluate/evaluate';

const characteristics = Array.from({ length: 200 }, (_, place) => ({
  number: String(place + 1),
  unit: 'mm',
  lower: '0.75',
  upper: '1.05',
  decision: { rule: 'guarded', form: 'non-binary', g: '1' },
}));

const readings = characteristics.map(({ number }, place) => ({
  characteristic: number,
  value: (0.8 + (place % 20) / 100).toFixed(3),
  unit: 'mm',
  uncertainty: { expanded: '0.020', k: '2' },
}));

const zones = [
  {
    id: 'B',
    view: 'concave',
    polygon: [
      [0, 0],
      [60000, 0],
      [60000, 40000],
      [0, 40000],
    ],
  },
];
const rules = [
  { kind: 'max-size', limit: '0.75' },
  {
    kind: 'size-bands',
    counting: 'this-band-and-above',
    bands: [
      { to: '0.40', count: 60 },
      { to: '0.75', count: 20 },
    ],
  },
  { kind: 'min-separation', limit: '1.5' },
];

function indications(count: number) {
  return Array.from({ length: count }, (_, place) => ({
    id: String(place + 1),
    method: 'penetrant',
    type: 'gas-pore',
    view: 'concave',
    shape: { kind: 'circle', center: [2000 + (place % 10) * 5000, 2000 + Math.floor(place / 10) * 5000], diameter: 300 },
  }));
}

function body(readingCount: number, indicationCount: number) {
  return {
    criteria: {
      lengthUnit: 'mm',
      characteristics: characteristics.slice(0, readingCount),
      zones,
      indicationRules: [{ id: 'N7', zones: ['B'], methods: ['penetrant'], types: ['*'], rules }],
    },
    observations: {
      methods: ['penetrant'],
      readings: readings.slice(0, readingCount),
      indications: indications(indicationCount),
    },
  };
}

// Ratios are what holds on a noisy machine: the whole live verdict against its two halves.
describe('live verdict', () => {
  const [whole, values, marks] = [body(200, 50), body(200, 0), body(0, 50)];
  bench('200 readings and 50 indications', () => void evaluate(whole));
  bench('200 readings', () => void evaluate(values));
  bench('50 indications', () => void evaluate(marks));
});

import { expect, test } from 'vitest';
import { evaluate } from '@/services/engine/evaluate/evaluate';
import type { Evaluation } from '@/services/engine/evaluate/types';

// Expected values are worked out by hand from the acceptance text: V1 to V4, R2, attributes and process values, I10 and I11.

const SQUARE = [
  [0, 0],
  [40000, 0],
  [40000, 25000],
  [0, 25000],
];

const CRITERIA = {
  lengthUnit: 'mm',
  characteristics: [
    { number: '12', unit: 'mm', lower: '0.75', upper: '1.05', decision: { rule: 'simple' } },
    { number: '13', unit: 'mm', upper: '2', decision: { rule: 'guarded', form: 'non-binary' } },
  ],
  attributes: [{ number: '40' }, { number: '41' }],
  process: [{ number: 'P3', unit: 'min', lower: '20', upper: '60' }],
  zones: [{ id: 'B', view: 'concave', polygon: SQUARE }],
  indicationRules: [
    { id: 'N7', zones: ['B'], methods: ['penetrant'], types: ['gas-pore'], rules: [{ kind: 'max-count', limit: 1 }] },
    { id: 'N8', zones: ['B'], methods: ['radiography'], types: ['*'], rules: [{ kind: 'max-count', limit: 1 }] },
  ],
};

const wall = (value: string) => ({ characteristic: '12', value, unit: 'mm' });
const chord = (value: string) => ({ characteristic: '13', value, unit: 'mm', uncertainty: { expanded: '0.1', k: '2' } });
const conforming = ['40', '41'].map((number) => ({ number, result: 'conforming' }));
const dwell = (value: string) => [{ number: 'P3', value, unit: 'min' }];
const pore = (id: string, type = 'gas-pore') => ({
  id,
  method: 'penetrant',
  type,
  view: 'concave',
  shape: { kind: 'circle', center: [5000, 5000], diameter: 400 },
});

const WHOLE = {
  methods: ['penetrant', 'radiography'],
  readings: [wall('0.9'), chord('1.5')],
  attributes: conforming,
  process: dwell('25'),
};

function judged(observations: object, criteria: object = CRITERIA): Evaluation {
  const answer = evaluate({ criteria, observations });
  if (!answer.ok) throw new Error(JSON.stringify(answer.faults));
  return answer.answer;
}

const ends = ({ verdict, verdictSoFar, complete }: Evaluation) => ({ verdict, verdictSoFar, complete });

test('a clean part with everything given is accepted', () => {
  expect(ends(judged(WHOLE))).toEqual({ verdict: 'accept', verdictSoFar: 'accept', complete: true });
});

test('what is not given is missing, in criteria order', () => {
  const answer = judged({ readings: [chord('1.5')] });
  expect(answer.missing).toEqual([
    { kind: 'reading', number: '12' },
    { kind: 'attribute', number: '40' },
    { kind: 'attribute', number: '41' },
    { kind: 'process', number: 'P3' },
    { kind: 'method', number: 'penetrant' },
    { kind: 'method', number: 'radiography' },
  ]);
  expect(ends(answer)).toEqual({ verdict: 'not-evaluable', verdictSoFar: 'accept', complete: false });
  expect(answer.rules.map((row) => row.verdict)).toEqual(answer.rules.map(() => 'not-evaluable'));
});

test.each([
  ['attribute', '41', { attributes: [conforming[0], { number: '41', result: 'not-inspected', reason: 'no access' }] }],
  ['process', 'P3', { process: [] }],
  ['reading', '12', { readings: [{ ...wall('0.9'), void: { reason: 'probe lifted' } }, chord('1.5')] }],
  ['method', 'radiography', { methods: ['penetrant'] }],
])('one %s not given keeps the verdict open, never an early accept', (kind, number, change) => {
  const answer = judged({ ...WHOLE, ...change });
  expect(answer.missing).toEqual([{ kind, number }]);
  expect(ends(answer)).toEqual({ verdict: 'not-evaluable', verdictSoFar: 'accept', complete: false });
});

test('a rejected row shows in the verdict so far while something is missing, and in the verdict once nothing is', () => {
  const readings = [wall('0.7499'), chord('1.5')];
  expect(ends(judged({ ...WHOLE, readings, process: [] }))).toEqual({
    verdict: 'not-evaluable',
    verdictSoFar: 'reject',
    complete: false,
  });
  expect(ends(judged({ ...WHOLE, readings }))).toEqual({ verdict: 'reject', verdictSoFar: 'reject', complete: true });
});

test('the worst stands: reject before indeterminate before accept', () => {
  const unsure = { ...WHOLE, readings: [wall('0.9'), chord('1.95')] };
  expect(ends(judged(unsure))).toEqual({ verdict: 'indeterminate', verdictSoFar: 'indeterminate', complete: true });
  const nonconforming = [conforming[0], { number: '41', result: 'nonconforming' }];
  expect(judged({ ...unsure, attributes: nonconforming }).verdict).toBe('reject');
  expect(judged({ ...unsure, indications: [pore('1'), pore('2')] }).verdict).toBe('reject');
});

test('a void reading beside one that stands has its row and is left out of the whole', () => {
  const answer = judged({ ...WHOLE, readings: [{ ...wall('9'), void: { reason: 'probe lifted' } }, wall('0.9'), chord('1.5')] });
  expect(answer.readings[0]).toMatchObject({ verdict: 'not-evaluable', inside: false });
  expect(ends(answer)).toEqual({ verdict: 'accept', verdictSoFar: 'accept', complete: true });
});

test('an uncertainty that is not stated keeps a complete inspection open', () => {
  const answer = judged({ ...WHOLE, readings: [wall('0.9'), { characteristic: '13', value: '1.5', unit: 'mm' }] });
  expect(ends(answer)).toEqual({ verdict: 'not-evaluable', verdictSoFar: 'accept', complete: true });
});

test('a process value outside its window voids the inspection and does not reject the part', () => {
  const observations = { ...WHOLE, readings: [wall('9'), chord('1.5')], indications: [pore('1'), pore('2')] };
  expect(judged(observations).verdict).toBe('reject');
  const answer = judged({ ...observations, process: dwell('19.9') });
  expect(answer.process.map((row) => row.verdict)).toEqual(['reject']);
  const rows = [...answer.readings, ...answer.attributes, ...answer.rules];
  expect(new Set(rows.map((row) => row.verdict))).toEqual(new Set(['not-evaluable']));
  expect(answer.rules.flatMap((row) => row.indications)).toEqual([]);
  expect(ends(answer)).toEqual({ verdict: 'not-evaluable', verdictSoFar: null, complete: true });
});

test('a process value inside its window judges nothing by itself', () => {
  const criteria = { process: CRITERIA.process };
  expect(ends(judged({ process: dwell('20') }, criteria))).toEqual({
    verdict: 'not-evaluable',
    verdictSoFar: null,
    complete: true,
  });
});

test('nothing asked and nothing seen is not an accept', () => {
  expect(ends(judged({}, {}))).toEqual({ verdict: 'not-evaluable', verdictSoFar: null, complete: true });
});

test('an indication that no rule set covers leaves the whole indeterminate', () => {
  const silent = { ...CRITERIA, indicationRules: CRITERIA.indicationRules.slice(0, 1) };
  const observations = { ...WHOLE, methods: ['penetrant'], indications: [pore('7', 'inclusion')] };
  const answer = judged(observations, silent);
  expect(answer.unjudged).toEqual(['7']);
  expect(ends(answer)).toEqual({ verdict: 'indeterminate', verdictSoFar: 'indeterminate', complete: true });
});

test('faults of both parts, of form and of meaning, are all reported in one pass', () => {
  const answer = evaluate({
    criteria: {
      ...CRITERIA,
      colour: 'red',
      attributes: [{ number: '40' }, { number: '40' }],
      zones: [{ id: 'B', view: 'concave', polygon: [[0, 0]] }],
      indicationRules: [{ id: 'N7', zones: ['Q'], methods: ['penetrant'], types: [] }],
    },
    observations: {
      methods: ['penetrant'],
      readings: [{ characteristic: '99', value: '1,2', unit: 'mm' }],
      process: [{ number: 'P3', value: '25', unit: 'mm' }],
      indications: [
        { ...pore('1'), method: 'ultrasound' },
        { ...pore('1'), relevant: { is: false } },
      ],
    },
  });
  const paths = answer.ok ? [] : answer.faults.map((one) => one.path);
  expect(paths).toEqual(
    expect.arrayContaining([
      'criteria.colour',
      'criteria.attributes.1.number',
      'criteria.zones.0.polygon',
      'criteria.indicationRules.0.zones.0',
      'criteria.indicationRules.0.types',
      'observations.readings.0.characteristic',
      'observations.readings.0.value',
      'observations.process.0.unit',
      'observations.indications.0.method',
      'observations.indications.1.id',
      'observations.indications.1.relevant.reason',
    ]),
  );
  expect(paths).toHaveLength(new Set(paths).size);
});

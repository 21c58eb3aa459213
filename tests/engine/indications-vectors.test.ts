import { expect, test } from 'vitest';
import { evaluate } from '@/services/engine/evaluate/evaluate';
import entered from '../vectors/indications-entered.json';
import rules from '../vectors/indications-rules.json';

interface Vector {
  readonly defect: string;
  readonly at?: string;
  readonly keepCracks?: boolean;
  readonly set?: object;
  readonly methods?: readonly string[];
  readonly rules: readonly object[];
  readonly indications: readonly object[];
  readonly groups?: readonly (string | null)[];
  readonly unjudged?: readonly string[];
  readonly verdictSoFar?: string;
  readonly rows: readonly object[];
}

const ZONES = [
  {
    id: 'B',
    view: 'concave',
    polygon: [
      [0, 0],
      [40000, 0],
      [40000, 25000],
      [0, 25000],
    ],
  },
  {
    id: 'C',
    view: 'concave',
    polygon: [
      [40000, 0],
      [60000, 0],
      [60000, 25000],
      [40000, 25000],
    ],
  },
];

function judged(vector: Vector) {
  const set = {
    id: 'N7b',
    zones: ['B'],
    methods: ['penetrant'],
    types: ['*'],
    cracksAllowed: vector.keepCracks ? null : 'as drawn',
    rules: vector.rules,
    ...vector.set,
  };
  const answer = evaluate({
    criteria: { lengthUnit: 'mm', linear: { ratio: '3', at: vector.at ?? 'above' }, zones: ZONES, indicationRules: [set] },
    observations: {
      methods: vector.methods ?? ['penetrant'],
      indications: vector.indications.map((one) => ({ method: 'penetrant', view: 'concave', ...one })),
    },
  });
  if (!answer.ok) throw new Error(JSON.stringify(answer.faults));
  return answer.answer;
}

// Expected values are worked out by hand from the acceptance text; see `source` in each file.
test.each([...rules.cases, ...entered.cases] as readonly Vector[])('$defect', (vector) => {
  const answer = judged(vector);
  expect(answer.rules).toMatchObject(vector.rows);
  expect(answer.rules).toHaveLength(vector.rows.length);
  if (vector.groups) expect(answer.indications.map((one) => one.group)).toEqual(vector.groups);
  expect(answer.unjudged).toEqual(vector.unjudged ?? []);
  if (vector.verdictSoFar) expect(answer.verdictSoFar).toBe(vector.verdictSoFar);
  for (const row of answer.rules) expect(row.sentence.text).not.toMatch(/[{}]|^indication-/);
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import { criteriaFaults, evaluate } from '@/services/engine/evaluate/evaluate';

type Json = Record<string, unknown>;

const SQUARE = [
  [0, 0],
  [40000, 0],
  [40000, 25000],
  [0, 25000],
];
const PORE = { kind: 'circle', center: [10000, 8000], diameter: 400 };

function body(change: {
  criteria?: Json;
  set?: Json;
  rules?: readonly unknown[];
  indication?: Json;
  observations?: Json;
}): unknown {
  return {
    criteria: {
      lengthUnit: 'mm',
      zones: [{ id: 'B', view: 'concave', polygon: SQUARE }],
      indicationRules: [
        { id: 'N', zones: ['B'], methods: ['penetrant'], types: ['*'], rules: change.rules ?? [], ...change.set },
      ],
      ...change.criteria,
    },
    observations: {
      methods: ['penetrant'],
      indications: [{ id: '1', method: 'penetrant', type: 'gas-pore', view: 'concave', shape: PORE, ...change.indication }],
      ...change.observations,
    },
  };
}

function pathsOf(asked: unknown): readonly string[] {
  const answer = evaluate(asked);
  return answer.ok ? [] : answer.faults.map((one) => one.path).sort();
}

const SET = 'criteria.indicationRules.0';
const MARK = 'observations.indications.0';

test('a sound body has no fault', () => {
  expect(pathsOf(body({}))).toEqual([]);
});

test.each([
  [
    'a zone that crosses itself',
    {
      criteria: {
        zones: [
          {
            id: 'B',
            view: 'concave',
            polygon: [
              [0, 0],
              [9, 9],
              [9, 0],
              [0, 9],
            ],
          },
        ],
      },
    },
    ['criteria.zones.0.polygon'],
  ],
  [
    'a zone of two points',
    {
      criteria: {
        zones: [
          {
            id: 'B',
            view: 'concave',
            polygon: [
              [0, 0],
              [9, 9],
              [0, 0],
            ],
          },
        ],
      },
    },
    ['criteria.zones.0.polygon'],
  ],
  [
    'a coordinate beyond the range',
    {
      criteria: {
        zones: [
          {
            id: 'B',
            view: 'concave',
            polygon: [
              [0, 0],
              [100000001, 0],
              [0, 9.5],
            ],
          },
        ],
      },
    },
    ['criteria.zones.0.polygon.1.0', 'criteria.zones.0.polygon.2.1'],
  ],
  ['no length unit', { criteria: { lengthUnit: null } }, ['criteria.lengthUnit']],
  ['a class without a ratio', { rules: [{ kind: 'max-size', class: 'linear', limit: '1' }] }, ['criteria.linear']],
  ['a ratio without its side', { criteria: { linear: { ratio: '3' } } }, ['criteria.linear.at']],
  ['an unknown zone', { set: { zones: ['B', 'X'] } }, [`${SET}.zones.1`]],
  [
    'no zones, methods or types',
    { set: { zones: [], methods: [], types: null } },
    [`${SET}.methods`, `${SET}.types`, `${SET}.zones`],
  ],
  ['a method name in capitals', { set: { methods: ['PT'] } }, [`${SET}.methods.0`]],
  ['blank words about cracks', { set: { cracksAllowed: ' ' } }, [`${SET}.cracksAllowed`]],
  ['a merge of nothing', { set: { merge: { within: '0' } } }, [`${SET}.merge.within`]],
  ['a factor without saying of what', { set: { merge: { factor: '1' } } }, [`${SET}.merge.of`]],
  ['both a distance and a factor', { set: { merge: { within: '1', factor: '1' } } }, [`${SET}.merge.factor`]],
  ['an unknown rule', { rules: [{ kind: 'max-weight', limit: '1' }] }, [`${SET}.rules.0.kind`]],
  ['a key of another rule', { rules: [{ kind: 'max-count', limit: 1, window: null }] }, [`${SET}.rules.0.window`]],
  [
    'a count as a text, a limit as a number',
    {
      rules: [
        { kind: 'max-count', limit: '1' },
        { kind: 'max-size', limit: 1 },
      ],
    },
    [`${SET}.rules.0.limit`, `${SET}.rules.1.limit`],
  ],
  [
    'bands that do not rise',
    {
      rules: [
        {
          kind: 'size-bands',
          counting: 'each-band',
          bands: [
            { to: '0.5', count: 1 },
            { to: '0.50', count: 1 },
          ],
        },
      ],
    },
    [`${SET}.rules.0.bands.1.to`],
  ],
  [
    'bands without their counting',
    { rules: [{ kind: 'size-bands', bands: [{ to: '0.5', count: null }] }] },
    [`${SET}.rules.0.counting`],
  ],
  [
    'an alignment of one',
    { rules: [{ kind: 'alignment', count: 1, stripWidth: '0', gap: '1' }] },
    [`${SET}.rules.0.count`, `${SET}.rules.0.stripWidth`],
  ],
  ['nothing that is not allowed', { rules: [{ kind: 'not-allowed' }] }, [`${SET}.rules.0.types`]],
  ['a method not carried out', { observations: { methods: ['radiography'] } }, [`${MARK}.method`]],
  ['no shape', { indication: { shape: undefined } }, [`${MARK}.shape`]],
  ['an unknown shape', { indication: { shape: { kind: 'spline' } } }, [`${MARK}.shape.kind`]],
  ['a circle without size', { indication: { shape: { ...PORE, diameter: 0 } } }, [`${MARK}.shape.diameter`]],
  ['half a micrometre', { indication: { shape: { ...PORE, center: [0.5, 1] } } }, [`${MARK}.shape.center.0`]],
  [
    'an angle that is no number',
    { indication: { shape: { kind: 'ellipse', center: [1, 1], axes: [2, 2], angle: '30' } } },
    [`${MARK}.shape.angle`],
  ],
  [
    'a line of one point',
    {
      indication: {
        shape: {
          kind: 'polyline',
          points: [
            [1, 1],
            [1, 1],
          ],
          width: 5,
        },
      },
    },
    [`${MARK}.shape.points`],
  ],
  [
    'an outline that crosses itself',
    {
      indication: {
        shape: {
          kind: 'polygon',
          points: [
            [0, 0],
            [9, 9],
            [9, 0],
            [0, 9],
          ],
        },
      },
    },
    [`${MARK}.shape.points`],
  ],
  [
    'entered wider than long',
    { indication: { shape: { kind: 'entered', length: 1, width: 2, zone: 'B', basis: 'b' } } },
    [`${MARK}.shape.width`],
  ],
  [
    'entered in an unknown zone',
    { indication: { shape: { kind: 'entered', length: 2, width: 2, zone: 'X', basis: 'b' } } },
    [`${MARK}.shape.zone`],
  ],
  [
    'entered on another view than its zone',
    { indication: { view: 'convex', shape: { kind: 'entered', length: 2, width: 2, zone: 'B', basis: 'b' } } },
    [`${MARK}.view`],
  ],
  ['not relevant without a reason', { indication: { relevant: { is: false } } }, [`${MARK}.relevant.reason`]],
  ['not relevant for a blank reason', { indication: { relevant: { is: false, reason: ' ' } } }, [`${MARK}.relevant.reason`]],
  [
    'a crack called not relevant',
    { indication: { type: 'crack', relevant: { is: false, reason: 'seen by eye' } } },
    [`${MARK}.relevant`],
  ],
  [
    'a type not allowed called not relevant',
    { rules: [{ kind: 'not-allowed', types: ['gas-pore'] }], indication: { relevant: { is: false, reason: 'seen by eye' } } },
    [`${MARK}.relevant`],
  ],
  ['unknown keys', { set: { note: 1 }, indication: { colour: 'red' } }, [`${SET}.note`, `${MARK}.colour`]],
])('%s is refused where it stands', (_defect, change, paths) => {
  expect(pathsOf(JSON.parse(JSON.stringify(body(change))))).toEqual(paths);
});

test('identical ids of zones, rule sets and indications are refused', () => {
  const asked = body({}) as {
    criteria: { zones: unknown[]; indicationRules: unknown[] };
    observations: { indications: unknown[] };
  };
  for (const list of [asked.criteria.zones, asked.criteria.indicationRules, asked.observations.indications]) list.push(list[0]);
  expect(pathsOf(asked)).toEqual(['criteria.indicationRules.1.id', 'criteria.zones.1.id', 'observations.indications.1.id']);
});

test('a crack may be called not relevant where the drawing allows cracks, or outside every zone', () => {
  const relevant = { is: false, reason: 'scratch seen by eye' };
  expect(pathsOf(body({ set: { cracksAllowed: 'up to 1 mm' }, indication: { type: 'crack', relevant } }))).toEqual([]);
  expect(pathsOf(body({ indication: { type: 'crack', relevant, shape: { ...PORE, center: [90000, 0] } } }))).toEqual([]);
});

test('null is absence', () => {
  const rules = [{ kind: 'max-total-area', limit: '2', window: null, class: null, types: null }];
  const set = { merge: null, recordable: null, cracksAllowed: null, clause: null };
  expect(pathsOf(body({ rules, set, indication: { relevant: null, severity: null } }))).toEqual([]);
});

test('any JSON is answered or refused, never thrown at', () => {
  fc.assert(
    fc.property(fc.jsonValue(), fc.jsonValue(), fc.jsonValue(), (a, b, c) => {
      for (const asked of [
        a,
        { criteria: a, observations: b },
        body({ set: { merge: a, rules: b as never } }),
        body({ indication: { shape: a, severity: b, relevant: c } }),
        body({ criteria: { zones: a, linear: b, indicationRules: c } }),
      ]) {
        const answer = evaluate(asked);
        if (!answer.ok) expect(answer.faults.length).toBeGreaterThan(0);
      }
      expect(Array.isArray(criteriaFaults(a))).toBe(true);
    }),
    { numRuns: 300 },
  );
});

import fc from 'fast-check';
import { expect, test } from 'vitest';
import { evaluate } from '@/services/engine/evaluate/evaluate';
import type { Evaluation, Indication, IndicationRule, IndicationRuleSet, PointUm, Shape } from '@/services/engine/evaluate/types';

interface Body {
  readonly criteria: {
    readonly lengthUnit: 'mm';
    readonly linear: { readonly ratio: string; readonly at: 'above' };
    readonly zones: readonly { readonly id: string; readonly view: string; readonly polygon: readonly PointUm[] }[];
    readonly indicationRules: readonly IndicationRuleSet[];
  };
  readonly observations: { readonly methods: readonly string[]; readonly indications: readonly Indication[] };
}

const near = fc.integer({ min: -12, max: 12 }).map((step) => step * 50);
const away = fc.integer({ min: 1, max: 12 }).map((step) => step * 50);
const point = fc
  .tuple(fc.integer({ min: 0, max: 60 }), fc.integer({ min: 0, max: 60 }))
  .map(([x, y]): PointUm => [x * 100, y * 100]);
const plus = (p: PointUm, dx: number, dy: number): PointUm => [p[0] + dx, p[1] + dy];

const drawn = fc.oneof(
  fc.record({ center: point, diameter: away }).map((rest): Shape => ({ kind: 'circle', ...rest })),
  fc
    .record({ center: point, axes: fc.tuple(away, away), angle: fc.constantFrom(0, 17.5, 30, 90, 135) })
    .map((rest): Shape => ({ kind: 'ellipse', ...rest })),
  fc
    .tuple(point, away, near, near, away)
    .map(([p, a, b, c, width]): Shape => ({ kind: 'polyline', points: [p, plus(p, a, b), plus(p, c, -a)], width })),
  fc
    .tuple(point, away, away, near)
    .map(([p, a, b, c]): Shape => ({ kind: 'polygon', points: [p, plus(p, a, 0), plus(p, c, b)] })),
);
const placeless = fc.tuple(away, away, fc.constantFrom('A', 'B'), fc.boolean()).map(([a, b, zone, apart]): Shape => ({
  kind: 'entered',
  length: Math.max(a, b),
  width: Math.min(a, b),
  zone,
  basis: 'wiped',
  apart,
}));
const shapes = fc.oneof(
  { weight: 8, arbitrary: drawn },
  { weight: 1, arbitrary: placeless },
  { weight: 1, arbitrary: fc.constant(null) },
);
const indication = fc.record({
  shape: shapes,
  type: fc.constantFrom('gas-pore', 'gas-pore', 'inclusion', 'crack'),
  method: fc.constantFrom('penetrant', 'visual'),
});
const numbered = (list: readonly Omit<Indication, 'id' | 'view'>[]) =>
  list.map((one, at): Indication => ({ id: `i${at}`, view: 'v', ...one }));

const size = fc.integer({ min: 1, max: 150 }).map((hundredths) => (hundredths / 100).toFixed(2));
const filter = fc.record({
  class: fc.constantFrom(undefined, 'linear' as const),
  types: fc.constantFrom(undefined, ['gas-pore'], ['inclusion', 'crack']),
});
const window = fc.record({ shape: fc.constantFrom('circle' as const, 'square' as const), size });
const count = fc.integer({ min: 0, max: 5 });
const kinds = fc.oneof(
  fc.constant<IndicationRule>({ kind: 'not-allowed', types: ['inclusion'], classes: ['linear'] }),
  fc.tuple(filter, size).map(([f, limit]): IndicationRule => ({ kind: 'max-size', limit, ...f })),
  fc.tuple(filter, count, count).map(([f, a, b]): IndicationRule => ({
    kind: 'size-bands',
    counting: 'this-band-and-above',
    bands: [
      { to: '0.20', count: null },
      { to: '0.40', count: a },
      { to: '0.90', count: b },
    ],
    ...f,
  })),
  fc.tuple(filter, count).map(([f, limit]): IndicationRule => ({ kind: 'max-count', limit, ...f })),
  fc
    .tuple(filter, window, count)
    .map(([f, w, limit]): IndicationRule => ({ kind: 'max-count-in-window', window: w, limit, ...f })),
  fc.tuple(filter, size).map(([f, limit]): IndicationRule => ({ kind: 'min-separation', limit, ...f })),
  fc
    .tuple(filter, size, fc.option(window, { nil: undefined }))
    .map(([f, limit, w]): IndicationRule => ({ kind: 'max-total-length', limit, window: w, ...f })),
  fc
    .tuple(filter, size, fc.option(window, { nil: undefined }))
    .map(([f, limit, w]): IndicationRule => ({ kind: 'max-total-area', limit, window: w, ...f })),
  fc
    .tuple(filter, fc.integer({ min: 2, max: 4 }), size, size)
    .map(([f, n, stripWidth, gap]): IndicationRule => ({ kind: 'alignment', count: n, stripWidth, gap, ...f })),
);
const merge = fc.oneof(
  fc.constant(undefined),
  size.map((within) => ({ within })),
  fc.record({ factor: fc.constantFrom('1', '0.5', '0.33'), of: fc.constantFrom('larger' as const, 'smaller' as const) }),
);
const set = fc.record({
  zones: fc.constantFrom(['A'], ['A', 'B']),
  types: fc.constantFrom(['*'], ['gas-pore', 'crack']),
  cracksAllowed: fc.constantFrom(null, 'as drawn'),
  recordable: fc.constantFrom(undefined, '0.30'),
  merge,
  rules: fc.array(kinds, { minLength: 1, maxLength: 4 }),
});
const ZONES = [
  {
    id: 'A',
    view: 'v',
    polygon: [
      [0, 0],
      [3000, 0],
      [3000, 6000],
      [0, 6000],
    ] as PointUm[],
  },
  {
    id: 'B',
    view: 'v',
    polygon: [
      [3000, 0],
      [6000, 0],
      [6000, 6000],
      [4500, 5000],
      [3000, 6000],
    ] as PointUm[],
  },
];
const body = fc.tuple(set, fc.array(indication, { maxLength: 9 })).map(([one, list]): Body => ({
  criteria: {
    lengthUnit: 'mm',
    linear: { ratio: '2', at: 'above' },
    zones: ZONES,
    indicationRules: [{ id: 'N', methods: ['*'], ...one }],
  },
  observations: { methods: ['penetrant', 'visual'], indications: numbered(list) },
}));

function answerTo(asked: Body): Omit<Evaluation, 'criteriaDigest' | 'inputDigest'> {
  const answer = evaluate(JSON.parse(JSON.stringify(asked)));
  if (!answer.ok) throw new Error(JSON.stringify(answer.faults));
  const { criteriaDigest, inputDigest, ...rest } = answer.answer;
  expect([criteriaDigest, inputDigest].every((digest) => digest.startsWith('sha256:'))).toBe(true);
  return rest;
}

function withIndications(asked: Body, indications: readonly Indication[]): Body {
  return { ...asked, observations: { ...asked.observations, indications } };
}

function movedShape(shape: Shape | null, move: (p: PointUm) => PointUm, turnDeg: number): Shape | null {
  if (shape === null || shape.kind === 'entered') return shape;
  if (shape.kind === 'circle') return { ...shape, center: move(shape.center) };
  if (shape.kind === 'ellipse') return { ...shape, center: move(shape.center), angle: (shape.angle ?? 0) + turnDeg };
  return { ...shape, points: shape.points.map(move) };
}

function moved(asked: Body, move: (p: PointUm) => PointUm, turnDeg: number): Body {
  const zones = asked.criteria.zones.map((zone) => ({ ...zone, polygon: zone.polygon.map(move) }));
  const indications = asked.observations.indications.map((one) => ({ ...one, shape: movedShape(one.shape, move, turnDeg) }));
  return { criteria: { ...asked.criteria, zones }, observations: { ...asked.observations, indications } };
}

const RUNS = { numRuns: 300 };

test('the order of indications does not matter, nor does the order in which they merge', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(body, fc.infiniteStream(fc.nat()), (asked, keys) => {
      const shuffled = asked.observations.indications
        .map((one) => ({ one, key: keys.next().value ?? 0 }))
        .sort((a, b) => a.key - b.key)
        .map(({ one }) => one);
      expect(answerTo(withIndications(asked, shuffled))).toEqual(answerTo(asked));
    }),
    RUNS,
  );
});

test('renaming indications changes no verdict and no measure', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(body, (asked) => {
      const { indications } = asked.observations;
      const renamed = indications.map((one, at) => ({ ...one, id: `z${99 - at}` }));
      const seen = (of: Body) =>
        answerTo(of).rules.map(({ verdict, measured, indications: ids }) => [verdict, measured, ids.length]);
      expect(seen(withIndications(asked, renamed))).toEqual(seen(asked));
    }),
    RUNS,
  );
});

test('moving by whole micrometres and turning by quarters changes nothing', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(body, fc.integer({ min: -9e7, max: 9e7 }), fc.integer({ min: -9e7, max: 9e7 }), (asked, dx, dy) => {
      const answer = answerTo(asked);
      expect(answerTo(moved(asked, ([x, y]) => [x + dx, y + dy], 0))).toEqual(answer);
      expect(answerTo(moved(asked, ([x, y]) => [-y, x], 90))).toEqual(answer);
      expect(answerTo(moved(asked, ([x, y]) => [y, -x], -90))).toEqual(answer);
    }),
    RUNS,
  );
});

const RANK: Readonly<Record<string, number>> = { accept: 0, indeterminate: 1, reject: 2 };

test('adding an indication never improves the verdict so far', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(body, indication, (asked, added) => {
      const before = answerTo(asked).verdictSoFar;
      const after = answerTo(
        withIndications(asked, [...asked.observations.indications, { id: 'more', view: 'v', ...added }]),
      ).verdictSoFar;
      if (before === 'reject' || before === 'indeterminate')
        expect(RANK[after ?? 'accept']).toBeGreaterThanOrEqual(RANK[before] ?? 0);
    }),
    RUNS,
  );
});

const less = (text: string, by: number) => Math.max(0, Number(text) - by / 100).toFixed(2);
const more = (text: string, by: number) => (Number(text) + by / 100).toFixed(2);

/** The same rule, asked more strictly. */
function tightened(rule: IndicationRule, by: number): IndicationRule {
  const wider = <W extends { readonly size: string }>(w: W): W => ({ ...w, size: more(w.size, by) });
  switch (rule.kind) {
    case 'max-size':
      return { ...rule, limit: less(rule.limit, by) };
    case 'size-bands':
      return {
        ...rule,
        bands: rule.bands.map(({ to, count: n }, at) => ({
          to: less(to, Math.min(by, 3) * at),
          count: n === null ? null : Math.max(0, n - (by % 2)),
        })),
      };
    case 'max-count':
      return { ...rule, limit: Math.max(0, rule.limit - by) };
    case 'max-count-in-window':
      return { ...rule, window: wider(rule.window) };
    case 'min-separation':
      return { ...rule, limit: more(rule.limit, by) };
    case 'max-total-length':
    case 'max-total-area':
      return { ...rule, limit: less(rule.limit, by % 3), window: by % 2 === 0 || !rule.window ? undefined : wider(rule.window) };
    case 'alignment':
      return {
        ...rule,
        stripWidth: more(rule.stripWidth, by),
        gap: more(rule.gap, by % 7),
        count: Math.max(2, rule.count - (by % 2)),
      };
    default:
      return rule;
  }
}

test('tightening a rule never turns reject into accept', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(body, fc.integer({ min: 0, max: 30 }), (asked, by) => {
      const sets = asked.criteria.indicationRules.map((one) => ({
        ...one,
        rules: (one.rules ?? []).map((rule) => tightened(rule, by)),
      }));
      const strict = answerTo({ ...asked, criteria: { ...asked.criteria, indicationRules: sets } });
      answerTo(asked).rules.forEach((row, at) => {
        if (row.verdict === 'reject') expect(strict.rules[at]?.verdict).toBe('reject');
      });
    }),
    RUNS,
  );
});

const LENGTH_KEYS = ['limit', 'to', 'size', 'within', 'stripWidth', 'gap', 'recordable'];

/** Everything 127 times as large, under the same rules in inches: 127 mm are 5 in. */
function inInches(asked: Body): unknown {
  const grown: unknown = JSON.parse(
    JSON.stringify({ zones: asked.criteria.zones, indications: asked.observations.indications }),
    (key, value: unknown) => (typeof value === 'number' && key !== 'angle' ? value * 127 : value),
  );
  const rules: unknown = JSON.parse(JSON.stringify(asked.criteria.indicationRules), (key, value: unknown) => {
    if (typeof value === 'string' && LENGTH_KEYS.includes(key)) return (Number(value) * 5).toFixed(2);
    const area = value as { readonly kind?: string; readonly limit?: string } | null;
    return area?.kind === 'max-total-area' ? { ...area, limit: (Number(area.limit) * 5).toFixed(2) } : value;
  });
  const { zones, indications } = grown as { readonly zones: unknown; readonly indications: unknown };
  return {
    criteria: { ...asked.criteria, lengthUnit: 'in', zones, indicationRules: rules },
    observations: { ...asked.observations, indications },
  };
}

test('limits in inches give the verdicts of the same limits in millimetres', { timeout: 60_000 }, () => {
  fc.assert(
    fc.property(body, (drawnOf) => {
      // At a ratio of exactly 2 a triangle of two equal legs is linear or not by the rounding of its sizes alone (N6).
      const asked: Body = { ...drawnOf, criteria: { ...drawnOf.criteria, linear: { ratio: '2.3', at: 'above' } } };
      const inches = evaluate(inInches(asked));
      if (!inches.ok) throw new Error(JSON.stringify(inches.faults));
      expect(inches.answer.rules.map((row) => row.verdict)).toEqual(answerTo(asked).rules.map((row) => row.verdict));
    }),
    RUNS,
  );
});

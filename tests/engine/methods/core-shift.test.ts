import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { fitCore } from '@/services/engine/methods/core-shift/fit-sections';
import type { CoreMotion, WallPair } from '@/services/engine/methods/core-shift/fit-sections';
import { fourWalls, opposedWalls } from '@/services/engine/methods/core-shift/opposed-walls';
import { add, compare, decimalText, multiply, numberOf, ratio, subtract } from '@/services/engine/quantity/decimal';
import type { Rational } from '@/services/engine/quantity/decimal';
import { referenceJson, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, valueOf } from './numbers';

interface Published {
  opposed: { t1: number; t2: number; eccentricity: number; mean: number }[];
  four_point: {
    walls_0_90_180_270: number[];
    ex: number;
    ey: number;
    e: number;
    direction_deg: number;
    mean: number;
    min_predicted: number;
  };
}

describe.skipIf(withoutReference)('published core shifts', () => {
  const published = withoutReference ? undefined : referenceJson<Published>('core_shift_density.json');

  test('half the wall difference of opposed walls', () => {
    for (const one of published?.opposed ?? []) {
      const found = valueOf(opposedWalls(x(one.t1), x(one.t2)));
      expect(compare(found.shiftMm, x(one.eccentricity))).toBe(0);
      expect(compare(found.meanMm, x(one.mean))).toBe(0);
    }
    expect(published?.opposed.length).toBe(2);
  });

  test('vector of a section from four walls', () => {
    const one = published?.four_point;
    const [a = 0, b = 0, c = 0, d = 0] = one?.walls_0_90_180_270 ?? [];
    const found = valueOf(fourWalls(x(a), x(b), x(c), x(d)));
    expect(compare(found.alongXMm, x(one?.ex ?? 0))).toBe(0);
    expect(compare(found.alongYMm, x(one?.ey ?? 0))).toBe(0);
    expect(numberOf(found.shiftMm)).toBeCloseTo(one?.e ?? 0, 7);
    expect(found.directionDegrees).toBeCloseTo(one?.direction_deg ?? 0, 6);
    expect(compare(found.meanMm, x(one?.mean ?? 0))).toBe(0);
    expect(numberOf(found.leastPredictedMm)).toBeCloseTo(one?.min_predicted ?? 0, 7);
  });
});

const wall: Rational = ratio(10n);

/** A pair whose half difference is what the motion makes of its place (wall 10 mm either side). */
function made(axis: 'x' | 'y', place: readonly [Rational, Rational, Rational], motion: readonly Rational[]): WallPair {
  const [xMm, yMm, zMm] = place;
  const [shiftX = x(0), shiftY = x(0), turn = x(0), leanX = x(0), leanY = x(0)] = motion;
  const half =
    axis === 'x'
      ? add(subtract(shiftX, multiply(turn, yMm)), multiply(leanX, zMm))
      : add(add(shiftY, multiply(turn, xMm)), multiply(leanY, zMm));
  return { axis, xMm, yMm, zMm, firstMm: add(wall, half), secondMm: subtract(wall, half) };
}

const grid = (motion: readonly Rational[]) =>
  [0, 40, 80].flatMap((z) =>
    (
      [
        ['x', -12, 3],
        ['y', 15, -2],
        ['x', 4, 9],
        ['y', -7, 1],
      ] as const
    ).map(([axis, across, up]) => made(axis, [x(across), x(up), x(z)], motion)),
  );

// By hand: a core moved (0.1, −0.05) mm and turned 0.002 rad = 0.114592° is found again with nothing left over.
test('a rigid motion put in comes out exactly', () => {
  const found = valueOf(fitCore(grid([x('0.1'), x('-0.05'), x('0.002'), x('0.001'), x('-0.0005')]), 'shift-rotation-and-lean'));
  expect([found.alongXMm, found.alongYMm].map((value) => decimalText(value, 12))).toEqual(['0.1', '-0.05']);
  expect(numberOf(found.rotationDegrees)).toBeCloseTo((0.002 * 180) / Math.PI, 12);
  expect(numberOf(found.leanXDegrees)).toBeCloseTo((0.001 * 180) / Math.PI, 12);
  expect(numberOf(found.leanYDegrees)).toBeCloseTo((-0.0005 * 180) / Math.PI, 12);
  expect(found.residualsMm.every(({ n }) => n === 0n)).toBe(true);
  expect(found.rootMeanSquareMm.n).toBe(0n);
});

// By hand: x pairs of 0.10 and 0.14 mm have the mean 0.12 and residuals of ∓0.02; the y pair fits itself: rms √(0.0008/3).
test('a shift over sections is the mean on each axis', () => {
  const place = [x(0), x(0), x(0)] as const;
  const pairs = [made('x', place, [x('0.1')]), made('x', place, [x('0.14')]), made('y', place, [x(0), x('0.05')])];
  const found = valueOf(fitCore(pairs, 'shift'));
  expect(decimalText(found.alongXMm, 6)).toBe('0.12');
  expect(decimalText(found.shiftMm, 6)).toBe('0.13');
  expect(found.residualsMm.map((residual) => decimalText(residual, 6))).toEqual(['-0.02', '0.02', '0']);
  expect(decimalText(found.largestResidualMm, 6)).toBe('0.02');
  expect(numberOf(found.rootMeanSquareMm)).toBeCloseTo(Math.sqrt(0.0008 / 3), 12);
});

const wallMm = fc.integer({ min: 500, max: 2000 }).map((n) => ratio(BigInt(n), 1000n));
const pairAnywhere: fc.Arbitrary<WallPair> = fc.record({
  axis: fc.constantFrom('x' as const, 'y' as const),
  xMm: fc.integer({ min: -50, max: 50 }).map((n) => ratio(BigInt(n))),
  yMm: fc.integer({ min: -50, max: 50 }).map((n) => ratio(BigInt(n))),
  zMm: fc.integer({ min: 0, max: 200 }).map((n) => ratio(BigInt(n))),
  firstMm: wallMm,
  secondMm: wallMm,
});
const motions = fc.constantFrom<CoreMotion>('shift', 'shift-and-rotation', 'shift-rotation-and-lean');

test('the order of the pairs changes no digit, and residuals stand square to the model', () => {
  fc.assert(
    fc.property(fc.array(pairAnywhere, { minLength: 6, maxLength: 12 }), motions, (pairs, motion) => {
      const there = fitCore(pairs, motion);
      const back = fitCore([...pairs].reverse(), motion);
      expect(back.ok).toBe(there.ok);
      if (!there.ok || !back.ok) return;
      expect(decimalText(back.value.shiftMm, 30)).toBe(decimalText(there.value.shiftMm, 30));
      expect(decimalText(back.value.rotationDegrees, 30)).toBe(decimalText(there.value.rotationDegrees, 30));
      const onX = there.value.residualsMm.filter((_, place) => pairs[place]?.axis === 'x');
      expect(onX.reduce(add, x(0)).n).toBe(0n);
    }),
    { numRuns: 500 },
  );
});

test('the same growth on both walls changes nothing; walls swapped turn the shift round', () => {
  fc.assert(
    fc.property(fc.array(pairAnywhere, { minLength: 4, maxLength: 8 }), wallMm, (pairs, more) => {
      const grown = pairs.map((pair) => ({ ...pair, firstMm: add(pair.firstMm, more), secondMm: add(pair.secondMm, more) }));
      const swapped = pairs.map((pair) => ({ ...pair, firstMm: pair.secondMm, secondMm: pair.firstMm }));
      const there = fitCore(pairs, 'shift');
      const more1 = fitCore(grown, 'shift');
      const turned = fitCore(swapped, 'shift');
      if (!there.ok || !more1.ok || !turned.ok) {
        expect([there.ok, more1.ok, turned.ok]).toEqual([false, false, false]);
        return;
      }
      expect(compare(more1.value.alongXMm, there.value.alongXMm)).toBe(0);
      expect(add(turned.value.alongYMm, there.value.alongYMm).n).toBe(0n);
    }),
    { numRuns: 500 },
  );
});

test('refusals: walls of nothing, and pairs that leave the motion open', () => {
  expect(codeOf(opposedWalls(x(0), x(1)))).toBe('not-above-zero');
  expect(codeOf(fourWalls(x(1), x(1), x(1), x('-0.1')))).toBe('not-above-zero');
  const place = [x(0), x(0), x(0)] as const;
  const atOneSpot = [
    made('x', place, []),
    made('x', place, []),
    made('y', place, []),
    made('y', place, []),
    made('x', place, []),
  ];
  expect(codeOf(fitCore([], 'shift'))).toBe('motion-not-determined');
  expect(
    codeOf(
      fitCore(
        atOneSpot.filter(({ axis }) => axis === 'x'),
        'shift',
      ),
    ),
  ).toBe('motion-not-determined');
  expect(codeOf(fitCore(atOneSpot, 'shift'))).toBe('ok');
  expect(codeOf(fitCore(atOneSpot, 'shift-and-rotation'))).toBe('motion-not-determined');
  expect(codeOf(fitCore(grid([]).slice(0, 4), 'shift-rotation-and-lean'))).toBe('motion-not-determined');
});

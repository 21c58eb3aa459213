import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import type { Derived } from '@/services/engine/methods/derived';
import { disorientationDegrees, leastTurnDegrees, rotationOf } from '@/services/engine/methods/grain/disorientation';
import type { Quaternion } from '@/services/engine/methods/grain/disorientation';
import {
  grainNumberOfDensity,
  grainNumberOfIntercept,
  grainsPerMm2,
  largestGrain,
  meanInterceptMm,
} from '@/services/engine/methods/grain/grain-number';
import {
  angleToFamilyDegrees,
  deviationDegrees,
  primaryAngleDegrees,
  sampleAxesInCrystal,
  secondaryAngleDegrees,
} from '@/services/engine/methods/grain/orientation';
import type { Direction, EulerDegrees } from '@/services/engine/methods/grain/orientation';
import { decimalText, numberOf, ratio } from '@/services/engine/quantity/decimal';
import { referenceJson, referenceRows, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, valueOf } from './numbers';

const euler = ([phi1 = 0, capitalPhi = 0, phi2 = 0]: readonly number[]): EulerDegrees => ({ phi1, capitalPhi, phi2 });
interface Published {
  primary_angle_from_direction: {
    growth_axis_in_crystal: [number, number, number];
    angle_to_nearest_001_deg: number;
    angle_110_deg: number;
    angle_111_deg: number;
  }[];
  primary_angle_from_bunge_euler_z_axis: { euler_deg: number[]; angle_deg: number }[];
  disorientation: { e1: number[]; e2: number[]; angle_deg: number }[];
  sigma3_60deg_111: number;
  max_disorientation_deg: number;
  max_case_check: { axis: [number, number, number]; angle: number };
}
/** A turn about an axis as a quaternion, by the platform's own sine. */
const turnAbout = (axis: Direction, degrees: number): Quaternion => {
  const length = Math.hypot(...axis);
  const sine = Math.sin((degrees * Math.PI) / 360) / length;
  return [Math.cos((degrees * Math.PI) / 360), axis[0] * sine, axis[1] * sine, axis[2] * sine];
};
const identity: Quaternion = [1, 0, 0, 0];

describe.skipIf(withoutReference)('published grain numbers and orientations', () => {
  const published = withoutReference ? undefined : referenceJson<Published>('crystal_orientation.json');

  // ASTM E112 relations; the printed constants agree with 2^(G−1) to better than 0.001 of a grain number.
  test('E112: grains per area, mean intercept and grain number', () => {
    const rows = withoutReference ? [] : referenceRows('e112_grain_size.csv');
    expect(rows.length).toBe(30);
    for (const row of rows) {
      const number = row.G === '00' ? -1 : Number(row.G);
      expect(Math.abs(valueOf(grainNumberOfDensity(x(row.NA_grains_per_mm2_1x ?? ''))) - number)).toBeLessThan(1e-3);
      const intercept = ratio(x(row.mean_intercept_um ?? '').n, x(row.mean_intercept_um ?? '').d * 1000n);
      expect(Math.abs(valueOf(grainNumberOfIntercept(intercept)) - number)).toBeLessThan(1e-3);
    }
  });

  test('angles of a growth axis to the nearest cube axis, face and body diagonal', () => {
    for (const one of published?.primary_angle_from_direction ?? []) {
      const angle = (family: '001' | '011' | '111') => valueOf(angleToFamilyDegrees(one.growth_axis_in_crystal, family));
      expect(angle('001')).toBeCloseTo(one.angle_to_nearest_001_deg, 5);
      expect(angle('011')).toBeCloseTo(one.angle_110_deg, 5);
      expect(angle('111')).toBeCloseTo(one.angle_111_deg, 5);
    }
    expect(published?.primary_angle_from_direction.length).toBe(8);
  });

  test('the blade axis from Euler angles', () => {
    for (const one of published?.primary_angle_from_bunge_euler_z_axis ?? [])
      expect(valueOf(primaryAngleDegrees(euler(one.euler_deg)))).toBeCloseTo(one.angle_deg, 5);
    expect(published?.primary_angle_from_bunge_euler_z_axis.length).toBe(6);
  });

  // Two of these pairs are published by an outside program (30° and 47.866°).
  test('disorientation, its maximum and the twin', () => {
    for (const one of published?.disorientation ?? [])
      expect(disorientationDegrees(euler(one.e1), euler(one.e2))).toBeCloseTo(one.angle_deg, 5);
    expect(published?.disorientation.length).toBe(6);
    expect(leastTurnDegrees(identity, turnAbout([1, 1, 1], 60))).toBeCloseTo(published?.sigma3_60deg_111 ?? 0, 9);
    const most = published?.max_case_check;
    expect(leastTurnDegrees(identity, turnAbout(most?.axis ?? [1, 0, 0], published?.max_disorientation_deg ?? 0))).toBeCloseTo(
      most?.angle ?? 0,
      6,
    );
  });
});

describe('grain numbers', () => {
  // By hand (E112): 25 grains per in² at 75× are 14.0625 at 100×, G = log₂ 14.0625 + 1 = 4.814; 1 in² = 645.16 mm².
  test('planimetric count', () => {
    const density = valueOf(grainsPerMm2({ inside: 20, cut: 10, figureMm2: x('645.16'), magnification: x(75) }));
    expect(valueOf(grainNumberOfDensity(density))).toBeCloseTo(4.814, 2);
    expect(decimalText(valueOf(grainsPerMm2({ inside: 68, cut: 41, figureMm2: x(5000), magnification: x(100) })), 6)).toBe('177');
  });

  // By hand: 500 mm of line at 100×, 90 whole + 6 ends/2 + 4 triple points·1.5 = 99 → 0.0505 mm, G = 5.33.
  test('intercept count', () => {
    const mean = valueOf(
      meanInterceptMm({ whole: 90, endsAndTangents: 6, triplePoints: 4, lineMm: x(500), magnification: x(100) }),
    );
    expect(numberOf(mean)).toBeCloseTo(500 / 9900, 12);
    expect(valueOf(grainNumberOfIntercept(mean))).toBeCloseTo(5.33, 2);
  });

  test('twice as fine a grid of grains is two numbers finer', () => {
    fc.assert(
      fc.property(fc.integer({ min: 1, max: 10 ** 6 }), (n) => {
        const once = valueOf(grainNumberOfDensity(ratio(BigInt(n), 100n)));
        expect(valueOf(grainNumberOfDensity(ratio(BigInt(n), 25n))) - once).toBeCloseTo(2, 5);
        const intercept = valueOf(grainNumberOfIntercept(ratio(BigInt(n), 1000n)));
        expect(valueOf(grainNumberOfIntercept(ratio(BigInt(n), 2000n))) - intercept).toBeCloseTo(2, 5);
      }),
      { numRuns: 1000 },
    );
  });

  // By hand: π/4·2·1 = 1.570796 mm²; G = 3.321928·log₁₀(0.63662) − 2.954 = −3.6055.
  test('the largest grain', () => {
    const found = valueOf(
      largestGrain([
        { lengthMm: x(1), widthMm: x(1) },
        { lengthMm: x(2), widthMm: x(1) },
      ]),
    );
    expect(numberOf(found.areaMm2)).toBeCloseTo(Math.PI / 2, 12);
    expect(found.grainNumber).toBeCloseTo(-3.6055, 4);
  });

  test('refusals', () => {
    expect(codeOf(grainsPerMm2({ inside: 0, cut: 0, figureMm2: x(1), magnification: x(1) }))).toBe('nothing-counted');
    expect(codeOf(grainsPerMm2({ inside: -1, cut: 4, figureMm2: x(1), magnification: x(1) }))).toBe('below-zero');
    expect(codeOf(grainsPerMm2({ inside: 1, cut: 0, figureMm2: x(0), magnification: x(1) }))).toBe('not-above-zero');
    expect(codeOf(meanInterceptMm({ whole: 0, endsAndTangents: 0, triplePoints: 0, lineMm: x(1), magnification: x(1) }))).toBe(
      'nothing-counted',
    );
    expect(codeOf(grainNumberOfIntercept(x(0)))).toBe('not-above-zero');
    expect(codeOf(largestGrain([]))).toBe('no-values');
    expect(codeOf(largestGrain([{ lengthMm: x(1), widthMm: x('1.1') }]))).toBe('width-above-length');
  });
});

describe('orientation', () => {
  const angle = fc.double({ min: -360, max: 360, noNaN: true });
  const anyEuler: fc.Arbitrary<EulerDegrees> = fc.record({
    phi1: angle,
    capitalPhi: fc.double({ min: 0, max: 180, noNaN: true }),
    phi2: angle,
  });
  const figureOf = (answer: Derived<number>) => valueOf(answer);

  test('columnar deviation by hand: 1 across in 10 along is 5.71°, on either side and either way up', () => {
    for (const grain of [
      [1, 0, 10],
      [-1, 0, 10],
      [1, 0, -10],
      [0, 1, 10],
    ] as const)
      expect(figureOf(deviationDegrees(grain, [0, 0, 3]))).toBeCloseTo(5.710593, 6);
    expect(codeOf(deviationDegrees([0, 0, 0], [0, 0, 1]))).toBe('direction-without-length');
    expect(codeOf(angleToFamilyDegrees([0, 0, 0], '001'))).toBe('direction-without-length');
  });

  test('both roads from Euler angles turn the same way', () => {
    fc.assert(
      fc.property(anyEuler, (one) => {
        const [w, i, j, k] = rotationOf(one);
        const [, , z] = sampleAxesInCrystal(one);
        const fromQuaternion = [2 * (i * k - w * j), 2 * (j * k + w * i), w * w - i * i - j * j + k * k];
        fromQuaternion.forEach((entry, axis) => expect(Math.abs(entry - (z[axis] ?? 9))).toBeLessThan(1e-12));
      }),
      { numRuns: 2000 },
    );
  });

  test('primary angle is at most that of a body diagonal; a turn about the blade axis leaves it, and turns the secondary', () => {
    fc.assert(
      fc.property(anyEuler, angle, (one, turn) => {
        const alpha = figureOf(primaryAngleDegrees(one));
        expect(alpha).toBeLessThan(54.735611);
        expect(Math.abs(figureOf(primaryAngleDegrees({ ...one, phi1: turn })) - alpha)).toBeLessThan(1e-9);
      }),
      { numRuns: 2000 },
    );
    const upright = (turn: number) => figureOf(secondaryAngleDegrees({ phi1: turn, capitalPhi: 0, phi2: 0 }));
    expect([0, 10, 45, 80, 90].map((turn) => Math.round(upright(turn) * 1e9) / 1e9)).toEqual([0, 10, 45, 10, 0]);
    expect(codeOf(secondaryAngleDegrees({ phi1: 0, capitalPhi: 45, phi2: 0 }))).toBe('no-primary-axis');
  });

  // Mackenzie 1958: no two cubes are turned by more than 2·acos((2 + √2)/4) = 62.79943°.
  test('disorientation: never above the maximum, the same either way round, none for the same crystal', () => {
    fc.assert(
      fc.property(anyEuler, anyEuler, (one, other) => {
        const between = disorientationDegrees(one, other);
        expect(between).toBeLessThan(62.7994297);
        expect(Math.abs(disorientationDegrees(other, one) - between)).toBeLessThan(1e-6);
        expect(disorientationDegrees(one, one)).toBeLessThan(1e-6);
        expect(Math.abs(disorientationDegrees(one, { ...other, phi2: other.phi2 + 90 }) - between)).toBeLessThan(1e-6);
      }),
      { numRuns: 3000 },
    );
  });

  // Closed form for cubes (Sutton and Balluffi, from memory): the largest of q₁, (q₁+q₂)/√2, (q₁+q₂+q₃+q₄)/2 of sorted |q|.
  test('disorientation agrees with the closed form', () => {
    fc.assert(
      fc.property(anyEuler, (one) => {
        const q = rotationOf(one)
          .map(Math.abs)
          .sort((a, b) => b - a);
        const [a = 0, b = 0, c = 0, d = 0] = q;
        const most = Math.max(a, (a + b) / Math.SQRT2, (a + b + c + d) / 2);
        const closed = (360 / Math.PI) * Math.acos(Math.min(1, most));
        expect(Math.abs(leastTurnDegrees(identity, rotationOf(one)) - closed)).toBeLessThan(1e-5);
      }),
      { numRuns: 3000 },
    );
  });
});

import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import { chordBetween, circleThrough } from '@/services/engine/methods/dimensional/circle';
import {
  materialBonusMm,
  positionAllowedMm,
  positionLessBonusMm,
  positionMm,
} from '@/services/engine/methods/dimensional/position';
import type { MaterialRequirement } from '@/services/engine/methods/dimensional/position';
import { profileAfterFitMm, rigidFit } from '@/services/engine/methods/dimensional/rigid-fit';
import type { Point } from '@/services/engine/methods/dimensional/rigid-fit';
import { profileMm, spreadOf } from '@/services/engine/methods/dimensional/spread';
import { compare, decimalText, numberOf, ratio } from '@/services/engine/quantity/decimal';
import { referenceJson, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, figure, valueOf } from './numbers';

interface Kabsch {
  case: string;
  source?: number[][];
  target: number[][];
  R?: number[][];
  t?: number[];
  rms: number;
  max_residual?: number;
}
interface Published {
  position: { dx: number; dy: number; diametral: number }[];
  mmc: {
    tol: number;
    size_actual: number;
    mmc_hole: number;
    lmc_hole?: number;
    bonus: number | string;
    total?: number;
    deviation?: number;
    verdict: string;
  }[];
  kabsch: Kabsch[];
  circle_fit_kasa: { points: [number, number][]; cx: number; cy: number; radius: number }[];
  plane_line: { chord_from_LE_TE: { LE: [number, number]; TE: [number, number]; chord: number; stagger_deg_vs_x: number } };
  profile_bilateral: { deviations: number[]; reported_2x_max_abs: number; worst_abs: number; zone_width: number };
}
const point = ([a, b]: readonly [number, number]) => ({ xMm: x(a), yMm: x(b) });

describe.skipIf(withoutReference)('published dimensional examples', () => {
  const published = withoutReference ? undefined : referenceJson<Published>('dimensional_examples.json');

  test('position as a diameter', () => {
    for (const one of published?.position ?? [])
      expect(numberOf(positionMm([x(one.dx), x(one.dy)]))).toBeCloseTo(one.diametral, 8);
    expect(published?.position.length).toBe(4);
  });

  test('maximum material bonus of a hole, and the size that must pass by itself', () => {
    for (const one of published?.mmc ?? []) {
      const hole = {
        kind: 'hole' as const,
        smallestMm: x(one.mmc_hole),
        largestMm: x(one.lmc_hole ?? 10.1),
        actualMm: x(one.size_actual),
      };
      const bonus = materialBonusMm(hole, 'maximum');
      if (typeof one.bonus === 'string') {
        expect(codeOf(bonus)).toBe('size-outside-limits');
        continue;
      }
      expect(numberOf(valueOf(bonus))).toBeCloseTo(one.bonus, 12);
      const allowed = valueOf(positionAllowedMm(x(one.tol), hole, 'maximum'));
      expect(numberOf(allowed)).toBeCloseTo(one.total ?? 0, 12);
      const deviation = x(one.deviation ?? 0);
      expect(compare(deviation, allowed) <= 0).toBe(one.verdict === 'accept');
    }
    expect(published?.mmc.length).toBe(3);
  });

  test('rigid best fit: exact, noisy and mirrored sets', () => {
    const source = published?.kabsch[0]?.source ?? [];
    for (const one of published?.kabsch ?? []) {
      const fit = valueOf(rigidFit(one.source ?? source, one.target, 3));
      expect(fit.rootMeanSquareMm).toBeCloseTo(one.rms, 8);
      if (one.R === undefined) continue;
      one.R.forEach((row, i) => row.forEach((entry, j) => expect(fit.rotation[i]?.[j]).toBeCloseTo(entry, 9)));
      one.t?.forEach((entry, i) => expect(fit.shiftMm[i]).toBeCloseTo(entry, 8));
      expect(fit.largestResidualMm).toBeCloseTo(one.max_residual ?? 0, 8);
    }
    expect(published?.kabsch.length).toBe(3);
  });

  test('circle by algebraic fit, chord and stagger, profile of deviations', () => {
    for (const one of published?.circle_fit_kasa ?? []) {
      const circle = valueOf(circleThrough(one.points.map(point)));
      expect(numberOf(circle.xMm)).toBeCloseTo(one.cx, 8);
      expect(numberOf(circle.yMm)).toBeCloseTo(one.cy, 8);
      expect(numberOf(circle.radiusMm)).toBeCloseTo(one.radius, 7);
    }
    const chord = published?.plane_line.chord_from_LE_TE;
    const found = valueOf(chordBetween(point(chord?.LE ?? [0, 0]), point(chord?.TE ?? [0, 0])));
    expect(numberOf(found.lengthMm)).toBeCloseTo(chord?.chord ?? 0, 7);
    expect(found.staggerDegrees).toBeCloseTo(chord?.stagger_deg_vs_x ?? 0, 7);
    const profile = published?.profile_bilateral;
    expect(figure(profileMm((profile?.deviations ?? []).map(x), x(0)))).toBeCloseTo(profile?.reported_2x_max_abs ?? 0, 12);
  });
});

describe('position and material', () => {
  const feature = (kind: 'hole' | 'pin', actual: string) => ({
    kind,
    smallestMm: x('10'),
    largestMm: x('10.1'),
    actualMm: x(actual),
  });

  // ISO 2692 by hand: a hole has most metal at its smallest, a pin at its largest.
  test.each<['hole' | 'pin', MaterialRequirement, string, string]>([
    ['hole', 'maximum', '10.08', '0.08'],
    ['hole', 'least', '10.08', '0.02'],
    ['pin', 'maximum', '10.08', '0.02'],
    ['pin', 'least', '10.08', '0.08'],
    ['hole', 'maximum', '10.1', '0.1'],
    ['pin', 'maximum', '10.1', '0'],
    ['hole', 'none', '10.05', '0'],
  ])('%s, %s material, size %s: bonus %s', (kind, requirement, actual, bonus) => {
    expect(decimalText(valueOf(materialBonusMm(feature(kind, actual), requirement)), 6)).toBe(bonus);
  });

  test('position less bonus against the tolerance judges as position against tolerance with bonus', () => {
    const hundredths = (most: number) => fc.integer({ min: 0, max: most }).map((n) => ratio(BigInt(n), 100n));
    fc.assert(
      fc.property(hundredths(30), hundredths(30), hundredths(40), fc.integer({ min: 0, max: 10 }), (dx, dy, tolerance, over) => {
        const hole = feature('hole', `10.${String(over).padStart(2, '0')}`);
        const less = valueOf(positionLessBonusMm([dx, dy], hole, 'maximum'));
        const allowed = valueOf(positionAllowedMm(tolerance, hole, 'maximum'));
        expect(compare(less, tolerance) <= 0).toBe(compare(positionMm([dx, dy]), allowed) <= 0);
      }),
      { numRuns: 3000 },
    );
  });

  test('refusals', () => {
    expect(codeOf(materialBonusMm(feature('hole', '10.1000001'), 'none'))).toBe('size-outside-limits');
    expect(codeOf(materialBonusMm({ ...feature('hole', '10'), largestMm: x('9') }, 'maximum'))).toBe('limits-crossed');
    expect(codeOf(positionAllowedMm(x('-0.1'), feature('hole', '10'), 'maximum'))).toBe('below-zero');
    expect(codeOf(positionLessBonusMm([x(0)], feature('pin', '9.99'), 'least'))).toBe('size-outside-limits');
    expect(codeOf(spreadOf([]))).toBe('no-values');
    expect(codeOf(circleThrough([point([0, 0]), point([1, 1]), point([2, 2])]))).toBe('circle-not-determined');
    expect(codeOf(chordBetween(point([1, 1]), point([1, 1])))).toBe('points-are-one');
  });

  test('average, range and a zone that is not laid evenly, by hand', () => {
    const spread = valueOf(spreadOf([x('1.02'), x('0.99'), x('1.05')]));
    expect([spread.average, spread.least, spread.largest, spread.range].map((v) => decimalText(v, 6))).toEqual([
      '1.02',
      '0.99',
      '1.05',
      '0.06',
    ]);
    expect(decimalText(valueOf(profileMm([x('0.1'), x('-0.02')], x('0.04'))), 6)).toBe('0.12');
  });
});

describe('rigid fit', () => {
  const coordinate = fc.double({ min: -100, max: 100, noNaN: true });
  const cloud = (dimensions: 2 | 3) =>
    fc.array(fc.array(coordinate, { minLength: dimensions, maxLength: dimensions }), { minLength: 5, maxLength: 12 });
  const spin = fc.tuple(...Array.from({ length: 4 }, () => fc.double({ min: -1, max: 1, noNaN: true })));

  /** A rotation from a quaternion: another road to a rotation than the one that is tested (Horn 1987). */
  const rotationOf = ([a, b, c, d]: readonly number[]): Point[] => {
    const [w = 1, i = 0, j = 0, k = 0] = [a, b, c, d];
    const n = w * w + i * i + j * j + k * k;
    return [
      [(w * w + i * i - j * j - k * k) / n, (2 * (i * j - w * k)) / n, (2 * (i * k + w * j)) / n],
      [(2 * (i * j + w * k)) / n, (w * w - i * i + j * j - k * k) / n, (2 * (j * k - w * i)) / n],
      [(2 * (i * k - w * j)) / n, (2 * (j * k + w * i)) / n, (w * w - i * i - j * j + k * k) / n],
    ];
  };
  const moved = (points: readonly Point[], rows: readonly Point[], shift: Point) =>
    points.map((p) => rows.map((row, i) => row.reduce((sum, entry, j) => sum + entry * (p[j] ?? 0), 0) + (shift[i] ?? 0)));

  test('a motion put in comes out, in three dimensions and in a plane', () => {
    fc.assert(
      fc.property(cloud(3), spin, fc.tuple(coordinate, coordinate, coordinate), (points, quaternion, shift) => {
        fc.pre(quaternion.reduce((sum, q) => sum + q * q, 0) > 0.01);
        const fit = rigidFit(points, moved(points, rotationOf(quaternion), shift), 3);
        if (fit.ok) expect(fit.value.largestResidualMm).toBeLessThan(1e-6);
        else expect(fit.fault.code).toBe('turn-not-determined');
      }),
      { numRuns: 1000 },
    );
    fc.assert(
      fc.property(
        cloud(2),
        fc.double({ min: -3, max: 3, noNaN: true }),
        fc.tuple(coordinate, coordinate),
        (points, turn, shift) => {
          const rows = [
            [Math.cos(turn), -Math.sin(turn)],
            [Math.sin(turn), Math.cos(turn)],
          ];
          const fit = rigidFit(points, moved(points, rows, shift), 2);
          if (fit.ok) expect(fit.value.largestResidualMm).toBeLessThan(1e-9);
          else expect(fit.fault.code).toBe('turn-not-determined');
        },
      ),
      { numRuns: 1000 },
    );
  });

  test('no other turn near the answer fits better, and the answer never mirrors', () => {
    fc.assert(
      fc.property(cloud(3), cloud(3), spin, (source, target, nudge) => {
        const count = Math.min(source.length, target.length);
        const [a, b] = [source.slice(0, count), target.slice(0, count)];
        const fit = rigidFit(a, b, 3);
        if (!fit.ok) return;
        const best = fit.value.rootMeanSquareMm;
        const [r0 = [], r1 = [], r2 = []] = fit.value.rotation;
        const cross = [0, 1, 2].map(
          (i) => (r0[(i + 1) % 3] ?? 0) * (r1[(i + 2) % 3] ?? 0) - (r0[(i + 2) % 3] ?? 0) * (r1[(i + 1) % 3] ?? 0),
        );
        cross.forEach((entry, i) => expect(Math.abs(entry - (r2[i] ?? 0))).toBeLessThan(1e-9));
        const small = rotationOf([1, ...nudge.slice(0, 3).map((n) => n * 0.05)]);
        const turned = moved(a, fit.value.rotation, [0, 0, 0]);
        const other = moved(turned, small, [0, 0, 0]);
        const middle = (points: readonly Point[]) =>
          [0, 1, 2].map((i) => points.reduce((sum, p) => sum + (p[i] ?? 0), 0) / count);
        const [from, to] = [middle(other), middle(b)];
        const rms = Math.sqrt(
          other.reduce(
            (sum, p, n) =>
              sum + [0, 1, 2].reduce((s, i) => s + ((p[i] ?? 0) - (from[i] ?? 0) - (b[n]?.[i] ?? 0) + (to[i] ?? 0)) ** 2, 0),
            0,
          ) / count,
        );
        expect(rms).toBeGreaterThan(best - 1e-9);
      }),
      { numRuns: 500 },
    );
  });

  test('points in one plane are enough in three dimensions', () => {
    const flat = [
      [0, 0, 0],
      [10, 0, 0],
      [10, 7, 0],
      [0, 7, 0],
    ];
    const quarter = [
      [0, 0, 1],
      [1, 0, 0],
      [0, 1, 0],
    ];
    const fit = valueOf(rigidFit(flat, moved(flat, quarter, [1, 2, 3]), 3));
    expect(fit.largestResidualMm).toBeLessThan(1e-12);
    fit.rotation.forEach((row, i) => row.forEach((entry, j) => expect(entry).toBeCloseTo(quarter[i]?.[j] ?? 9, 12)));
  });

  // By hand: a square section measured 0.03 mm proud on one side, moved by (5, −2): the fit gives half of it back.
  test('profile after fit', () => {
    const nominal = [
      [10, 0],
      [-10, 0],
      [0, 10],
      [0, -10],
    ];
    const normals = [
      [2, 0],
      [-2, 0],
      [0, 2],
      [0, -2],
    ];
    const measured = [
      [15.03, -2],
      [-5, -2],
      [5, 8],
      [5, -12],
    ];
    const found = valueOf(profileAfterFitMm(nominal, normals, measured, 2));
    expect(found.deviationsMm.map((d) => Math.round(d * 1e6) / 1e6 + 0)).toEqual([0.0225, 0.0075, 0, 0]);
    expect(found.profileMm).toBeCloseTo(0.045, 9);
    expect(valueOf(profileAfterFitMm(nominal, normals, measured, 2, 0.0225)).profileMm).toBeCloseTo(0.045, 9);
  });

  test('refusals', () => {
    const line = [
      [0, 0, 0],
      [1, 1, 1],
      [2, 2, 2],
      [5, 5, 5],
    ];
    expect(codeOf(rigidFit(line, line, 3))).toBe('turn-not-determined');
    expect(codeOf(rigidFit(line.slice(0, 2), line.slice(0, 2), 3))).toBe('too-few-points');
    expect(codeOf(rigidFit(line, line.slice(1), 3))).toBe('points-unpaired');
    const spot = [
      [1, 1],
      [1, 1],
    ];
    expect(codeOf(rigidFit(spot, spot, 2))).toBe('turn-not-determined');
    const cross = [
      [1, 0],
      [-1, 0],
      [0, 1],
      [0, -1],
    ];
    const mirrored = cross.map(([a = 0, b = 0]) => [a, -b]);
    expect(codeOf(rigidFit(cross, mirrored, 2))).toBe('turn-not-determined');
    expect(codeOf(profileAfterFitMm(cross, [[0, 0], ...cross.slice(1)], cross, 2))).toBe('normal-without-direction');
    expect(codeOf(profileAfterFitMm(cross, cross.slice(1), cross, 2))).toBe('points-unpaired');
  });
});

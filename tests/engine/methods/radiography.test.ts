import fc from 'fast-check';
import { describe, expect, test } from 'vitest';
import {
  activityLeft,
  filmDensity,
  halfValueLayerMm,
  halfValueLayerOfCoefficient,
  halfValueLayers,
  transmission,
} from '@/services/engine/methods/radiography/attenuation';
import type { Shield } from '@/services/engine/methods/radiography/attenuation';
import * as geometry from '@/services/engine/methods/radiography/geometry';
import { compare, decimalText, numberOf, ratio } from '@/services/engine/quantity/decimal';
import { referenceJson, referenceRows, withoutReference } from '../../support/reference';
import { codeOf, exactly as x, figure, valueOf } from './numbers';

interface Published {
  Ug: { F: number; f_source_object: number; b_object_film: number; Ug: number; M: number; SDD: number }[];
  fmin_ISO17636: { d: number; b: number; class: 'A' | 'B'; fmin: number }[];
  inverse_square: { E1_mAs?: number; I1?: number; D1: number; D2: number; E2_mAs?: number; I2?: number }[];
  hvl: { HVL?: number; thickness?: number; transmission?: number; mu_per_cm?: number; HVL_cm?: number }[];
  decay_Ir192: { A0: number; days: number; half_life_d: number; A: number }[];
  total_unsharpness: { Ug: number; Ui: number; UT_rss: number }[];
  image_unsharpness_mag: { focal_d: number; M: number; SRb_det: number; Uimg_obj: number }[];
  film_density: { I0_over_I: number; D: number }[];
}
const close = (value: number, expected: number) => expect(Math.abs(value / expected - 1)).toBeLessThan(2e-7);

describe.skipIf(withoutReference)('published radiography examples', () => {
  const published = withoutReference ? undefined : referenceJson<Published>('radiography_examples.json');

  test('unsharpness and magnification', () => {
    for (const one of published?.Ug ?? []) {
      const [f, a, b] = [x(one.F), x(one.f_source_object), x(one.b_object_film)];
      close(figure(geometry.geometricUnsharpnessMm(f, a, b)), one.Ug);
      close(figure(geometry.magnification(a, b)), one.M);
      expect(figure(geometry.unsharpnessAtObjectMm(f, a, b))).toBeCloseTo((one.F * (one.M - 1)) / one.M, 6);
      close(figure(geometry.leastSourceDistanceMm(f, b, x(one.Ug))), one.f_source_object);
    }
    for (const one of published?.total_unsharpness ?? [])
      close(figure(geometry.totalUnsharpnessMm(x(one.Ug), x(one.Ui))), one.UT_rss);
    for (const one of published?.image_unsharpness_mag ?? [])
      close(figure(geometry.imageUnsharpnessMm(x(one.focal_d), x(one.M), x(one.SRb_det))), one.Uimg_obj);
    expect([published?.Ug.length, published?.total_unsharpness.length, published?.image_unsharpness_mag.length]).toEqual([
      5, 3, 3,
    ]);
  });

  // The formula is from memory of ISO 17636 and EN 12681-1.
  test('least source distance by class', () => {
    for (const one of published?.fmin_ISO17636 ?? [])
      close(figure(geometry.leastSourceDistanceOfClassMm(x(one.d), x(one.b), one.class)), one.fmin);
    expect(published?.fmin_ISO17636.length).toBe(10);
  });

  test('inverse square law', () => {
    for (const one of published?.inverse_square ?? []) {
      const [from, to] = [x(one.D1), x(one.D2)];
      if (one.E1_mAs !== undefined) close(figure(geometry.exposureAtDistance(x(one.E1_mAs), from, to)), one.E2_mAs ?? 0);
      else close(figure(geometry.intensityAtDistance(x(one.I1 ?? 0), from, to)), one.I2 ?? 0);
    }
    expect(published?.inverse_square.length).toBe(3);
  });

  test('half-value layers, decay and film density', () => {
    for (const one of published?.hvl ?? []) {
      if (one.mu_per_cm !== undefined) close(figure(halfValueLayerOfCoefficient(x(one.mu_per_cm))), one.HVL_cm ?? 0);
      else close(valueOf(transmission(x(one.thickness ?? 0), x(one.HVL ?? 0))), one.transmission ?? 0);
    }
    for (const one of published?.decay_Ir192 ?? [])
      close(valueOf(activityLeft(x(one.A0), x(one.days), x(one.half_life_d))), one.A);
    for (const one of published?.film_density ?? []) close(valueOf(filmDensity(x(one.I0_over_I), x(1))), one.D);
    expect([published?.hvl.length, published?.decay_Ir192.length, published?.film_density.length]).toEqual([4, 2, 5]);
  });

  test('the table of half-value layers is the published one', () => {
    const rows = referenceRows('hvl_tvl_mm.csv');
    expect(rows.length).toBe(15);
    for (const row of rows) {
      for (const shield of ['concrete', 'steel', 'lead'] satisfies Shield[]) {
        const printed = row[`HVL_${shield}`] ?? '';
        const found = halfValueLayerMm(row.energy ?? '', shield);
        if (printed === '') expect(codeOf(found)).toBe('not-in-table');
        else expect(compare(valueOf(found), x(printed))).toBe(0);
      }
    }
  });
});

// By hand: 3 mm spot, 600 mm to the object, 30 mm behind: 0.15 mm; 38.1 mm of 12.7 mm layers are 3, an eighth passes.
test('by hand, exactly', () => {
  expect(decimalText(valueOf(geometry.geometricUnsharpnessMm(x(3), x(600), x(30))), 12)).toBe('0.15');
  expect(decimalText(valueOf(geometry.totalUnsharpnessMm(x('0.3'), x('0.4'))), 12)).toBe('0.5');
  expect(decimalText(valueOf(halfValueLayers(x('38.1'), x('12.7'))), 12)).toBe('3');
  expect(valueOf(transmission(x('38.1'), x('12.7')))).toBeCloseTo(0.125, 14);
});

test('unsharpness at the least distance meets its limit, and every nearer one misses it', () => {
  const tenths = fc.integer({ min: 1, max: 500 }).map((n) => ratio(BigInt(n), 10n));
  fc.assert(
    fc.property(tenths, tenths, tenths, (spot, behind, limit) => {
      const least = valueOf(geometry.leastSourceDistanceMm(spot, behind, limit));
      expect(compare(valueOf(geometry.geometricUnsharpnessMm(spot, least, behind)), limit)).toBe(0);
      const nearer = ratio(least.n * 999n, least.d * 1000n);
      expect(compare(valueOf(geometry.geometricUnsharpnessMm(spot, nearer, behind)), limit)).toBe(1);
      const seen = valueOf(geometry.unsharpnessAtObjectMm(spot, least, behind));
      expect(compare(seen, valueOf(geometry.geometricUnsharpnessMm(spot, least, behind)))).toBe(-1);
    }),
    { numRuns: 1000 },
  );
});

test('two thicknesses let through the product of what each does', () => {
  fc.assert(
    fc.property(fc.integer({ min: 0, max: 900 }), fc.integer({ min: 0, max: 900 }), (a, b) => {
      const share = (mm: number) => valueOf(transmission(x(mm), x(13)));
      expect(Math.abs(share(a + b) / (share(a) * share(b)) - 1)).toBeLessThan(1e-12);
      expect(Math.abs(share(a) / 2 ** (-a / 13) - 1)).toBeLessThan(1e-12);
    }),
    { numRuns: 1000 },
  );
});

test('refusals', () => {
  expect(codeOf(geometry.geometricUnsharpnessMm(x(0), x(600), x(30)))).toBe('not-above-zero');
  expect(codeOf(geometry.geometricUnsharpnessMm(x(1), x(0), x(30)))).toBe('not-above-zero');
  expect(codeOf(geometry.magnification(x(100), x(-1)))).toBe('below-zero');
  expect(codeOf(geometry.unsharpnessAtObjectMm(x(1), x(0), x(1)))).toBe('not-above-zero');
  expect(codeOf(geometry.unsharpnessAtObjectMm(x(0), x(1), x(1)))).toBe('not-above-zero');
  expect(codeOf(geometry.imageUnsharpnessMm(x(1), x('0.99'), x('0.1')))).toBe('magnification-below-one');
  expect(codeOf(geometry.leastSourceDistanceMm(x(1), x(1), x(0)))).toBe('not-above-zero');
  expect(codeOf(geometry.leastSourceDistanceOfClassMm(x(1), x(0), 'A'))).toBe('not-above-zero');
  expect(codeOf(halfValueLayers(x(1), x(0)))).toBe('not-above-zero');
  expect(codeOf(transmission(x(100_000), x(1)))).toBe('beyond-table');
  expect(codeOf(filmDensity(x(1), x(0)))).toBe('not-above-zero');
  expect(codeOf(halfValueLayerMm('160 kV', 'lead'))).toBe('not-in-table');
  expect(numberOf(valueOf(halfValueLayerMm('Ir-192', 'steel')))).toBe(13);
});

import { add, compare, decimalText, divide, multiply, numberOf, ratio, rationalOf } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { decimalLog } from '../../quantity/elementary';
import { PI } from '../../quantity/roots';
import { belowZero, notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

const HALF = rationalOf('0.5');

/** Grain number from grains per mm² at 1×: G = 3.321928·log₁₀ N_A − 2.954. Source: ASTM E112 (planimetric). */
export function grainNumberOfDensity(grainsPerMm2: Rational): Derived<number> {
  return notAboveZero({ grainsPerMm2 }) ?? derived(3.321928 * decimalLog(numberOf(grainsPerMm2)) - 2.954);
}

/** Grain number from the mean lineal intercept: G = −6.643856·log₁₀ ℓ − 3.288, ℓ in mm. Source: ASTM E112 (intercept). */
export function grainNumberOfIntercept(meanInterceptMm: Rational): Derived<number> {
  return notAboveZero({ meanInterceptMm }) ?? derived(-6.643856 * decimalLog(numberOf(meanInterceptMm)) - 3.288);
}

export interface PlanimetricCount {
  readonly inside: number;
  /** Grains cut by the border: each counts half. */
  readonly cut: number;
  /** Area of the test figure as drawn on the picture. */
  readonly figureMm2: Rational;
  readonly magnification: Rational;
}

/**
 * Grains per mm² by Jeffries' planimetric count: f·(inside + cut/2), f = M²/A. Refuses no grains, negative counts, and an area
 * or magnification not above zero. Source: ASTM E112, planimetric procedure.
 */
export function grainsPerMm2({ inside, cut, figureMm2, magnification }: PlanimetricCount): Derived<Rational> {
  const counts = { inside: ratio(BigInt(inside)), cut: ratio(BigInt(cut)) };
  const bad = belowZero(counts) ?? notAboveZero({ figureMm2, magnification });
  if (bad) return bad;
  const grains = add(counts.inside, multiply(counts.cut, HALF));
  if (grains.n === 0n) return refused('nothing-counted');
  return derived(divide(multiply(grains, multiply(magnification, magnification)), figureMm2));
}

export interface InterceptCount {
  readonly whole: number;
  /** Line ends that lie in a grain, and lines that touch a boundary: half each. */
  readonly endsAndTangents: number;
  /** Points where three grains meet: one and a half each. */
  readonly triplePoints: number;
  /** Length of the test lines as drawn on the picture. */
  readonly lineMm: Rational;
  readonly magnification: Rational;
}

/**
 * Mean lineal intercept in mm: L/(N·M), with halves and one-and-a-halves counted as E112 says. Refuses nothing counted,
 * negative counts, and a length or magnification not above zero. Source: ASTM E112, intercept procedures.
 */
export function meanInterceptMm(count: InterceptCount): Derived<Rational> {
  const counts = {
    whole: ratio(BigInt(count.whole)),
    endsAndTangents: ratio(BigInt(count.endsAndTangents)),
    triplePoints: ratio(BigInt(count.triplePoints)),
  };
  const bad = belowZero(counts) ?? notAboveZero({ lineMm: count.lineMm, magnification: count.magnification });
  if (bad) return bad;
  const weighted = add(counts.whole, multiply(HALF, add(counts.endsAndTangents, multiply(ratio(3n), counts.triplePoints))));
  if (weighted.n === 0n) return refused('nothing-counted');
  return derived(divide(count.lineMm, multiply(weighted, count.magnification)));
}

/** A grain by its longest extent and the widest extent square to it, at 1×. */
export interface GrainExtent {
  readonly lengthMm: Rational;
  readonly widthMm: Rational;
}

/**
 * The largest grain of those measured: its area as an ellipse, π/4 · length · width, and the grain number of that area alone
 * (G = 3.321928·log₁₀(1/A) − 2.954). Refuses none, and a width above its length.
 * Source: ASTM E930, ALA grain by measured extents (from memory).
 */
export function largestGrain(
  grains: readonly GrainExtent[],
): Derived<{ readonly areaMm2: Rational; readonly grainNumber: number }> {
  let largest = ratio(0n);
  for (const { lengthMm, widthMm } of grains) {
    const bad = notAboveZero({ lengthMm, widthMm });
    if (bad) return bad;
    if (compare(widthMm, lengthMm) > 0)
      return refused('width-above-length', { lengthMm: decimalText(lengthMm, 6), widthMm: decimalText(widthMm, 6) });
    const area = divide(multiply(PI, multiply(lengthMm, widthMm)), ratio(4n));
    if (compare(area, largest) > 0) largest = area;
  }
  if (largest.n === 0n) return refused('no-values');
  const number = grainNumberOfDensity(divide(ratio(1n), largest));
  return number.ok ? derived({ areaMm2: largest, grainNumber: number.value }) : number;
}

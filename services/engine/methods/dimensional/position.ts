import { add, compare, decimalText, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { square, squareRoot, sumOf } from '../../quantity/roots';
import { belowZero, notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

/**
 * True position as a diameter: 2·√(Δx² + Δy² + Δz²), two or three deviations from the true place.
 * Source: ISO 1101 (position of an axis or a point), ASME Y14.5.
 */
export function positionMm(deviationsMm: readonly Rational[]): Rational {
  return squareRoot(multiply(ratio(4n), sumOf(deviationsMm.map(square))));
}

export interface SizedFeature {
  readonly kind: 'hole' | 'pin';
  readonly smallestMm: Rational;
  readonly largestMm: Rational;
  readonly actualMm: Rational;
}

/** What the tolerance frame says about material: Ⓜ maximum, Ⓛ least, or nothing. */
export type MaterialRequirement = 'none' | 'maximum' | 'least';

/**
 * The bonus of a material condition: how far the actual size has left the maximum (Ⓜ) or least (Ⓛ) material size, 0 without
 * either. Refuses a size outside its own limits: the size fails by itself and no bonus may hide it.
 * Source: ISO 2692 (MMR, LMR), ASME Y14.5.
 */
export function materialBonusMm(feature: SizedFeature, requirement: MaterialRequirement): Derived<Rational> {
  const { kind, smallestMm, largestMm, actualMm } = feature;
  const bad = notAboveZero({ smallestSize: smallestMm });
  if (bad) return bad;
  if (compare(largestMm, smallestMm) < 0) return refused('limits-crossed');
  if (compare(actualMm, smallestMm) < 0 || compare(actualMm, largestMm) > 0)
    return refused('size-outside-limits', {
      size: decimalText(actualMm, 6),
      lower: decimalText(smallestMm, 6),
      upper: decimalText(largestMm, 6),
    });
  if (requirement === 'none') return derived(ratio(0n));
  // A hole holds most metal when it is smallest, a pin when it is largest.
  const fromSmallest = (kind === 'hole') === (requirement === 'maximum');
  return derived(fromSmallest ? subtract(actualMm, smallestMm) : subtract(largestMm, actualMm));
}

/** Stated tolerance with its bonus: what the position may be. */
export function positionAllowedMm(
  toleranceMm: Rational,
  feature: SizedFeature,
  requirement: MaterialRequirement,
): Derived<Rational> {
  const bad = belowZero({ tolerance: toleranceMm });
  if (bad) return bad;
  const bonus = materialBonusMm(feature, requirement);
  return bonus.ok ? derived(add(toleranceMm, bonus.value)) : bonus;
}

/**
 * Position less its bonus, never below 0: judged against the stated tolerance it accepts and rejects exactly what position
 * against tolerance with bonus does, so that a plan can state one limit.
 */
export function positionLessBonusMm(
  deviationsMm: readonly Rational[],
  feature: SizedFeature,
  requirement: MaterialRequirement,
): Derived<Rational> {
  const bonus = materialBonusMm(feature, requirement);
  if (!bonus.ok) return bonus;
  const rest = subtract(positionMm(deviationsMm), bonus.value);
  return derived(rest.n < 0n ? ratio(0n) : rest);
}

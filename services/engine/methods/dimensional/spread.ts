import { compare, divide, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { absolute, sumOf } from '../../quantity/roots';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

export interface Spread {
  readonly average: Rational;
  readonly least: Rational;
  readonly largest: Rational;
  readonly range: Rational;
}

/** Average, least, largest and range of values in one unit; exact. Refuses none. Source: arithmetic (ASTM E2586). */
export function spreadOf(values: readonly Rational[]): Derived<Spread> {
  const [first] = values;
  if (first === undefined) return refused('no-values');
  const least = values.reduce((best, value) => (compare(value, best) < 0 ? value : best), first);
  const largest = values.reduce((best, value) => (compare(value, best) > 0 ? value : best), first);
  return derived({
    average: divide(sumOf(values), ratio(BigInt(values.length))),
    least,
    largest,
    range: subtract(largest, least),
  });
}

/**
 * Profile from signed deviations along the nominal normals: twice the largest magnitude, the width of the least zone about
 * the nominal that holds them. `offsetMm` moves the zone's middle outwards (UZ of ISO 1660); 0 is a zone laid evenly.
 */
export function profileMm(deviationsMm: readonly Rational[], offsetMm: Rational): Derived<Rational> {
  const spread = spreadOf(deviationsMm.map((deviation) => absolute(subtract(deviation, offsetMm))));
  return spread.ok ? derived(divide(spread.value.largest, ratio(1n, 2n))) : spread;
}

import type { Characteristic, Reading } from '../evaluate/types';
import { add, compare, divide, multiply, ratio, rationalOf, subtract } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { convertDifference, convertValue, unitOf } from '../quantity/units';

/** A reading and its tolerance as exact numbers in the characteristic's unit. */
export interface ReadingScale {
  readonly value: Rational;
  readonly lower: Rational | null;
  readonly upper: Rational | null;
  readonly expanded: Rational | null;
  readonly u: Rational | null;
  /** w = g·U; null where the rule is not guarded or no uncertainty is stated. */
  readonly guard: Rational | null;
}

function limitOf(text: string | null | undefined): Rational | null {
  return text === null || text === undefined ? null : rationalOf(text);
}

/** Both have passed their form and meaning checks; null when a unit does not fit. */
export function scaleOf(characteristic: Characteristic, reading: Reading): ReadingScale | null {
  const to = unitOf(characteristic.unit);
  const from = unitOf(reading.unit);
  const uncertainty = reading.uncertainty ?? null;
  const spread = unitOf(uncertainty?.unit ?? reading.unit);
  if (!to || !from || !spread || from.quantity !== to.quantity || spread.quantity !== to.quantity) return null;
  const expanded = uncertainty === null ? null : convertDifference(rationalOf(uncertainty.expanded), spread, to);
  const decision = characteristic.decision;
  return {
    value: convertValue(rationalOf(reading.value), from, to),
    lower: limitOf(characteristic.lower),
    upper: limitOf(characteristic.upper),
    expanded,
    u: expanded === null || uncertainty === null ? null : divide(expanded, rationalOf(uncertainty.k)),
    guard: expanded === null || decision.rule !== 'guarded' ? null : multiply(rationalOf(decision.g ?? '1'), expanded),
  };
}

/** Whether the guard bands meet beyond each other; equal is a zone of one value. */
export function leavesNoZone(lower: Rational | null, upper: Rational | null, guard: Rational | null): boolean {
  if (lower === null || upper === null || guard === null) return false;
  return compare(add(lower, guard), subtract(upper, guard)) > 0;
}

/** (TU − TL)/(2U) ≥ c (ASME B89.7.3.1). */
export function isCapable(lower: Rational, upper: Rational, expanded: Rational, capability: Rational): boolean {
  return compare(subtract(upper, lower), multiply(ratio(2n), multiply(expanded, capability))) >= 0;
}

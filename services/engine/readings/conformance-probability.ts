import { compare, divide, numberOf, subtract } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { standardNormal } from './normal-distribution';

export interface Conformance {
  /** p_c of JCGM 106:2012 clause 7. */
  readonly inside: number;
  /** 1 − p_c, with its own precision. */
  readonly outside: number;
}

/** Probability that the true value lies in the tolerance; an open end (null) contributes its whole tail. u > 0. */
export function conformanceOf(value: Rational, u: Rational, lower: Rational | null, upper: Rational | null): Conformance {
  const zLower = lower === null ? null : numberOf(divide(subtract(lower, value), u));
  const zUpper = upper === null ? null : numberOf(divide(subtract(upper, value), u));
  const below = zLower === null ? 0 : standardNormal(zLower);
  const above = zUpper === null ? 0 : standardNormal(-zUpper);
  const outside = Math.min(1, below + above);
  if (lower !== null && compare(value, lower) < 0) {
    return { inside: Math.max(0, standardNormal(-(zLower ?? 0)) - above), outside };
  }
  if (upper !== null && compare(value, upper) > 0) {
    return { inside: Math.max(0, standardNormal(zUpper ?? 0) - below), outside };
  }
  return { inside: Math.max(0, 1 - outside), outside };
}

/** As reported: rounded to 9 decimals. */
export function reportedProbability(probability: number): number {
  return Math.round(probability * 1e9) / 1e9;
}

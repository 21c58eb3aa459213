import { divide, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, rootOf } from '../../quantity/roots';
import { notAboveZero } from '../bounds';
import { derived } from '../derived';
import type { Derived } from '../derived';

const EQUATIONS = {
  'toroidal-normal': { constant: exact('0.9959'), factor: exact('2.720'), degree: 2 },
  'toroidal-accurate': { constant: exact('0.9985'), factor: exact('3.412'), degree: 2 },
  cylindrical: { constant: exact('0.9976'), factor: exact('0.1388'), degree: 5 },
} as const;

/** Forms of the critical-flow Venturi nozzle by which a rig's flow is measured. */
export type CriticalNozzle = keyof typeof EQUATIONS;

/**
 * Discharge coefficient of a critical-flow Venturi nozzle: constant − factor·Re^(−1/2) for toroidal throats (normally or
 * accurately machined), constant − factor·Re^(−1/5) for cylindrical ones. Refuses a Reynolds number not above zero.
 * Source: ISO 9300:2005 (coefficients from memory).
 */
export function dischargeCoefficient(nozzle: CriticalNozzle, reynolds: Rational): Derived<Rational> {
  const bad = notAboveZero({ reynolds });
  if (bad) return bad;
  const { constant, factor, degree } = EQUATIONS[nozzle];
  return derived(subtract(constant, multiply(factor, divide(ratio(1n), rootOf(reynolds, degree)))));
}

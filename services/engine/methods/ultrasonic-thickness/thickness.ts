import { add, compare, decimalText, divide, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, half } from '../../quantity/roots';
import { notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

/**
 * Wall thickness in mm from the round trip of the echo: t = (V/2)(τ − τ₀).
 * Refuses a velocity that is not above zero and an echo that comes no later than the zero of the instrument.
 * Source: ASTM E797 (thickness from transit time), ISO 16809.
 */
export function thicknessMm(velocityMmPerUs: Rational, transitUs: Rational, zeroUs: Rational): Derived<Rational> {
  const bad = notAboveZero({ velocity: velocityMmPerUs });
  if (bad) return bad;
  if (compare(transitUs, zeroUs) <= 0)
    return refused('echo-before-zero', { transitUs: decimalText(transitUs, 6), zeroUs: decimalText(zeroUs, 6) });
  return derived(multiply(half(velocityMmPerUs), subtract(transitUs, zeroUs)));
}

/**
 * What an instrument set to one velocity shows on material of another: t·V_set/V_true. Refuses velocities not above zero.
 * Source: the thickness equation of ASTM E797 used twice.
 */
export function shownThicknessMm(trueMm: Rational, trueVelocity: Rational, setVelocity: Rational): Derived<Rational> {
  return (
    notAboveZero({ thickness: trueMm, trueVelocity, setVelocity }) ?? derived(divide(multiply(trueMm, setVelocity), trueVelocity))
  );
}

/**
 * Thickness of hot steel brought back to the temperature of calibration: apparent walls grow by 1 % for each 55 K.
 * Source: note of ASTM E797 (from memory); it holds for steel, and a plan names it where it is used.
 */
export function thicknessAtCalibrationMm(apparentMm: Rational, warmerByK: Rational): Derived<Rational> {
  const growth = add(ratio(1n), divide(multiply(exact('0.01'), warmerByK), ratio(55n)));
  return notAboveZero({ thickness: apparentMm, growth }) ?? derived(divide(apparentMm, growth));
}

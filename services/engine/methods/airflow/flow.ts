import { divide, multiply, ratio } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, squareRoot } from '../../quantity/roots';
import { notAboveZero } from '../bounds';
import { derived } from '../derived';
import type { Derived } from '../derived';

const STANDARD_K = exact('288.15');
const STANDARD_KPA = exact('101.325');

/**
 * Flow parameter W·√T₀/p₀ in mg·√K/(s·kPa): the same part gives the same number whatever the day's pressure and
 * temperature. Total pressure and absolute temperature. Refuses numbers not above zero.
 * Source: one-dimensional gas dynamics, NACA Report 1135.
 */
export function flowParameter(flowGPerS: Rational, totalTemperatureK: Rational, totalPressureKPa: Rational): Derived<Rational> {
  return (
    notAboveZero({ flow: flowGPerS, totalTemperature: totalTemperatureK, totalPressure: totalPressureKPa }) ??
    derived(divide(multiply(multiply(flowGPerS, ratio(1000n)), squareRoot(totalTemperatureK)), totalPressureKPa))
  );
}

/**
 * Flow brought to 288.15 K and 101.325 kPa, W·√θ/δ, in the unit of the flow. Refuses numbers not above zero.
 * Source: similarity of gas flow; reference state of ISO 2533.
 */
export function correctedFlow(flow: Rational, totalTemperatureK: Rational, totalPressureKPa: Rational): Derived<Rational> {
  const bad = notAboveZero({ flow, totalTemperature: totalTemperatureK, totalPressure: totalPressureKPa });
  if (bad) return bad;
  const theta = divide(totalTemperatureK, STANDARD_K);
  const delta = divide(totalPressureKPa, STANDARD_KPA);
  return derived(divide(multiply(flow, squareRoot(theta)), delta));
}

/** A part against the master measured on the same rig: part ÷ master, both as flow parameter or both as effective area. */
export function ratioToMaster(part: Rational, master: Rational): Derived<Rational> {
  return notAboveZero({ part, master }) ?? derived(divide(part, master));
}

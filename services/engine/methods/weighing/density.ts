import { add, compare, decimalText, divide, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact } from '../../quantity/roots';
import { belowZero, notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

export interface Immersion {
  /** Balance readings of the part in air and hung in the liquid. */
  readonly inAirG: Rational;
  readonly inLiquidG: Rational;
  readonly liquidGPerCm3: Rational;
  /** 0 leaves the air's own buoyancy out. */
  readonly airGPerCm3: Rational;
}

function faultOf({ inAirG, inLiquidG, liquidGPerCm3, airGPerCm3 }: Immersion) {
  const bad = notAboveZero({ inAirG, liquidGPerCm3 }) ?? belowZero({ inLiquidG, airGPerCm3 });
  if (bad) return bad;
  if (compare(inLiquidG, inAirG) >= 0)
    return refused('no-buoyancy', { inAirG: decimalText(inAirG, 6), inLiquidG: decimalText(inLiquidG, 6) });
  return compare(airGPerCm3, liquidGPerCm3) >= 0 ? refused('air-denser-than-liquid') : null;
}

/**
 * Density in g/cm³ by weighing in air and in a liquid: m_a(ρ_f − ρ_a)/(m_a − m_f) + ρ_a. Refuses masses and densities that
 * cannot be, and a part no lighter in the liquid. Source: Archimedes' buoyancy; ISO 3369 for the procedure.
 */
export function densityGPerCm3(given: Immersion): Derived<Rational> {
  const bad = faultOf(given);
  if (bad) return bad;
  const { inAirG, inLiquidG, liquidGPerCm3, airGPerCm3 } = given;
  const lift = divide(multiply(inAirG, subtract(liquidGPerCm3, airGPerCm3)), subtract(inAirG, inLiquidG));
  return derived(add(lift, airGPerCm3));
}

/** Volume in cm³ by the same weighing: (m_a − m_f)/(ρ_f − ρ_a). Refuses what the density refuses. */
export function volumeCm3(given: Immersion): Derived<Rational> {
  const bad = faultOf(given);
  if (bad) return bad;
  return derived(divide(subtract(given.inAirG, given.inLiquidG), subtract(given.liquidGPerCm3, given.airGPerCm3)));
}

// Weights are adjusted as if of 8.000 g/cm³ (conventional mass, OIML D 28).
const WEIGHTS_G_PER_CM3 = exact('8');

/**
 * True mass in g of a part weighed in air on a balance adjusted with conventional weights: W·(1 − ρ_a/8)/(1 − ρ_a/ρ).
 * Refuses numbers not above zero (air may be 0) and a part no denser than the air. Source: air buoyancy, OIML R 111, D 28.
 */
export function massInVacuumG(shownG: Rational, partGPerCm3: Rational, airGPerCm3: Rational): Derived<Rational> {
  const bad = notAboveZero({ shownG, partGPerCm3 }) ?? belowZero({ airGPerCm3 });
  if (bad) return bad;
  if (compare(airGPerCm3, partGPerCm3) >= 0) return refused('part-no-denser-than-air');
  const kept = (density: Rational) => subtract(ratio(1n), divide(airGPerCm3, density));
  return derived(divide(multiply(shownG, kept(WEIGHTS_G_PER_CM3)), kept(partGPerCm3)));
}

import { add, compare, decimalText, divide, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, powerOf, rootOf, squareRoot } from '../../quantity/roots';
import { belowZero, notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

// Air as a perfect gas with γ = 7/5: every exponent below is then a whole number over 2, 5 or 7, and roots of exact numbers
// do instead of powers.
const ONE = ratio(1n);
/** J/(kg·K); NACA Report 1135 and most rigs use 287.05. */
export const AIR_GAS_CONSTANT: Rational = exact('287.05');

export interface IsentropicState {
  readonly temperatureRatio: Rational;
  readonly pressureRatio: Rational;
  readonly densityRatio: Rational;
  /** A/A*; null at Mach 0. */
  readonly areaRatio: Rational | null;
  /** ṁ·√T₀/(A·p₀) in kg·√K/(N·s). */
  readonly flowFunction: Rational;
}

/**
 * Isentropic state of air at a Mach number. Refuses a Mach number below zero.
 * Source: NACA Report 1135, equations 43 to 45 and 80, γ = 1.4.
 */
export function isentropic(mach: Rational): Derived<IsentropicState> {
  const bad = belowZero({ mach });
  if (bad) return bad;
  const temperatureRatio = divide(ONE, add(ONE, divide(multiply(mach, mach), ratio(5n))));
  const root = squareRoot(temperatureRatio);
  const third = powerOf(temperatureRatio, 3);
  // p/p₀ = (T/T₀)^(7/2), ρ/ρ₀ = (T/T₀)^(5/2); A/A* = ((5/6)/(T/T₀))³/M.
  const flowFunction = divide(multiply(multiply(squareRoot(ratio(7n, 5n)), mach), third), squareRoot(AIR_GAS_CONSTANT));
  return derived({
    temperatureRatio,
    pressureRatio: multiply(third, root),
    densityRatio: multiply(powerOf(temperatureRatio, 2), root),
    areaRatio: mach.n === 0n ? null : divide(powerOf(divide(ratio(5n, 6n), temperatureRatio), 3), mach),
    flowFunction,
  });
}

/**
 * Whether the flow is choked: outlet over total inlet pressure at or below (5/6)^(7/2) = 0.528282. Exact, squared.
 * Refuses pressures not above zero. Source: NACA Report 1135; ISO 9300 (choked flow only).
 */
export function isChoked(totalPressureKPa: Rational, outletPressureKPa: Rational): Derived<boolean> {
  const bad = notAboveZero({ totalPressure: totalPressureKPa, outletPressure: outletPressureKPa });
  if (bad) return bad;
  const r = divide(outletPressureKPa, totalPressureKPa);
  return derived(compare(multiply(r, r), powerOf(ratio(5n, 6n), 7)) <= 0);
}

/** Critical ratio of outlet to total inlet pressure of air, (5/6)^(7/2). */
export function criticalPressureRatio(): Rational {
  return squareRoot(powerOf(ratio(5n, 6n), 7));
}

/** ṁ·√T₀/(A·p₀) in kg·√K/(N·s) at a pressure ratio r = outlet over total inlet; above the critical ratio only. */
function subcriticalFlowFunction(r: Rational): Rational {
  // √(2γ/(γ−1)·(r^(2/γ) − r^((γ+1)/γ))/R) = √(7·(r^(10/7) − r^(12/7))/R)
  const difference = subtract(rootOf(powerOf(r, 10), 7), rootOf(powerOf(r, 12), 7));
  return squareRoot(divide(multiply(ratio(7n), difference), AIR_GAS_CONSTANT));
}

export interface FlowPath {
  readonly totalPressureKPa: Rational;
  readonly outletPressureKPa: Rational;
  readonly totalTemperatureK: Rational;
}

/** ṁ·√T₀/(A·p₀) in kg·√K/(N·s) of a path, choked or not; refuses no pressure drop. */
function flowFunctionOf({ totalPressureKPa, outletPressureKPa }: FlowPath): Derived<Rational> {
  const choked = isChoked(totalPressureKPa, outletPressureKPa);
  if (!choked.ok) return choked;
  if (compare(outletPressureKPa, totalPressureKPa) >= 0)
    return refused('no-pressure-drop', {
      totalPressureKPa: decimalText(totalPressureKPa, 6),
      outletPressureKPa: decimalText(outletPressureKPa, 6),
    });
  if (!choked.value) return derived(subcriticalFlowFunction(divide(outletPressureKPa, totalPressureKPa)));
  // √(γ/R)·(2/(γ+1))^((γ+1)/(2(γ−1))) = √(1.4/R)·(5/6)³ = 0.0404149
  return derived(multiply(squareRoot(divide(ratio(7n, 5n), AIR_GAS_CONSTANT)), powerOf(ratio(5n, 6n), 3)));
}

/**
 * Ideal flow in g/s through an area without losses. 1 kPa·mm² = 10⁻³ N. Refuses numbers not above zero and no pressure drop.
 * Source: NACA Report 1135; choked: ISO 9300 with a perfect gas.
 */
export function idealFlowGPerS(areaMm2: Rational, path: FlowPath): Derived<Rational> {
  const bad = notAboveZero({ area: areaMm2, totalTemperature: path.totalTemperatureK });
  if (bad) return bad;
  const flowFunction = flowFunctionOf(path);
  if (!flowFunction.ok) return flowFunction;
  return derived(
    divide(multiply(multiply(flowFunction.value, areaMm2), path.totalPressureKPa), squareRoot(path.totalTemperatureK)),
  );
}

/**
 * Effective area in mm²: the loss-free area that would pass the measured flow. Refuses numbers not above zero and no
 * pressure drop. Source: as the ideal flow, solved for the area.
 */
export function effectiveAreaMm2(flowGPerS: Rational, path: FlowPath): Derived<Rational> {
  const bad = notAboveZero({ flow: flowGPerS });
  if (bad) return bad;
  const unit = idealFlowGPerS(ONE, path);
  return unit.ok ? derived(divide(flowGPerS, unit.value)) : unit;
}

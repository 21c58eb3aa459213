import { compare, decimalText, multiply, ratio, rationalOf, roundHalfEven } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';

/** The drawing's unit system for sizes and distances of rules. */
export type LengthUnit = 'mm' | 'in';

const NM_PER_UNIT: Readonly<Record<LengthUnit, Rational>> = { mm: ratio(1_000_000n), in: ratio(25_400_000n) };
const UM_PER_UNIT: Readonly<Record<LengthUnit, Rational>> = { mm: ratio(1_000n), in: ratio(25_400n) };

/** The whole number nearest to a double, a tie to the even one. */
function nearestEven(value: number): number {
  const down = Math.floor(value);
  const part = value - down;
  if (part !== 0.5) return part < 0.5 ? down : down + 1;
  return down % 2 === 0 ? down : down + 1;
}

/** A computed length in µm as whole nanometres (0.001 µm), half to even: the form in which lengths are compared and summed. */
export function nmOf(lengthUm: number): number {
  return nearestEven(lengthUm * 1000);
}

/** A computed area in µm² as whole µm² (0.000001 mm²), half to even. */
export function wholeUm2(areaUm2: number): number {
  return nearestEven(areaUm2);
}

/** A decimal factor or ratio times a rounded length, rounded likewise: exact, in whole nanometres. */
export function timesNm(factor: Rational, lengthNm: number): number {
  return Number(roundHalfEven(multiply(factor, ratio(BigInt(lengthNm))), 0).n);
}

/** An exact limit beside whole nanometres (or µm²): what is above `floor` is above it, what is below `ceil` is below it. */
export interface Limit {
  readonly floor: number;
  readonly ceil: number;
}

function limitOf(exact: Rational): Limit {
  const floor = exact.n / exact.d;
  return { floor: Number(floor), ceil: Number(floor * exact.d === exact.n ? floor : floor + 1n) };
}

/** A length limit (not negative) of the drawing in nanometres, exact. */
export function lengthLimit(text: string, unit: LengthUnit): Limit {
  return limitOf(multiply(rationalOf(text), NM_PER_UNIT[unit]));
}

/** An area limit (not negative) of the drawing in µm², exact. */
export function areaLimit(text: string, unit: LengthUnit): Limit {
  return limitOf(multiply(rationalOf(text), multiply(UM_PER_UNIT[unit], UM_PER_UNIT[unit])));
}

/**
 * The largest length in µm that still rounds to no more than the limit, short of ties: half a nanometre above it. Windows and
 * strips are laid with it, so that what is exactly on their border lies safely inside.
 */
export function reachUm(limit: Limit): number {
  return (limit.floor + 0.5) / 1000;
}

function inverse(of: Rational): Rational {
  return ratio(of.d, of.n);
}

/** Whole nanometres as a decimal of the drawing's unit with at most 6 places. */
export function lengthText(lengthNm: number, unit: LengthUnit): string {
  return decimalText(multiply(ratio(BigInt(lengthNm)), inverse(NM_PER_UNIT[unit])), 6);
}

/** Whole µm² as a decimal of the drawing's squared unit with at most 6 places. */
export function areaText(areaUm2: number, unit: LengthUnit): string {
  const perUnit = inverse(UM_PER_UNIT[unit]);
  return decimalText(multiply(ratio(BigInt(areaUm2)), multiply(perUnit, perUnit)), 6);
}

/** A limit as it was applied, with at most 6 places and no trailing zeros. */
export function limitText(text: string): string {
  return decimalText(rationalOf(text), 6);
}

/** Whether the first decimal text is strictly below the second. */
export function isBelow(first: string, second: string): boolean {
  return compare(rationalOf(first), rationalOf(second)) < 0;
}

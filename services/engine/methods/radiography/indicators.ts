import { compare, divide, multiply, ratio, rationalOf } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, PI, rootOf, square, squareRoot } from '../../quantity/roots';
import { notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';
import { ASTM_PLAQUES, ASTM_WIRES_IN, ISO_HOLES_MM, ISO_WIRES_MM } from './indicator-tables';

const MM_PER_INCH = exact('25.4');
const QUARTER_PI = divide(PI, ratio(4n));

/** What can be seen of an indicator: one wire, or one hole of a plaque or step. */
export type Indicator =
  | { readonly kind: 'iso-wire'; readonly number: number }
  | { readonly kind: 'astm-wire'; readonly number: number }
  | { readonly kind: 'iso-step-hole'; readonly number: number }
  | { readonly kind: 'astm-plaque'; readonly number: number; readonly hole: 1 | 2 | 4 };

/**
 * An indicator from its mark: `W13` (ISO 19232-1), `H5` (ISO 19232-2), `E747 8` (ASTM E747), `12-2T` or `#12-2T` (ASTM E1025).
 * Refuses marks and numbers that are in no table.
 */
export function indicatorOf(designation: string): Derived<Indicator> {
  const text = designation.trim().toUpperCase();
  const plaque = /^(?:#|NO\.? ?)?([0-9]{1,3})-([124])T$/.exec(text);
  if (plaque) {
    const number = Number(plaque[1]);
    if (!ASTM_PLAQUES.includes(number)) return refused('indicator-unknown', { designation });
    return derived({ kind: 'astm-plaque', number, hole: Number(plaque[2]) as 1 | 2 | 4 });
  }
  const numbered = /^(W|H|E747 )([1-9][0-9]?)$/.exec(text);
  const number = Number(numbered?.[2] ?? 0);
  const [kind, table] =
    numbered?.[1] === 'W'
      ? (['iso-wire', ISO_WIRES_MM] as const)
      : numbered?.[1] === 'H'
        ? (['iso-step-hole', ISO_HOLES_MM] as const)
        : (['astm-wire', ASTM_WIRES_IN] as const);
  if (number < 1 || number > table.length) return refused('indicator-unknown', { designation });
  return derived({ kind, number });
}

/** Thickness of an E1025 plaque in mm. */
export function plaqueThicknessMm(number: number): Rational {
  return multiply(ratio(BigInt(number), 1000n), MM_PER_INCH);
}

/** Diameter in mm of a plaque's 1T, 2T or 4T hole: never below 0.010, 0.020 and 0.040 in. Source: ASTM E1025. */
export function plaqueHoleMm(number: number, hole: 1 | 2 | 4): Rational {
  return multiply(ratio(BigInt(Math.max(number, 10) * hole), 1000n), MM_PER_INCH);
}

/** Diameter in mm of the wire or hole that an indicator names. */
export function diameterMm(indicator: Indicator): Rational {
  switch (indicator.kind) {
    case 'iso-wire':
      return rationalOf(ISO_WIRES_MM[indicator.number - 1] ?? '0');
    case 'iso-step-hole':
      return rationalOf(ISO_HOLES_MM[indicator.number - 1] ?? '0');
    case 'astm-wire':
      return multiply(rationalOf(ASTM_WIRES_IN[indicator.number - 1] ?? '0'), MM_PER_INCH);
    case 'astm-plaque':
      return plaqueHoleMm(indicator.number, indicator.hole);
  }
}

/**
 * Equivalent sensitivity in % of a plaque and hole on a part: (100/x)·√(T·h/2). Refuses numbers not above zero.
 * Source: ASTM E1025 and E746 (2-2T gives 2.0, 2-1T 1.4, 2-4T 2.8).
 */
export function equivalentSensitivityPercent(partMm: Rational, plaqueMm: Rational, holeMm: Rational): Derived<Rational> {
  const bad = notAboveZero({ partMm, plaqueMm, holeMm });
  return bad ?? derived(divide(multiply(ratio(100n), squareRoot(divide(multiply(plaqueMm, holeMm), ratio(2n)))), partMm));
}

/** Sensitivity in % of what was seen on a part: equivalent for plaques, diameter over thickness for wires and step holes. */
export function sensitivityPercent(seen: Indicator, partMm: Rational): Derived<Rational> {
  if (seen.kind === 'astm-plaque')
    return equivalentSensitivityPercent(partMm, plaqueThicknessMm(seen.number), plaqueHoleMm(seen.number, seen.hole));
  return notAboveZero({ partMm }) ?? derived(divide(multiply(ratio(100n), diameterMm(seen)), partMm));
}

// F = 0.79 and l = 0.3 in of F³·d³·l = T²·H²·π/4.
const FORM_FACTOR = exact('0.79');
const EFFECTIVE_LENGTH_MM = exact('7.62');

/**
 * Diameter in mm of the wire that is as hard to see as a plaque's hole: F³d³l = T²H²·π/4. Refuses numbers not above zero.
 * Source: ASTM E747 (equivalence with E1025).
 */
export function equivalentWireMm(plaqueMm: Rational, holeMm: Rational): Derived<Rational> {
  const bad = notAboveZero({ plaqueMm, holeMm });
  if (bad) return bad;
  const metal = multiply(multiply(square(plaqueMm), square(holeMm)), QUARTER_PI);
  return derived(rootOf(divide(metal, multiply(multiply(FORM_FACTOR, square(FORM_FACTOR)), EFFECTIVE_LENGTH_MM)), 3));
}

/** The ASTM E747 identity whose wire is nearest, by ratio, to a diameter. Refuses a diameter not above zero. */
export function nearestAstmWire(wireMm: Rational): Derived<number> {
  const bad = notAboveZero({ wireMm });
  if (bad) return bad;
  // Between two wires a < b the nearer by ratio is a where the diameter is below √(a·b).
  const above = ASTM_WIRES_IN.findIndex((_, place) => {
    const next = ASTM_WIRES_IN[place + 1];
    if (next === undefined) return true;
    const limit = multiply(diameterMm({ kind: 'astm-wire', number: place + 1 }), multiply(rationalOf(next), MM_PER_INCH));
    return compare(square(wireMm), limit) < 0;
  });
  return derived(above + 1);
}

/** What makes indicators of different kinds comparable: a wire in mm. Null for a step hole, which no standard equates. */
function asWireMm(indicator: Indicator): Rational | null {
  if (indicator.kind === 'iso-step-hole') return null;
  if (indicator.kind !== 'astm-plaque') return diameterMm(indicator);
  const wire = equivalentWireMm(plaqueThicknessMm(indicator.number), diameterMm(indicator));
  return wire.ok ? wire.value : null;
}

/**
 * Whether what was seen is as fine as what is required. Plaques are compared by T·h (equal sensitivity), wires and step holes
 * by diameter, wires with plaques by the E747 equivalence. Refuses a step hole beside anything else.
 */
export function isFineEnough(required: Indicator, seen: Indicator): Derived<boolean> {
  if (required.kind === 'astm-plaque' && seen.kind === 'astm-plaque') {
    const product = (one: typeof required) => multiply(plaqueThicknessMm(one.number), plaqueHoleMm(one.number, one.hole));
    return derived(compare(product(seen), product(required)) <= 0);
  }
  if (required.kind === seen.kind) return derived(compare(diameterMm(seen), diameterMm(required)) <= 0);
  const [needed, found] = [asWireMm(required), asWireMm(seen)];
  if (!needed || !found) return refused('indicators-not-comparable', { required: required.kind, seen: seen.kind });
  return derived(compare(found, needed) <= 0);
}

/** A quality level of ASTM E1025: plaque thickness in % of the part, and the hole that must show. */
export interface QualityLevel {
  readonly percent: 1 | 2 | 4;
  readonly hole: 1 | 2 | 4;
}

/** A level from its mark, `2-2T`. Refuses other marks. */
export function qualityLevelOf(mark: string): Derived<QualityLevel> {
  const found = /^([124])-([124])T$/.exec(mark.trim().toUpperCase());
  if (!found) return refused('level-unknown', { mark });
  return derived({ percent: Number(found[1]) as 1 | 2 | 4, hole: Number(found[2]) as 1 | 2 | 4 });
}

/**
 * The plaque and hole that a level requires on a thickness: the thickest plaque not above the level's share of the part.
 * Refuses a thickness not above zero, and a part too thin for the thinnest plaque: what then counts is the plan's to say.
 * Source: ASTM E1025, E1742.
 */
export function requiredPlaque(level: QualityLevel, partMm: Rational): Derived<Indicator> {
  const bad = notAboveZero({ partMm });
  if (bad) return bad;
  const most = multiply(partMm, ratio(BigInt(level.percent), 100n));
  const fitting = ASTM_PLAQUES.filter((number) => compare(plaqueThicknessMm(number), most) <= 0);
  const number = fitting.at(-1);
  if (number === undefined) return refused('part-too-thin-for-plaques', { thinnest: ASTM_PLAQUES[0] ?? 0 });
  return derived({ kind: 'astm-plaque', number, hole: level.hole });
}

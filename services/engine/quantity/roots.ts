import { add, divide, multiply, ratio, rationalOf } from './decimal';
import type { Rational } from './decimal';

/** π to 30 places, for formulas that are exact but for it. */
export const PI: Rational = ratio(3141592653589793238462643383280n, 10n ** 30n);

const PLACES = 40;

function greatestCommonDivisor(a: bigint, b: bigint): bigint {
  let large = a < 0n ? -a : a;
  let small = b;
  while (small !== 0n) [large, small] = [small, large % small];
  return large;
}

/** The same number in lowest terms: long sums stay small. */
export function reduced(of: Rational): Rational {
  const common = greatestCommonDivisor(of.n, of.d);
  return common <= 1n ? of : { n: of.n / common, d: of.d / common };
}

/** A sum in lowest terms; 0 of none. Exact, so the order of the members does not matter. */
export function sumOf(members: readonly Rational[]): Rational {
  return members.reduce((sum, member) => reduced(add(sum, member)), ratio(0n));
}

/** base to a whole power that is not negative. */
export function powerOf(base: Rational, exponent: number): Rational {
  return { n: base.n ** BigInt(exponent), d: base.d ** BigInt(exponent) };
}

/** The largest whole number whose power of that degree is not above `of` (Newton's method on whole numbers). */
function wholeRoot(of: bigint, degree: bigint): bigint {
  if (of < 2n) return of;
  let guess = 1n << BigInt(Math.floor(of.toString(2).length / Number(degree)) + 1);
  for (;;) {
    const next = ((degree - 1n) * guess + of / guess ** (degree - 1n)) / degree;
    if (next >= guess) return guess;
    guess = next;
  }
}

/**
 * The root of a number that is not negative, cut after 40 places; exact where the root is a decimal of at most 40 places.
 * Whole numbers only, so that every JavaScript engine gives the same digits. Throws RangeError below zero.
 */
export function rootOf(of: Rational, degree: number): Rational {
  if (of.n < 0n) throw new RangeError('root of a negative number');
  const scale = 10n ** BigInt(PLACES);
  return { n: wholeRoot((of.n * scale ** BigInt(degree)) / of.d, BigInt(degree)), d: scale };
}

export function squareRoot(of: Rational): Rational {
  return rootOf(of, 2);
}

export function square(of: Rational): Rational {
  return multiply(of, of);
}

export function absolute(of: Rational): Rational {
  return of.n < 0n ? { n: -of.n, d: of.d } : of;
}

/** A number that is written down in a formula: an exact decimal. */
export function exact(text: string): Rational {
  return rationalOf(text);
}

export function half(of: Rational): Rational {
  return divide(of, ratio(2n));
}

/** An exact rational: numerator over a denominator that is always positive. Never rounded on the way. */
export interface Rational {
  readonly n: bigint;
  readonly d: bigint;
}

const DECIMAL = /^-?[0-9]{1,16}(?:\.[0-9]{1,16})?$/;

export const ZERO: Rational = { n: 0n, d: 1n };

/** Whether a text is a decimal as this engine takes them: no exponent, plus sign, blank, comma or grouping. */
export function isDecimalText(text: string): boolean {
  return DECIMAL.test(text);
}

/** How many places a decimal text states; trailing zeros count. */
export function placesOf(text: string): number {
  const point = text.indexOf('.');
  return point < 0 ? 0 : text.length - point - 1;
}

/** The exact value of a decimal text. The caller has asked `isDecimalText`; anything else throws RangeError. */
export function rationalOf(text: string): Rational {
  if (!isDecimalText(text)) throw new RangeError('not a decimal');
  return { n: BigInt(text.replace('.', '')), d: 10n ** BigInt(placesOf(text)) };
}

/** A ratio of whole numbers; the denominator must not be zero. */
export function ratio(n: bigint, d = 1n): Rational {
  if (d === 0n) throw new RangeError('division by zero');
  return d < 0n ? { n: -n, d: -d } : { n, d };
}

export function add(a: Rational, b: Rational): Rational {
  return a.d === b.d ? { n: a.n + b.n, d: a.d } : { n: a.n * b.d + b.n * a.d, d: a.d * b.d };
}

export function negate(a: Rational): Rational {
  return { n: -a.n, d: a.d };
}

export function subtract(a: Rational, b: Rational): Rational {
  return add(a, negate(b));
}

export function multiply(a: Rational, b: Rational): Rational {
  return { n: a.n * b.n, d: a.d * b.d };
}

/** a ÷ b; throws RangeError when b is zero. */
export function divide(a: Rational, b: Rational): Rational {
  return ratio(a.n * b.d, a.d * b.n);
}

/** Negative, zero or positive as a is less than, equal to or greater than b. */
export function compare(a: Rational, b: Rational): -1 | 0 | 1 {
  const left = a.n * b.d;
  const right = b.n * a.d;
  return left < right ? -1 : left > right ? 1 : 0;
}

/** The whole number nearest to a ÷ b (b > 0), a tie to the even one. */
function nearestEven(a: bigint, b: bigint): bigint {
  const down = a / b - (a % b < 0n ? 1n : 0n);
  const twice = 2n * (a - down * b);
  if (twice < b) return down;
  if (twice > b) return down + 1n;
  return down % 2n === 0n ? down : down + 1n;
}

/** Rounded half to even at a number of decimal places (ASTM E29 absolute rounding of the last place kept). */
export function roundHalfEven(a: Rational, places: number): Rational {
  const scale = 10n ** BigInt(places);
  return { n: nearestEven(a.n * scale, a.d), d: scale };
}

/** Decimal text rounded half to even at most at `places`, without trailing zeros and never `-0`. */
export function decimalText(a: Rational, places: number): string {
  const scaled = roundHalfEven(a, places).n;
  const digits = (scaled < 0n ? -scaled : scaled).toString().padStart(places + 1, '0');
  const whole = digits.slice(0, digits.length - places);
  const part = places === 0 ? '' : digits.slice(digits.length - places).replace(/0+$/, '');
  return `${scaled < 0n ? '-' : ''}${whole}${part === '' ? '' : `.${part}`}`;
}

const THIRTY_PLACES = 10n ** 30n;

/** The nearest double, good to 10⁻³⁰ absolutely or a unit in its last place, whichever is coarser. */
export function numberOf(a: Rational): number {
  return Number((a.n * THIRTY_PLACES) / a.d) / 1e30;
}

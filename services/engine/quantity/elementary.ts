// Logarithms and angles from + − × ÷ √ only: two JavaScript engines give the same bits, which Math.log, Math.sin and
// Math.atan2 do not promise. (Math.sqrt is correctly rounded in every engine, as IEEE 754 asks.)
const LN_2 = 0.6931471805599453;
const LN_10 = 2.302585092994046;
const PI = 3.141592653589793;
const DEGREES_PER_RADIAN = 180 / PI;

/** Natural logarithm of a number above 0, relative error near 10⁻¹⁵. Throws RangeError for anything else. */
export function naturalLog(of: number): number {
  if (!(of > 0) || of === Infinity) throw new RangeError('logarithm of a number that is not above 0');
  let mantissa = of;
  let halvings = 0;
  for (; mantissa > 1.4142135623730951; halvings += 1) mantissa /= 2;
  for (; mantissa < 0.7071067811865476; halvings -= 1) mantissa *= 2;
  // ln m = 2 artanh((m − 1)/(m + 1)); |z| ≤ 0.172, so 13 odd powers pass double precision.
  const z = (mantissa - 1) / (mantissa + 1);
  let sum = 0;
  for (let power = 25; power >= 1; power -= 2) sum = 1 / power + z * z * sum;
  return halvings * LN_2 + 2 * z * sum;
}

/** Decimal logarithm of a number above 0. */
export function decimalLog(of: number): number {
  return naturalLog(of) / LN_10;
}

/** e to a power between −700 and 700. Throws RangeError beyond. */
export function exponential(power: number): number {
  if (!(power >= -700 && power <= 700)) throw new RangeError('exponent out of range');
  let halved = power;
  let doublings = 0;
  for (; halved > 0.5 || halved < -0.5; doublings += 1) halved /= 2;
  let sum = 1;
  for (let n = 18; n >= 1; n -= 1) sum = 1 + (halved / n) * sum;
  for (; doublings > 0; doublings -= 1) sum *= sum;
  return sum;
}

/** Arc tangent of a ratio between 0 and 1, in radians. */
function smallArcTangent(ratio: number): number {
  // Twice halved, the angle is below π/16 and the series short.
  const once = ratio / (1 + Math.sqrt(1 + ratio * ratio));
  const twice = once / (1 + Math.sqrt(1 + once * once));
  let sum = 0;
  for (let power = 25; power >= 1; power -= 2) sum = 1 / power - twice * twice * sum;
  return 4 * twice * sum;
}

/** The angle of the direction (x, y) from +x towards +y, in degrees above −180 up to 180; 0 for (0, 0). */
export function angleDegrees(y: number, x: number): number {
  const up = y < 0 ? -y : y;
  const along = x < 0 ? -x : x;
  if (up === 0 && along === 0) return 0;
  const acute = up <= along ? smallArcTangent(up / along) : PI / 2 - smallArcTangent(along / up);
  const turned = (x < 0 ? PI - acute : acute) * DEGREES_PER_RADIAN;
  return y < 0 ? -turned : turned;
}

/** Sine and cosine of an angle in degrees; exact at multiples of 90. */
export function sineAndCosine(degrees: number): { readonly sine: number; readonly cosine: number } {
  const turned = ((degrees % 360) + 360) % 360;
  const quarter = Math.floor((turned + 45) / 90);
  const x = (turned - quarter * 90) / DEGREES_PER_RADIAN;
  let sine = 1;
  let cosine = 1;
  for (let n = 20; n >= 2; n -= 2) {
    sine = 1 - ((x * x) / (n * (n + 1))) * sine;
    cosine = 1 - ((x * x) / (n * (n - 1))) * cosine;
  }
  sine *= x;
  switch (quarter % 4) {
    case 0:
      return { sine, cosine };
    case 1:
      return { sine: cosine, cosine: -sine };
    case 2:
      return { sine: -sine, cosine: -cosine };
    default:
      return { sine: -cosine, cosine: sine };
  }
}

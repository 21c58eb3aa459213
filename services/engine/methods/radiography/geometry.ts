import { add, compare, decimalText, divide, multiply, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { exact, rootOf, square, squareRoot } from '../../quantity/roots';
import { belowZero, notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

const ONE = ratio(1n);

/** Source to detector over source to object: (a + b)/a. Refuses a source distance not above zero, an object behind the detector. */
export function magnification(sourceToObjectMm: Rational, objectToDetectorMm: Rational): Derived<Rational> {
  const bad = notAboveZero({ sourceToObjectMm }) ?? belowZero({ objectToDetectorMm });
  return bad ?? derived(divide(add(sourceToObjectMm, objectToDetectorMm), sourceToObjectMm));
}

/**
 * Geometric unsharpness at the detector in mm: focal spot · b/a, with a from the source to the source side of the object and
 * b from there to the detector. Refuses a focal spot or source distance not above zero.
 * Source: ASTM E94, E1742.
 */
export function geometricUnsharpnessMm(
  focalSpotMm: Rational,
  sourceToObjectMm: Rational,
  objectToDetectorMm: Rational,
): Derived<Rational> {
  const bad = notAboveZero({ focalSpotMm, sourceToObjectMm }) ?? belowZero({ objectToDetectorMm });
  return bad ?? derived(divide(multiply(focalSpotMm, objectToDetectorMm), sourceToObjectMm));
}

/** The same, seen at the object: focal spot · (M − 1)/M. */
export function unsharpnessAtObjectMm(
  focalSpotMm: Rational,
  sourceToObjectMm: Rational,
  objectToDetectorMm: Rational,
): Derived<Rational> {
  const large = magnification(sourceToObjectMm, objectToDetectorMm);
  const bad = notAboveZero({ focalSpotMm });
  if (bad || !large.ok) return bad ?? (large as Extract<typeof large, { ok: false }>);
  return derived(divide(multiply(focalSpotMm, subtract(large.value, ONE)), large.value));
}

/** Geometric and inherent unsharpness together: √(Ug² + Ui²). Refuses negative ones. Source: ASTM E94; radiography handbooks. */
export function totalUnsharpnessMm(geometricMm: Rational, inherentMm: Rational): Derived<Rational> {
  return belowZero({ geometricMm, inherentMm }) ?? derived(squareRoot(add(square(geometricMm), square(inherentMm))));
}

/**
 * Unsharpness of a magnified digital image at the object: √((d(M − 1))² + (2·SRb)²)/M, with the detector's basic spatial
 * resolution SRb; the image's own SRb is half of it. Refuses M below 1 and numbers not above zero.
 * Source: ISO 17636-2 annex and ASTM E2698 practice (from memory); the formula holds for any object, not for welds alone.
 */
export function imageUnsharpnessMm(focalSpotMm: Rational, large: Rational, detectorResolutionMm: Rational): Derived<Rational> {
  const bad = notAboveZero({ focalSpotMm, detectorResolutionMm });
  if (bad) return bad;
  if (compare(large, ONE) < 0) return refused('magnification-below-one', { magnification: decimalText(large, 6) });
  const spot = multiply(focalSpotMm, subtract(large, ONE));
  const detector = multiply(ratio(2n), detectorResolutionMm);
  return derived(divide(squareRoot(add(square(spot), square(detector))), large));
}

/**
 * Least distance from the source to the object in mm so that geometric unsharpness stays at or below a limit: F·b/U.
 * Refuses numbers not above zero. Source: the unsharpness of ASTM E94 and E1742 solved for the distance.
 */
export function leastSourceDistanceMm(
  focalSpotMm: Rational,
  objectToDetectorMm: Rational,
  unsharpnessLimitMm: Rational,
): Derived<Rational> {
  const bad = notAboveZero({ focalSpotMm, objectToDetectorMm, unsharpnessLimitMm });
  return bad ?? derived(divide(multiply(focalSpotMm, objectToDetectorMm), unsharpnessLimitMm));
}

const CLASS_FACTORS = { A: exact('7.5'), B: ratio(15n) } as const;

/**
 * Least distance from the source to the object by testing class: f = 7.5·d·b^(2/3) in class A, 15·d·b^(2/3) in class B, all in
 * mm. Refuses numbers not above zero. Source: EN 12681-1 for castings (from memory; ISO 17636 has the same for welds).
 */
export function leastSourceDistanceOfClassMm(
  focalSpotMm: Rational,
  objectToDetectorMm: Rational,
  testingClass: 'A' | 'B',
): Derived<Rational> {
  const bad = notAboveZero({ focalSpotMm, objectToDetectorMm });
  if (bad) return bad;
  return derived(multiply(multiply(CLASS_FACTORS[testingClass], focalSpotMm), rootOf(square(objectToDetectorMm), 3)));
}

/** Exposure at a new distance for the same film: E₂ = E₁·D₂²/D₁², in the unit of the first. Source: inverse square law. */
export function exposureAtDistance(exposure: Rational, distanceMm: Rational, newDistanceMm: Rational): Derived<Rational> {
  const bad = notAboveZero({ exposure, distanceMm, newDistanceMm });
  return bad ?? derived(divide(multiply(exposure, square(newDistanceMm)), square(distanceMm)));
}

/** Intensity at a new distance: I₂ = I₁·D₁²/D₂². Source: inverse square law. */
export function intensityAtDistance(intensity: Rational, distanceMm: Rational, newDistanceMm: Rational): Derived<Rational> {
  return exposureAtDistance(intensity, newDistanceMm, distanceMm);
}

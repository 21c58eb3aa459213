import { add, compare, divide, multiply, negate, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { leastSquares } from '../../quantity/linear-equations';
import { absolute, PI, reduced, square, squareRoot, sumOf } from '../../quantity/roots';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';
import { opposedWalls } from './opposed-walls';

/** Two opposed walls across a core at a place of the part; the axis points from the second wall to the first. */
export interface WallPair {
  readonly axis: 'x' | 'y';
  readonly xMm: Rational;
  readonly yMm: Rational;
  /** Height of the section along the stacking axis. */
  readonly zMm: Rational;
  readonly firstMm: Rational;
  readonly secondMm: Rational;
}

/** What the core may have done: one shift; also turned about z; also leaned about x and y over the height. */
export type CoreMotion = 'shift' | 'shift-and-rotation' | 'shift-rotation-and-lean';

export interface CoreFit {
  readonly alongXMm: Rational;
  readonly alongYMm: Rational;
  readonly shiftMm: Rational;
  /** About z, counter-clockwise seen against z; 0 where the motion has none. */
  readonly rotationDegrees: Rational;
  /** Growth of the shift along x and y for each mm of height, as an angle; 0 where the motion has none. */
  readonly leanXDegrees: Rational;
  readonly leanYDegrees: Rational;
  /** Observed less fitted half differences, in the order of the pairs. */
  readonly residualsMm: readonly Rational[];
  readonly rootMeanSquareMm: Rational;
  readonly largestResidualMm: Rational;
}

const ZERO = ratio(0n);
const ONE = ratio(1n);
const UNKNOWNS: Readonly<Record<CoreMotion, number>> = { shift: 2, 'shift-and-rotation': 3, 'shift-rotation-and-lean': 5 };

/** One pair's equation: the half difference as a sum over (shift x, shift y, rotation, lean x, lean y). */
function equation(pair: WallPair, unknowns: number): Rational[] {
  const row = pair.axis === 'x' ? [ONE, ZERO, negate(pair.yMm), pair.zMm, ZERO] : [ZERO, ONE, pair.xMm, ZERO, pair.zMm];
  return row.slice(0, unknowns);
}

function degrees(radians: Rational): Rational {
  return divide(multiply(radians, ratio(180n)), PI);
}

/**
 * How the core lies over all sections: the rigid motion that leaves the least sum of squared residuals of the half wall
 * differences. The differences point to the thicker wall; the core has moved the other way by as much. Angles are small
 * (sine = angle, 0.02 % off at 2°). Exact: neither the order of the pairs nor the unit of entry changes a digit.
 * Refuses walls not above zero and pairs that do not determine the motion (one axis only, no lever, one height).
 * Source: least squares (Gauss) on half the wall difference per axis.
 */
export function fitCore(pairs: readonly WallPair[], motion: CoreMotion): Derived<CoreFit> {
  const unknowns = UNKNOWNS[motion];
  const observed: Rational[] = [];
  for (const pair of pairs) {
    const walls = opposedWalls(pair.firstMm, pair.secondMm);
    if (!walls.ok) return walls;
    observed.push(reduced(walls.value.shiftMm));
  }
  const rows = pairs.map((pair) => equation(pair, unknowns));
  const found = pairs.length < unknowns ? null : leastSquares(rows, observed);
  if (found === null) return refused('motion-not-determined', { motion, pairs: pairs.length });
  const [alongXMm = ZERO, alongYMm = ZERO, rotation = ZERO, leanX = ZERO, leanY = ZERO] = found;
  const residualsMm = rows.map((row, place) =>
    reduced(subtract(observed[place] ?? ZERO, sumOf(row.map((entry, at) => multiply(entry, found[at] ?? ZERO))))),
  );
  return derived({
    alongXMm,
    alongYMm,
    shiftMm: squareRoot(add(square(alongXMm), square(alongYMm))),
    rotationDegrees: degrees(rotation),
    leanXDegrees: degrees(leanX),
    leanYDegrees: degrees(leanY),
    residualsMm,
    rootMeanSquareMm: squareRoot(divide(sumOf(residualsMm.map(square)), ratio(BigInt(pairs.length)))),
    largestResidualMm: residualsMm.map(absolute).reduce((most, one) => (compare(one, most) > 0 ? one : most), ZERO),
  });
}

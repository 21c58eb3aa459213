import { add, multiply, negate, numberOf, ratio, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { angleDegrees } from '../../quantity/elementary';
import { leastSquares } from '../../quantity/linear-equations';
import { half, square, squareRoot } from '../../quantity/roots';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

export interface PointMm {
  readonly xMm: Rational;
  readonly yMm: Rational;
}

export interface FittedCircle extends PointMm {
  readonly radiusMm: Rational;
}

/**
 * The circle through measured points by algebraic least squares (Kåsa 1976): x² + y² = 2ax + 2by + c, exact.
 * Refuses fewer than three points and points on one line.
 */
export function circleThrough(points: readonly PointMm[]): Derived<FittedCircle> {
  const rows = points.map(({ xMm, yMm }) => [xMm, yMm, ratio(1n)]);
  const found =
    points.length < 3
      ? null
      : leastSquares(
          rows,
          points.map(({ xMm, yMm }) => add(square(xMm), square(yMm))),
        );
  const [a, b, c] = found ?? [];
  if (a === undefined || b === undefined || c === undefined) return refused('circle-not-determined', { points: points.length });
  const xMm = half(a);
  const yMm = half(b);
  const squared = add(c, add(square(xMm), square(yMm)));
  return derived({ xMm, yMm, radiusMm: squareRoot(squared) });
}

export interface Chord {
  readonly lengthMm: Rational;
  /** From +x towards +y. */
  readonly staggerDegrees: number;
}

/** Chord and stagger of an airfoil section between leading and trailing edge. Refuses two points that are one. */
export function chordBetween(leading: PointMm, trailing: PointMm): Derived<Chord> {
  const x = subtract(trailing.xMm, leading.xMm);
  const y = add(trailing.yMm, negate(leading.yMm));
  const squared = add(multiply(x, x), multiply(y, y));
  if (squared.n === 0n) return refused('points-are-one');
  return derived({ lengthMm: squareRoot(squared), staggerDegrees: angleDegrees(numberOf(y), numberOf(x)) });
}

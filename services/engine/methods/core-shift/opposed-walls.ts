import { add, numberOf, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { angleDegrees } from '../../quantity/elementary';
import { half, square, squareRoot } from '../../quantity/roots';
import { notAboveZero } from '../bounds';
import { derived } from '../derived';
import type { Derived } from '../derived';

export interface OpposedWalls {
  /** Half the wall difference, signed: positive when the first wall is the thicker. The core has moved the other way by as much. */
  readonly shiftMm: Rational;
  readonly meanMm: Rational;
}

/**
 * Core shift along one axis of a section from two opposed walls: (t₁ − t₂)/2. Refuses walls that are not above zero.
 * Source: geometry of a core within its shell; walls measured by ultrasonics, radiography or on the wax.
 */
export function opposedWalls(firstMm: Rational, secondMm: Rational): Derived<OpposedWalls> {
  return (
    notAboveZero({ firstWall: firstMm, secondWall: secondMm }) ??
    derived({ shiftMm: half(subtract(firstMm, secondMm)), meanMm: half(add(firstMm, secondMm)) })
  );
}

export interface SectionShift {
  readonly alongXMm: Rational;
  readonly alongYMm: Rational;
  /** Length of the shift vector. */
  readonly shiftMm: Rational;
  /** Direction of the thickest wall, from 0° (the first wall) towards 90°. */
  readonly directionDegrees: number;
  readonly meanMm: Rational;
  /** The least wall anywhere around, where the section is round: mean − shift. */
  readonly leastPredictedMm: Rational;
}

/** Shift vector of one section from walls at 0°, 90°, 180° and 270°: half the difference on each axis. */
export function fourWalls(at0Mm: Rational, at90Mm: Rational, at180Mm: Rational, at270Mm: Rational): Derived<SectionShift> {
  const x = opposedWalls(at0Mm, at180Mm);
  if (!x.ok) return x;
  const y = opposedWalls(at90Mm, at270Mm);
  if (!y.ok) return y;
  const shiftMm = squareRoot(add(square(x.value.shiftMm), square(y.value.shiftMm)));
  const meanMm = half(add(x.value.meanMm, y.value.meanMm));
  return derived({
    alongXMm: x.value.shiftMm,
    alongYMm: y.value.shiftMm,
    shiftMm,
    directionDegrees: angleDegrees(numberOf(y.value.shiftMm), numberOf(x.value.shiftMm)),
    meanMm,
    leastPredictedMm: subtract(meanMm, shiftMm),
  });
}

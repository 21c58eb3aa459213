import { ratio } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { refused } from '../derived';
import type { Derived } from '../derived';
import { list, positive, resultOf } from '../derived-quantity';
import type { ComputedStep, DerivedQuantity, Given } from '../derived-quantity';
import { fitCore } from './fit-sections';
import type { CoreFit, CoreMotion, WallPair } from './fit-sections';
import { fourWalls, opposedWalls } from './opposed-walls';

const method = 'dimensional';
const ZERO = ratio(0n);
const walls = ['wall-0', 'wall-90', 'wall-180', 'wall-270'] as const;
const MOST_PAIRS = 200;
const wallLists = ['x-first', 'x-second', 'y-first', 'y-second'].map((name) => list(name, 'mm', 'above-zero', 1, MOST_PAIRS));

function fourOf(given: Given) {
  const [a = ZERO, b = ZERO, c = ZERO, d = ZERO] = walls.map((name) => given.value(name));
  return fourWalls(a, b, c, d);
}

/** Pairs on one axis; `places` names the list of where they stand across the axis, absent for a shift alone. */
function pairsOn(given: Given, axis: 'x' | 'y', places: readonly Rational[] | null): WallPair[] | null {
  const first = given.values(`${axis}-first`);
  const second = given.values(`${axis}-second`);
  if (second.length !== first.length || (places !== null && places.length !== first.length)) return null;
  return first.map((firstMm, at) => {
    const across = places?.[at] ?? ZERO;
    return {
      axis,
      xMm: axis === 'y' ? across : ZERO,
      yMm: axis === 'x' ? across : ZERO,
      zMm: ZERO,
      firstMm,
      secondMm: second[at] ?? ZERO,
    };
  });
}

function fitOf(given: Given, motion: CoreMotion): Derived<CoreFit> {
  const placed = motion !== 'shift';
  const alongX = pairsOn(given, 'x', placed ? given.values('x-pairs-at-y') : null);
  const alongY = pairsOn(given, 'y', placed ? given.values('y-pairs-at-x') : null);
  if (!alongX || !alongY) return refused('lists-of-different-length');
  return fitCore([...alongX, ...alongY], motion);
}

function stepsOf(fit: CoreFit): ComputedStep[] {
  return [
    { name: 'along-x', value: fit.alongXMm, unit: 'mm' },
    { name: 'along-y', value: fit.alongYMm, unit: 'mm' },
    { name: 'residual-root-mean-square', value: fit.rootMeanSquareMm, unit: 'mm' },
    { name: 'residual-largest', value: fit.largestResidualMm, unit: 'mm' },
  ];
}

/** Core shift and rotation as quantities that a plan can name. */
export const coreShiftQuantities: readonly DerivedQuantity[] = [
  {
    name: 'core-shift-of-opposed-walls',
    method,
    inputs: [positive('first-wall', 'mm'), positive('second-wall', 'mm')],
    unit: 'mm',
    places: 6,
    source: 'half the difference of opposed walls, positive towards the first',
    compute: (given) =>
      resultOf(opposedWalls(given.value('first-wall'), given.value('second-wall')), ({ shiftMm, meanMm }) => ({
        value: shiftMm,
        steps: [{ name: 'mean-wall', value: meanMm, unit: 'mm' }],
      })),
  },
  {
    name: 'core-shift-of-four-walls',
    method,
    inputs: walls.map((name) => positive(name, 'mm')),
    unit: 'mm',
    places: 6,
    source: 'half the wall difference on each of two axes, length of the vector',
    compute: (given) =>
      resultOf(fourOf(given), (section) => ({
        value: section.shiftMm,
        steps: [
          { name: 'along-x', value: section.alongXMm, unit: 'mm' },
          { name: 'along-y', value: section.alongYMm, unit: 'mm' },
          { name: 'direction', value: section.directionDegrees, unit: '°' },
          { name: 'mean-wall', value: section.meanMm, unit: 'mm' },
        ],
      })),
  },
  {
    name: 'least-wall-of-four-walls',
    method,
    inputs: walls.map((name) => positive(name, 'mm')),
    unit: 'mm',
    places: 6,
    source: 'mean wall less the core shift, for a round section',
    compute: (given) => resultOf(fourOf(given), ({ leastPredictedMm }) => ({ value: leastPredictedMm })),
  },
  {
    name: 'core-shift-over-sections',
    method,
    inputs: wallLists,
    unit: 'mm',
    places: 6,
    source: 'least squares over half the wall differences of all sections',
    compute: (given) => resultOf(fitOf(given, 'shift'), (fit) => ({ value: fit.shiftMm, steps: stepsOf(fit) })),
  },
  {
    name: 'core-rotation-over-sections',
    method,
    inputs: [...wallLists, list('x-pairs-at-y', 'mm', 'any', 1, MOST_PAIRS), list('y-pairs-at-x', 'mm', 'any', 1, MOST_PAIRS)],
    unit: '°',
    places: 6,
    source: 'least squares for shift and small rotation over half the wall differences of all sections',
    compute: (given) =>
      resultOf(fitOf(given, 'shift-and-rotation'), (fit) => ({ value: fit.rotationDegrees, steps: stepsOf(fit) })),
  },
];

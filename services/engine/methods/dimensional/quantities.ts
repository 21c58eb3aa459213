import { numberOf } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { refused } from '../derived';
import type { Derived } from '../derived';
import { list, positive, resultOf, signed, single } from '../derived-quantity';
import type { Computed, DerivedQuantity, Given } from '../derived-quantity';
import { chordBetween, circleThrough } from './circle';
import type { PointMm } from './circle';
import { materialBonusMm, positionLessBonusMm, positionMm } from './position';
import type { SizedFeature } from './position';
import { profileAfterFitMm } from './rigid-fit';
import { profileMm, spreadOf } from './spread';

const method = 'dimensional';
const AXES = ['x', 'y', 'z'] as const;

function deviations(given: Given): Rational[] {
  return ['deviation-x', 'deviation-y', 'deviation-z'].map((name) => given.value(name));
}
const deviationInputs = [signed('deviation-x', 'mm'), signed('deviation-y', 'mm'), signed('deviation-z', 'mm', '0')];

function featureOf(given: Given): SizedFeature {
  return {
    kind: given.text('feature') === 'hole' ? 'hole' : 'pin',
    smallestMm: given.value('smallest-size'),
    largestMm: given.value('largest-size'),
    actualMm: given.value('actual-size'),
  };
}

const position: readonly DerivedQuantity[] = [
  {
    name: 'true-position',
    method,
    inputs: deviationInputs,
    unit: 'mm',
    places: 6,
    source: 'ISO 1101: 2·√(Δx² + Δy² + Δz²)',
    compute: (given) => ({ ok: true, value: { value: positionMm(deviations(given)) } }),
  },
  {
    name: 'position-less-bonus',
    method,
    inputs: [
      ...deviationInputs,
      { kind: 'choice', name: 'feature', options: ['hole', 'pin'] },
      { kind: 'choice', name: 'material-requirement', options: ['maximum', 'least'] },
      positive('smallest-size', 'mm'),
      positive('largest-size', 'mm'),
      positive('actual-size', 'mm'),
    ],
    unit: 'mm',
    places: 6,
    source: 'ISO 2692: position less the bonus of the material condition, judged against the stated tolerance',
    compute: (given) => {
      const requirement = given.text('material-requirement') === 'maximum' ? 'maximum' : 'least';
      const bonus = materialBonusMm(featureOf(given), requirement);
      if (!bonus.ok) return bonus;
      return resultOf(positionLessBonusMm(deviations(given), featureOf(given), requirement), (value) => ({
        value,
        steps: [
          { name: 'true-position', value: positionMm(deviations(given)), unit: 'mm' },
          { name: 'bonus', value: bonus.value, unit: 'mm' },
        ],
      }));
    },
  },
];

function spreadQuantity(name: string, pick: 'average' | 'range' | 'largest' | 'least'): DerivedQuantity {
  return {
    name,
    method,
    inputs: [list('lengths', 'mm')],
    unit: 'mm',
    places: 6,
    source: 'arithmetic of the values entered',
    compute: (given) => resultOf(spreadOf(given.values('lengths')), (spread) => ({ value: spread[pick] })),
  };
}

/** Points of two or three lists of coordinates, or null when the lists differ in length. */
function pointsOf(given: Given, what: string, axes: readonly string[]): number[][] | null {
  const columns = axes.map((axis) => given.values(`${what}-${axis}`).map(numberOf));
  const [first = []] = columns;
  if (columns.some((column) => column.length !== first.length)) return null;
  return first.map((_, place) => columns.map((column) => column[place] ?? 0));
}

function fitted(given: Given, dimensions: 2 | 3): Derived<Computed> {
  const axes = AXES.slice(0, dimensions);
  const nominal = pointsOf(given, 'nominal', axes);
  const normals = pointsOf(given, 'normal', axes);
  const measured = pointsOf(given, 'measured', axes);
  if (!nominal || !normals || !measured) return refused('lists-of-different-length');
  return resultOf(profileAfterFitMm(nominal, normals, measured, dimensions, numberOf(given.value('offset'))), (found) => ({
    value: found.profileMm,
    steps: [
      { name: 'largest-deviation', value: Math.max(...found.deviationsMm), unit: 'mm' },
      { name: 'least-deviation', value: Math.min(...found.deviationsMm), unit: 'mm' },
    ],
  }));
}

function fitQuantity(dimensions: 2 | 3): DerivedQuantity {
  const axes = AXES.slice(0, dimensions);
  return {
    name: `profile-after-fit-${String(dimensions)}d`,
    method,
    inputs: [
      ...axes.map((axis) => list(`nominal-${axis}`, 'mm', 'any', dimensions)),
      ...axes.map((axis) => list(`normal-${axis}`, '1', 'any', dimensions)),
      ...axes.map((axis) => list(`measured-${axis}`, 'mm', 'any', dimensions)),
      signed('offset', 'mm', '0'),
    ],
    unit: 'mm',
    places: 6,
    source: 'ISO 1660 after rigid best fit (Kabsch): twice the largest deviation along the nominal normals',
    compute: (given) => fitted(given, dimensions),
  };
}

function chordOf(given: Given) {
  const point = (name: string): PointMm => ({ xMm: given.value(`${name}-x`), yMm: given.value(`${name}-y`) });
  return chordBetween(point('leading'), point('trailing'));
}
const chordInputs = ['leading-x', 'leading-y', 'trailing-x', 'trailing-y'].map((name) => signed(name, 'mm'));

const shapes: readonly DerivedQuantity[] = [
  {
    name: 'profile-of-deviations',
    method,
    inputs: [list('deviations', 'mm'), signed('offset', 'mm', '0')],
    unit: 'mm',
    places: 6,
    source: 'ISO 1660: twice the largest deviation from the middle of the zone',
    compute: (given) => single(profileMm(given.values('deviations'), given.value('offset'))),
  },
  {
    name: 'circle-diameter',
    method,
    inputs: [list('points-x', 'mm', 'any', 3, 500), list('points-y', 'mm', 'any', 3, 500)],
    unit: 'mm',
    places: 6,
    source: 'algebraic least-squares circle (Kåsa)',
    compute: (given) => {
      const [across, up] = [given.values('points-x'), given.values('points-y')];
      if (across.length !== up.length) return refused('lists-of-different-length');
      const points = across.flatMap((xMm, place) => {
        const yMm = up[place];
        return yMm === undefined ? [] : [{ xMm, yMm }];
      });
      return resultOf(circleThrough(points), ({ xMm, yMm, radiusMm }) => ({
        value: { n: 2n * radiusMm.n, d: radiusMm.d },
        steps: [
          { name: 'centre-x', value: xMm, unit: 'mm' },
          { name: 'centre-y', value: yMm, unit: 'mm' },
        ],
      }));
    },
  },
  {
    name: 'chord',
    method,
    inputs: chordInputs,
    unit: 'mm',
    places: 6,
    source: 'distance of leading and trailing edge',
    compute: (given) => resultOf(chordOf(given), ({ lengthMm }) => ({ value: lengthMm })),
  },
  {
    name: 'stagger',
    method,
    inputs: chordInputs,
    unit: '°',
    places: 6,
    source: 'direction from leading to trailing edge, from +x towards +y',
    compute: (given) => resultOf(chordOf(given), ({ staggerDegrees }) => ({ value: staggerDegrees })),
  },
  fitQuantity(2),
  fitQuantity(3),
];

/** Position, profile and spread as quantities that a plan can name. */
export const dimensionalQuantities: readonly DerivedQuantity[] = [
  ...position,
  ...shapes,
  spreadQuantity('average-length', 'average'),
  spreadQuantity('range-of-lengths', 'range'),
  spreadQuantity('largest-length', 'largest'),
  spreadQuantity('least-length', 'least'),
];

import { numberOf } from '../../quantity/decimal';
import { refused } from '../derived';
import { list, positive, resultOf, signed, single } from '../derived-quantity';
import type { DerivedQuantity, Given, InputForm } from '../derived-quantity';
import { disorientationDegrees } from './disorientation';
import { grainNumberOfDensity, grainNumberOfIntercept, grainsPerMm2, largestGrain, meanInterceptMm } from './grain-number';
import { deviationDegrees, primaryAngleDegrees, secondaryAngleDegrees } from './orientation';
import type { EulerDegrees } from './orientation';

const method = 'grain';
const count = (name: string, otherwise?: string): InputForm => ({
  kind: 'count',
  name,
  ...(otherwise === undefined ? {} : { otherwise }),
});
const eulerInputs = (prefix: string) => ['phi1', 'capital-phi', 'phi2'].map((name) => signed(`${prefix}${name}`, '°'));

function eulerOf(given: Given, prefix = ''): EulerDegrees {
  const [phi1 = 0, capitalPhi = 0, phi2 = 0] = ['phi1', 'capital-phi', 'phi2'].map((name) =>
    numberOf(given.value(`${prefix}${name}`)),
  );
  return { phi1, capitalPhi, phi2 };
}

const sizes: readonly DerivedQuantity[] = [
  {
    name: 'grain-number-by-intercept',
    method,
    inputs: [
      count('whole-intercepts'),
      count('ends-and-tangents', '0'),
      count('triple-points', '0'),
      positive('line-length', 'mm'),
      positive('magnification', '1'),
    ],
    unit: '1',
    places: 3,
    source: 'ASTM E112, intercept procedure',
    compute: (given) => {
      const mean = meanInterceptMm({
        whole: given.count('whole-intercepts'),
        endsAndTangents: given.count('ends-and-tangents'),
        triplePoints: given.count('triple-points'),
        lineMm: given.value('line-length'),
        magnification: given.value('magnification'),
      });
      if (!mean.ok) return mean;
      return resultOf(grainNumberOfIntercept(mean.value), (value) => ({
        value,
        steps: [{ name: 'mean-intercept', value: mean.value, unit: 'mm' }],
      }));
    },
  },
  {
    name: 'grain-number-by-count',
    method,
    inputs: [count('grains-inside'), count('grains-cut', '0'), positive('figure-area', 'mm²'), positive('magnification', '1')],
    unit: '1',
    places: 3,
    source: 'ASTM E112, planimetric procedure',
    compute: (given) => {
      const density = grainsPerMm2({
        inside: given.count('grains-inside'),
        cut: given.count('grains-cut'),
        figureMm2: given.value('figure-area'),
        magnification: given.value('magnification'),
      });
      if (!density.ok) return density;
      return resultOf(grainNumberOfDensity(density.value), (value) => ({
        value,
        steps: [{ name: 'grains-per-mm2', value: density.value, unit: '1' }],
      }));
    },
  },
  {
    name: 'largest-grain-area',
    method,
    inputs: [list('grain-lengths', 'mm', 'above-zero'), list('grain-widths', 'mm', 'above-zero')],
    unit: 'mm²',
    places: 6,
    source: 'ASTM E930: ellipse of the extents',
    compute: (given) => {
      const [lengths, widths] = [given.values('grain-lengths'), given.values('grain-widths')];
      if (lengths.length !== widths.length) return refused('lists-of-different-length');
      const grains = lengths.flatMap((lengthMm, place) => {
        const widthMm = widths[place];
        return widthMm === undefined ? [] : [{ lengthMm, widthMm }];
      });
      return resultOf(largestGrain(grains), ({ areaMm2, grainNumber }) => ({
        value: areaMm2,
        steps: [{ name: 'grain-number', value: grainNumber, unit: '1' }],
      }));
    },
  },
];

const angles: readonly DerivedQuantity[] = [
  {
    name: 'columnar-deviation',
    method,
    inputs: [signed('along', 'mm'), signed('across', 'mm')],
    unit: '°',
    places: 6,
    source: 'acute angle of a grain boundary to the stacking axis, from its extent along and across',
    compute: (given) => single(deviationDegrees([numberOf(given.value('along')), numberOf(given.value('across')), 0], [1, 0, 0])),
  },
  {
    name: 'orientation-angle',
    method,
    inputs: eulerInputs(''),
    unit: '°',
    places: 6,
    source: 'angle of the blade axis to the nearest ⟨001⟩, Bunge Euler angles',
    compute: (given) => single(primaryAngleDegrees(eulerOf(given))),
  },
  {
    name: 'secondary-orientation-angle',
    method,
    inputs: eulerInputs(''),
    unit: '°',
    places: 6,
    source: 'angle of the reference direction to the nearest secondary ⟨001⟩ seen along the blade axis, Bunge Euler angles',
    compute: (given) => single(secondaryAngleDegrees(eulerOf(given))),
  },
  {
    name: 'disorientation',
    method,
    inputs: [...eulerInputs('first-'), ...eulerInputs('second-')],
    unit: '°',
    places: 6,
    source: 'smallest turn over the 24 rotations of the cube; Mackenzie 1958',
    compute: (given) => ({
      ok: true,
      value: { value: disorientationDegrees(eulerOf(given, 'first-'), eulerOf(given, 'second-')) },
    }),
  },
];

/** Grain size and orientation as quantities that a plan can name. */
export const grainQuantities: readonly DerivedQuantity[] = [...sizes, ...angles];

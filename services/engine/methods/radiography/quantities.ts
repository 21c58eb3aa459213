import { numberOf } from '../../quantity/decimal';
import { list, positive, resultOf, signed, single } from '../derived-quantity';
import type { DerivedQuantity, InputForm } from '../derived-quantity';
import { halfValueLayers } from './attenuation';
import { duplexResolution } from './duplex-resolution';
import * as geometry from './geometry';
import { indicatorOf, sensitivityPercent } from './indicators';
import { contrastToNoise, normalisedSignalToNoise, regionSignal, signalToNoise } from './signal';

const method = 'radiography';
const spot = positive('focal-spot', 'mm');
const toObject = positive('source-to-object', 'mm');
const toDetector: InputForm = { kind: 'value', name: 'object-to-detector', unit: 'mm', bound: 'not-below-zero' };
const resolution = positive('basic-spatial-resolution', 'mm');
const grey = (name: string) => positive(name, '1');

const geometric: readonly DerivedQuantity[] = [
  {
    name: 'geometric-unsharpness',
    method,
    inputs: [spot, toObject, toDetector],
    unit: 'mm',
    places: 6,
    source: 'ASTM E94, E1742: F·b/a',
    compute: (given) =>
      single(
        geometry.geometricUnsharpnessMm(
          given.value('focal-spot'),
          given.value('source-to-object'),
          given.value('object-to-detector'),
        ),
      ),
  },
  {
    name: 'magnification',
    method,
    inputs: [toObject, toDetector],
    unit: '1',
    places: 6,
    source: 'geometry: (a + b)/a',
    compute: (given) => single(geometry.magnification(given.value('source-to-object'), given.value('object-to-detector'))),
  },
  {
    name: 'total-unsharpness',
    method,
    inputs: [spot, toObject, toDetector, positive('inherent-unsharpness', 'mm')],
    unit: 'mm',
    places: 6,
    source: 'ASTM E94: √(Ug² + Ui²)',
    compute: (given) => {
      const part = geometry.geometricUnsharpnessMm(
        given.value('focal-spot'),
        given.value('source-to-object'),
        given.value('object-to-detector'),
      );
      if (!part.ok) return part;
      return resultOf(geometry.totalUnsharpnessMm(part.value, given.value('inherent-unsharpness')), (value) => ({
        value,
        steps: [{ name: 'geometric-unsharpness', value: part.value, unit: 'mm' }],
      }));
    },
  },
  {
    name: 'image-unsharpness',
    method,
    inputs: [spot, toObject, toDetector, resolution],
    unit: 'mm',
    places: 6,
    source: 'ASTM E2698 practice: √((F(M − 1))² + (2·SRb)²)/M',
    compute: (given) => {
      const large = geometry.magnification(given.value('source-to-object'), given.value('object-to-detector'));
      if (!large.ok) return large;
      const answer = geometry.imageUnsharpnessMm(given.value('focal-spot'), large.value, given.value('basic-spatial-resolution'));
      return resultOf(answer, (value) => ({ value, steps: [{ name: 'magnification', value: large.value, unit: '1' }] }));
    },
  },
  {
    name: 'least-source-distance',
    method,
    inputs: [spot, positive('object-to-detector', 'mm'), positive('unsharpness-limit', 'mm')],
    unit: 'mm',
    places: 6,
    source: 'ASTM E94, E1742: F·b/U',
    compute: (given) =>
      single(
        geometry.leastSourceDistanceMm(
          given.value('focal-spot'),
          given.value('object-to-detector'),
          given.value('unsharpness-limit'),
        ),
      ),
  },
  {
    name: 'least-source-distance-by-class',
    method,
    inputs: [spot, positive('object-to-detector', 'mm'), { kind: 'choice', name: 'testing-class', options: ['A', 'B'] }],
    unit: 'mm',
    places: 6,
    source: 'EN 12681-1: 7.5·d·b^(2/3) in class A, 15·d·b^(2/3) in class B',
    compute: (given) =>
      single(
        geometry.leastSourceDistanceOfClassMm(
          given.value('focal-spot'),
          given.value('object-to-detector'),
          given.text('testing-class') === 'A' ? 'A' : 'B',
        ),
      ),
  },
];

const seen: readonly DerivedQuantity[] = [
  {
    name: 'indicator-sensitivity',
    method,
    inputs: [{ kind: 'mark', name: 'indicator-seen' }, positive('part-thickness', 'mm')],
    unit: '%',
    places: 4,
    source: 'ASTM E1025: (100/x)·√(T·h/2); wires and step holes: diameter over thickness',
    compute: (given) => {
      const indicator = indicatorOf(given.text('indicator-seen'));
      return indicator.ok ? single(sensitivityPercent(indicator.value, given.value('part-thickness'))) : indicator;
    },
  },
  {
    name: 'half-value-layers',
    method,
    inputs: [{ kind: 'value', name: 'thickness', unit: 'mm', bound: 'not-below-zero' }, positive('half-value-layer', 'mm')],
    unit: '1',
    places: 6,
    source: 'ASTM E94: thickness over half-value layer',
    compute: (given) => single(halfValueLayers(given.value('thickness'), given.value('half-value-layer'))),
  },
  {
    name: 'signal-to-noise',
    method,
    inputs: [grey('mean-grey'), grey('deviation-grey')],
    unit: '1',
    places: 4,
    source: 'ASTM E2698: mean over standard deviation',
    compute: (given) => single(signalToNoise(given.value('mean-grey'), given.value('deviation-grey'))),
  },
  {
    name: 'normalised-signal-to-noise',
    method,
    inputs: [grey('mean-grey'), grey('deviation-grey'), resolution],
    unit: '1',
    places: 4,
    source: 'ASTM E2446: SNR · 88.6 µm/SRb',
    compute: (given) => {
      const plain = signalToNoise(given.value('mean-grey'), given.value('deviation-grey'));
      if (!plain.ok) return plain;
      return resultOf(normalisedSignalToNoise(plain.value, given.value('basic-spatial-resolution')), (value) => ({
        value,
        steps: [{ name: 'signal-to-noise', value: plain.value, unit: '1' }],
      }));
    },
  },
  {
    name: 'region-signal-to-noise',
    method,
    inputs: [list('region-grey', '1', 'any', 4, 20_000), { kind: 'count', name: 'region-width' }],
    unit: '1',
    places: 4,
    source: 'ASTM E2446, E2698: mean over the deviation about the plane of the thickness',
    compute: (given) =>
      resultOf(
        regionSignal({ widthPx: given.count('region-width'), values: given.values('region-grey').map(numberOf) }),
        (region) => ({
          value: region.signalToNoise,
          steps: [
            { name: 'mean-grey', value: region.mean, unit: '1' },
            { name: 'deviation-grey', value: region.deviation, unit: '1' },
          ],
        }),
      ),
  },
  {
    name: 'contrast-to-noise',
    method,
    inputs: [signed('mean-grey', '1'), signed('ground-mean-grey', '1'), grey('deviation-grey')],
    unit: '1',
    places: 4,
    source: 'ASTM E2698: difference of means over standard deviation of the ground',
    compute: (given) =>
      single(contrastToNoise(given.value('mean-grey'), given.value('ground-mean-grey'), given.value('deviation-grey'))),
  },
  {
    name: 'basic-spatial-resolution',
    method,
    inputs: [
      list('profile', '1', 'any', 100, 20_000),
      positive('profile-step', 'mm'),
      { kind: 'choice', name: 'wires', options: ['darker', 'brighter'] },
    ],
    unit: 'mm',
    places: 4,
    source: 'ISO 19232-5, ASTM E2002: dip of 20 %, interpolated',
    compute: (given) =>
      resultOf(
        duplexResolution({
          values: given.values('profile').map(numberOf),
          stepMm: numberOf(given.value('profile-step')),
          wires: given.text('wires') === 'darker' ? 'darker' : 'brighter',
        }),
        (found) => ({
          value: found.interpolatedMm,
          steps: [
            { name: 'first-unresolved-pair', value: found.firstUnresolved, unit: '1' },
            { name: 'first-unresolved-wire', value: found.resolutionMm, unit: 'mm' },
            { name: 'last-dip', value: found.dipsPercent.at(-1) ?? 0, unit: '%' },
          ],
        }),
      ),
  },
];

/** What radiography derives, as quantities that a plan can name. */
export const radiographyQuantities: readonly DerivedQuantity[] = [...geometric, ...seen];

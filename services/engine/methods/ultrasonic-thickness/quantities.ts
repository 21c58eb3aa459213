import { refused } from '../derived';
import { positive, resultOf, signed, single } from '../derived-quantity';
import type { DerivedQuantity, Given } from '../derived-quantity';
import { thicknessMm } from './thickness';
import { calibration, isBracketed } from './two-block-calibration';

const method = 'ultrasonic-thickness';
const blocks = [
  positive('thin-block', 'mm'),
  signed('thin-block-transit', 'µs'),
  positive('thick-block', 'mm'),
  signed('thick-block-transit', 'µs'),
];

function blocksOf(given: Given) {
  return {
    thin: { thicknessMm: given.value('thin-block'), transitUs: given.value('thin-block-transit') },
    thick: { thicknessMm: given.value('thick-block'), transitUs: given.value('thick-block-transit') },
  };
}

/** Thickness and velocity as quantities that a plan can name. */
export const ultrasonicQuantities: readonly DerivedQuantity[] = [
  {
    name: 'thickness-by-velocity',
    method,
    inputs: [positive('velocity', 'mm/µs'), signed('transit', 'µs'), signed('zero', 'µs', '0')],
    unit: 'mm',
    places: 6,
    source: 'ASTM E797, ISO 16809: t = (V/2)(τ − τ₀)',
    compute: (given) => single(thicknessMm(given.value('velocity'), given.value('transit'), given.value('zero'))),
  },
  {
    name: 'thickness-by-two-blocks',
    method,
    inputs: [...blocks, signed('transit', 'µs')],
    unit: 'mm',
    places: 6,
    source: 'ASTM E797, ISO 16809: velocity and zero from two blocks',
    compute: (given) => {
      const { thin, thick } = blocksOf(given);
      const found = calibration(thin, thick);
      if (!found.ok) return found;
      const { velocityMmPerUs, zeroUs } = found.value;
      const wall = thicknessMm(velocityMmPerUs, given.value('transit'), zeroUs);
      if (wall.ok && !isBracketed(wall.value, thin, thick)) return refused('outside-blocks');
      return resultOf(wall, (value) => ({
        value,
        steps: [
          { name: 'velocity', value: velocityMmPerUs, unit: 'mm/µs' },
          { name: 'zero', value: zeroUs, unit: 'µs' },
        ],
      }));
    },
  },
  {
    name: 'velocity-by-two-blocks',
    method,
    inputs: blocks,
    unit: 'mm/µs',
    places: 6,
    source: 'ASTM E797, ISO 16809: V = 2(x₂ − x₁)/(τ₂ − τ₁)',
    compute: (given) => {
      const { thin, thick } = blocksOf(given);
      return resultOf(calibration(thin, thick), ({ velocityMmPerUs, zeroUs }) => ({
        value: velocityMmPerUs,
        steps: [{ name: 'zero', value: zeroUs, unit: 'µs' }],
      }));
    },
  },
];

import { positive, signed, single } from '../derived-quantity';
import type { DerivedQuantity } from '../derived-quantity';
import { convertValue, unitOf } from '../../quantity/units';
import type { Rational } from '../../quantity/decimal';
import { dwellAtTemperatureMin } from './dwell';

function fahrenheit(kelvin: Rational): Rational {
  const [from, to] = [unitOf('K'), unitOf('°F')];
  if (!from || !to) throw new Error('K and °F are units of the list');
  return convertValue(kelvin, from, to);
}

/** What penetrant work derives, as quantities that a plan can name. */
export const penetrantQuantities: readonly DerivedQuantity[] = [
  {
    name: 'penetrant-dwell-at-temperature',
    method: 'penetrant',
    inputs: [positive('specified-dwell', 'min'), signed('part-temperature', 'K')],
    unit: 'min',
    places: 6,
    source: 'T.O. 33B-1-1 2.4.5.5: doubled from 40 °F, halved up to 120 °F',
    compute: (given) =>
      single(dwellAtTemperatureMin(given.value('specified-dwell'), fahrenheit(given.value('part-temperature')))),
  },
];

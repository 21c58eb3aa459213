import { compare, decimalText, divide, multiply, ratio } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

/**
 * Least penetrant dwell in minutes at a part's temperature where the technique invokes T.O. 33B-1-1 2.4.5.5: as specified from
 * 60 to 100 °F, doubled from 40 °F, halved (but at least 5 min) up to 120 °F. Refuses other temperatures.
 */
export function dwellAtTemperatureMin(specifiedMin: Rational, partFahrenheit: Rational): Derived<Rational> {
  const bad = notAboveZero({ specifiedMin });
  if (bad) return bad;
  const below = (limit: bigint) => compare(partFahrenheit, ratio(limit)) < 0;
  if (below(40n) || compare(partFahrenheit, ratio(120n)) > 0)
    return refused('outside-dwell-rule', { fahrenheit: decimalText(partFahrenheit, 2) });
  if (below(60n)) return derived(multiply(specifiedMin, ratio(2n)));
  if (compare(partFahrenheit, ratio(100n)) <= 0) return derived(specifiedMin);
  const halved = divide(specifiedMin, ratio(2n));
  return derived(compare(halved, ratio(5n)) < 0 ? ratio(5n) : halved);
}

import { add, divide, multiply, ratio, rationalOf, subtract, ZERO } from './decimal';
import type { Rational } from './decimal';

export type Quantity =
  | 'length'
  | 'angle'
  | 'mass'
  | 'temperature'
  | 'pressure'
  | 'time'
  | 'mass-flow'
  | 'area'
  | 'volume'
  | 'velocity'
  | 'irradiance'
  | 'illuminance'
  | 'density'
  | 'ratio'
  | 'flow-parameter';

/** value in base = (value + offset) · factor; both exact. */
export interface Unit {
  readonly symbol: string;
  readonly quantity: Quantity;
  readonly factor: Rational;
  readonly offset: Rational;
}

const d = rationalOf;
const POUND_GRAMS = d('453.59237');
const INCH_METRES = d('0.0254');
const FOOT_METRES = d('0.3048');
// lbf/in² in Pa: pound in kg times standard gravity over a square inch (BIPM and NIST SP 811 definitions).
const PSI_PASCALS = divide(multiply(d('0.45359237'), d('9.80665')), multiply(INCH_METRES, INCH_METRES));
// A foot-candle is one lumen per square foot.
const FOOT_CANDLE_LUX = divide(ratio(1n), multiply(FOOT_METRES, FOOT_METRES));

type Row = readonly [symbol: string, factor: Rational, offset?: Rational];

const TABLE: readonly (readonly [Quantity, readonly Row[]])[] = [
  [
    'length',
    [
      ['mm', d('1')],
      ['µm', d('0.001')],
      ['cm', d('10')],
      ['m', d('1000')],
      ['in', d('25.4')],
      ['mil', d('0.0254')],
      ['µin', d('0.0000254')],
    ],
  ],
  ['angle', [['°', d('1')]]],
  [
    'mass',
    [
      ['g', d('1')],
      ['mg', d('0.001')],
      ['kg', d('1000')],
      ['lb', POUND_GRAMS],
      ['oz', divide(POUND_GRAMS, d('16'))],
    ],
  ],
  [
    'temperature',
    [
      ['°C', d('1'), d('273.15')],
      ['K', d('1')],
      ['°F', ratio(5n, 9n), d('459.67')],
    ],
  ],
  [
    'pressure',
    [
      ['Pa', d('1')],
      ['kPa', d('1000')],
      ['MPa', d('1000000')],
      ['bar', d('100000')],
      ['psi', PSI_PASCALS],
      ['mbar', d('100')],
    ],
  ],
  [
    'time',
    [
      ['µs', d('0.000001')],
      ['ns', d('0.000000001')],
      ['ms', d('0.001')],
      ['s', d('1')],
      ['min', d('60')],
      ['h', d('3600')],
    ],
  ],
  [
    'mass-flow',
    [
      ['kg/s', d('1000')],
      ['g/s', d('1')],
      ['lb/s', POUND_GRAMS],
    ],
  ],
  [
    'area',
    [
      ['mm²', d('1')],
      ['cm²', d('100')],
      ['in²', d('645.16')],
    ],
  ],
  [
    'volume',
    [
      ['mm³', d('1')],
      ['cm³', d('1000')],
      ['in³', d('16387.064')],
    ],
  ],
  [
    'velocity',
    [
      ['mm/µs', d('1000')],
      ['m/s', d('1')],
      ['in/µs', d('25400')],
    ],
  ],
  [
    'irradiance',
    [
      ['µW/cm²', d('0.01')],
      ['W/m²', d('1')],
    ],
  ],
  [
    'illuminance',
    [
      ['lx', d('1')],
      ['fc', FOOT_CANDLE_LUX],
    ],
  ],
  [
    'density',
    [
      ['g/cm³', d('1000')],
      ['kg/m³', d('1')],
    ],
  ],
  [
    'ratio',
    [
      ['1', d('1')],
      ['%', d('0.01')],
    ],
  ],
  ['flow-parameter', [['mg·√K/(s·kPa)', d('1')]]],
];

const UNITS: ReadonlyMap<string, Unit> = new Map(
  TABLE.flatMap(([quantity, rows]) =>
    rows.map(([symbol, factor, offset]) => [symbol, { symbol, quantity, factor, offset: offset ?? ZERO }] as const),
  ),
);

/** Every unit as spelt, quantity by quantity. */
export const unitSymbols: readonly string[] = [...UNITS.keys()];

/** The unit so spelt; the Greek mu (U+03BC) means the micro sign (U+00B5). Undefined for a unit not in the table. */
export function unitOf(symbol: string): Unit | undefined {
  return UNITS.get(symbol.replaceAll('\u03bc', '\u00b5'));
}

/** A value (a point on the scale: offsets count) converted exactly; both units are of one quantity. */
export function convertValue(value: Rational, from: Unit, to: Unit): Rational {
  if (from.symbol === to.symbol) return value;
  return subtract(divide(multiply(add(value, from.offset), from.factor), to.factor), to.offset);
}

/** A difference (an uncertainty, a tolerance: no offset) converted exactly; both units are of one quantity. */
export function convertDifference(difference: Rational, from: Unit, to: Unit): Rational {
  if (from.symbol === to.symbol) return difference;
  return divide(multiply(difference, from.factor), to.factor);
}

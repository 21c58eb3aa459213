import { divide, numberOf } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { decimalLog, exponential } from '../../quantity/elementary';
import { exact } from '../../quantity/roots';
import { belowZero, notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

const LN_2 = exact('0.6931471805599453');

export type Shield = 'concrete' | 'steel' | 'lead';
type Row = readonly [energy: string, concrete: string | null, steel: string | null, lead: string | null];

// Half-value layers in mm: ASTM E94 as printed in a radiography handbook (steel below 1 MV could not be read there).
const HALF_VALUE_LAYERS_MM: readonly Row[] = [
  ['50 kV', '4.32', null, '0.05'],
  ['70 kV', '8.38', null, '0.15'],
  ['100 kV', '15.1', null, '0.24'],
  ['125 kV', '20.3', null, '0.27'],
  ['150 kV', '22.35', null, '0.29'],
  ['200 kV', '25.4', null, '0.48'],
  ['250 kV', '27.95', null, '0.9'],
  ['300 kV', '31.2', null, '1.4'],
  ['400 kV', '33.0', null, '2.2'],
  ['500 kV', '35.55', null, '3.6'],
  ['Ir-192', '41', '13', '6.1'],
  ['Cs-137', '48', null, '6.35'],
  ['1 MV', '44.45', '14.5', '7.9'],
  ['2 MV', '63.5', '20.3', '12.7'],
  ['Co-60', '66', '22', '12.4'],
];

/** Half-value layer in mm of a material for a source, as the table prints it. Refuses what the table does not hold. */
export function halfValueLayerMm(energy: string, shield: Shield): Derived<Rational> {
  const row = HALF_VALUE_LAYERS_MM.find(([name]) => name === energy);
  const text = row?.[{ concrete: 1, steel: 2, lead: 3 }[shield] as 1 | 2 | 3];
  return text === undefined || text === null ? refused('not-in-table', { energy, shield }) : derived(exact(text));
}

/** Half-value layer from the linear coefficient of attenuation: ln 2/μ, in the unit whose inverse μ has. */
export function halfValueLayerOfCoefficient(coefficient: Rational): Derived<Rational> {
  return notAboveZero({ coefficient }) ?? derived(divide(LN_2, coefficient));
}

/** How many half-value layers a thickness is. Refuses a layer not above zero and a negative thickness. Source: ASTM E94. */
export function halfValueLayers(thicknessMm: Rational, layerMm: Rational): Derived<Rational> {
  const bad = notAboveZero({ layerMm }) ?? belowZero({ thicknessMm });
  return bad ?? derived(divide(thicknessMm, layerMm));
}

/** The share of narrow-beam radiation that passes: 2^(−thickness/layer). Refuses as above, and more than 1000 layers. */
export function transmission(thicknessMm: Rational, layerMm: Rational): Derived<number> {
  const layers = halfValueLayers(thicknessMm, layerMm);
  if (!layers.ok) return layers;
  const count = numberOf(layers.value);
  return count > 1000 ? refused('beyond-table', { layers: count }) : derived(exponential(-count * numberOf(LN_2)));
}

/** Activity left after a time: A₀·2^(−t/T½); both times in one unit. */
export function activityLeft(activity: Rational, elapsed: Rational, halfLife: Rational): Derived<number> {
  const bad = notAboveZero({ activity });
  if (bad) return bad;
  const share = transmission(elapsed, halfLife);
  return share.ok ? derived(numberOf(activity) * share.value) : share;
}

/** Optical density of a film from light sent and light passed: log₁₀(I₀/I). Refuses lights not above zero. */
export function filmDensity(sent: Rational, passed: Rational): Derived<number> {
  return notAboveZero({ sent, passed }) ?? derived(decimalLog(numberOf(divide(sent, passed))));
}

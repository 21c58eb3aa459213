import { decimalText, isDecimalText } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { airflowQuantities } from './airflow/quantities';
import { coreShiftQuantities } from './core-shift/quantities';
import type { DerivedQuantity } from './derived-quantity';
import { dimensionalQuantities } from './dimensional/quantities';
import { grainQuantities } from './grain/quantities';
import { penetrantQuantities } from './penetrant/quantities';
import { radiographyQuantities } from './radiography/quantities';
import { readInputs } from './read-inputs';
import type { EnteredInput, PlacedFault } from './read-inputs';
import { ultrasonicQuantities } from './ultrasonic-thickness/quantities';
import { weighingQuantities } from './weighing/quantities';

/** Every derived quantity that a plan can name, method by method. */
export const DERIVED_QUANTITIES: readonly DerivedQuantity[] = [
  ...ultrasonicQuantities,
  ...coreShiftQuantities,
  ...radiographyQuantities,
  ...penetrantQuantities,
  ...dimensionalQuantities,
  ...airflowQuantities,
  ...grainQuantities,
  ...weighingQuantities,
];

const BY_NAME: ReadonlyMap<string, DerivedQuantity> = new Map(DERIVED_QUANTITIES.map((one) => [one.name, one]));

/** The quantity of a name; undefined for a name that is not in the list. */
export function derivedQuantity(name: string): DerivedQuantity | undefined {
  return BY_NAME.get(name);
}

export interface DerivedStep {
  readonly name: string;
  readonly value: string;
  readonly unit: string;
}

/** A value to be judged like a reading, with what it came from; or every fault of the inputs, or the one refusal of the computation. */
export type DerivedReading =
  | { readonly ok: true; readonly value: string; readonly unit: string; readonly steps: readonly DerivedStep[] }
  | { readonly ok: false; readonly faults: readonly PlacedFault[] };

/** A double as the exact ratio that it is. */
function rationalOfDouble(value: number): Rational {
  let numerator = value;
  let denominator = 1n;
  for (; !Number.isInteger(numerator); denominator *= 2n) numerator *= 2;
  return { n: BigInt(numerator), d: denominator };
}

/** Null for a number that no decimal can hold. */
function textOf(value: Rational | number, places: number): string | null {
  if (typeof value === 'number' && !Number.isFinite(value)) return null;
  const text = decimalText(typeof value === 'number' ? rationalOfDouble(value) : value, places);
  return isDecimalText(text) ? text : null;
}

/**
 * Computes a derived quantity from raw entries. Entries convert exactly to the formula's units, so their unit never changes the
 * answer; the result is rounded half to even to the quantity's decimals and given in the quantity's unit.
 */
export function derive(quantity: string, inputs: readonly EnteredInput[]): DerivedReading {
  const found = derivedQuantity(quantity);
  if (!found) return { ok: false, faults: [{ path: 'quantity', code: 'quantity-unknown', parameters: { quantity } }] };
  const read = readInputs(found, inputs);
  if (!read.ok) return read;
  const computed = found.compute(read.given);
  if (!computed.ok) return { ok: false, faults: [{ ...computed.fault, path: 'inputs' }] };
  const value = textOf(computed.value.value, found.places);
  if (value === null) return { ok: false, faults: [{ path: 'inputs', code: 'result-too-large', parameters: { quantity } }] };
  const steps = (computed.value.steps ?? []).flatMap((step): DerivedStep[] => {
    const text = textOf(step.value, 6);
    return text === null ? [] : [{ name: step.name, value: text, unit: step.unit }];
  });
  return { ok: true, value, unit: found.unit, steps };
}

import type { Fault } from '../evaluate/fault';
import { unitOf } from '../quantity/units';
import { renderSentence } from '../sentences/sentence';
import { derivedQuantity } from './derive';
import type { DerivedQuantity, InputForm } from './derived-quantity';
import { otherwiseOf, readInput } from './read-inputs';

/** One input as a plan states it: entered by the inspector unless the plan fixes its value. */
export interface PlannedInput {
  readonly name: string;
  /** Unit of entry, or of the fixed value; only for inputs that have a unit. */
  readonly unit?: string | undefined;
  readonly value?: string | readonly string[] | undefined;
}

/** A characteristic of a plan whose reading is derived from raw entries. */
export interface PlannedDerivation {
  readonly characteristic: string;
  readonly quantity: string;
  readonly inputs: readonly PlannedInput[];
}

/** What the fault finder needs of a plan's characteristics. */
export interface PlannedCharacteristic {
  readonly number: string;
  readonly unit: string;
}

function inputFaults(quantity: DerivedQuantity, form: InputForm, input: PlannedInput, path: string): Fault[] {
  if (input.value !== undefined) {
    const read = readInput(form, { name: input.name, value: input.value, unit: input.unit }, path);
    return read.ok
      ? []
      : read.faults.map((fault) => ({ path: fault.path, message: renderSentence(fault.code, fault.parameters, 'en') }));
  }
  const wanted = form.kind === 'value' || form.kind === 'values' ? unitOf(form.unit)?.quantity : undefined;
  const stated = input.unit === undefined ? undefined : unitOf(input.unit)?.quantity;
  if (wanted === undefined && input.unit === undefined) return [];
  if (wanted !== undefined && stated === wanted) return [];
  const code = wanted === undefined ? 'unit-not-wanted' : 'unit-of-other-quantity';
  return [
    { path: `${path}.unit`, message: renderSentence(code, { input: input.name, quantity: wanted ?? quantity.name }, 'en') },
  ];
}

function inputsFaults(quantity: DerivedQuantity, { inputs }: PlannedDerivation, path: string): Fault[] {
  const faults = inputs.flatMap((input, place): Fault[] => {
    const where = `${path}.inputs.${String(place)}`;
    const form = quantity.inputs.find(({ name }) => name === input.name);
    if (!form) return [{ path: `${where}.name`, message: `${input.name} is not an input of ${quantity.name}` }];
    if (inputs.findIndex(({ name }) => name === input.name) < place)
      return [{ path: `${where}.name`, message: `${input.name} is given twice` }];
    return inputFaults(quantity, form, input, where);
  });
  const missing = quantity.inputs.filter((form) => !inputs.some(({ name }) => name === form.name) && otherwiseOf(form) === null);
  const allFixed = inputs.length > 0 && inputs.every(({ value }) => value !== undefined);
  return [
    ...faults,
    ...missing.map(({ name }) => ({ path: `${path}.inputs`, message: `${name} is missing` })),
    ...(allFixed
      ? [{ path: `${path}.inputs`, message: 'leave nothing to be entered: every part would have the same reading' }]
      : []),
  ];
}

/**
 * Everything that stands against a plan's derived characteristics, in one pass, dotted from `derived`: characteristics that are
 * not in the plan or named twice, unknown quantities, results of another quantity than the characteristic's unit, and inputs
 * that are unknown, given twice, missing, of a wrong unit or fixed to something that cannot be taken.
 */
export function derivedEntryFaults(
  derivations: readonly PlannedDerivation[],
  characteristics: readonly PlannedCharacteristic[],
): Fault[] {
  return derivations.flatMap((derivation, place): Fault[] => {
    const path = `derived.${String(place)}`;
    const characteristic = characteristics.find(({ number }) => number === derivation.characteristic);
    const twice = derivations.findIndex((other) => other.characteristic === derivation.characteristic) < place;
    const quantity = derivedQuantity(derivation.quantity);
    const faults: Fault[] = [];
    if (!characteristic)
      faults.push({ path: `${path}.characteristic`, message: `${derivation.characteristic} is not in the plan` });
    if (twice) faults.push({ path: `${path}.characteristic`, message: `${derivation.characteristic} is derived twice` });
    if (!quantity) return [...faults, { path: `${path}.quantity`, message: `${derivation.quantity} is not a derived quantity` }];
    const result = unitOf(quantity.unit)?.quantity;
    if (characteristic && unitOf(characteristic.unit)?.quantity !== result)
      faults.push({
        path: `${path}.quantity`,
        message: `${quantity.name} is a ${String(result)}, which ${characteristic.unit} does not measure`,
      });
    return [...faults, ...inputsFaults(quantity, derivation, path)];
  });
}

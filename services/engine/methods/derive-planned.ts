import { derive, derivedQuantity } from './derive';
import type { DerivedReading } from './derive';
import type { PlannedDerivation } from './derived-entry-faults';
import type { EnteredInput, PlacedFault } from './read-inputs';

/**
 * The reading of a characteristic that its plan derives: what the plan fixes and what was entered, together. A value entered
 * for an input that the plan fixes, or that the plan does not list, is refused; faults of entries are dotted from `inputs` in
 * the order entered. The entries are what is stored with the reading: derived again they give the same decimal.
 */
export function derivePlanned(planned: PlannedDerivation, entered: readonly EnteredInput[]): DerivedReading {
  const fixed = planned.inputs.flatMap((input): EnteredInput[] =>
    input.value === undefined
      ? []
      : [{ name: input.name, value: input.value, ...(input.unit === undefined ? {} : { unit: input.unit }) }],
  );
  const unasked = entered.flatMap(({ name }, place): PlacedFault[] => {
    const path = `inputs.${String(place)}.name`;
    if (fixed.some((input) => input.name === name)) return [{ path, code: 'input-fixed', parameters: { input: name } }];
    if (planned.inputs.some((input) => input.name === name) || !derivedQuantity(planned.quantity)) return [];
    return [{ path, code: 'input-unknown', parameters: { input: name, quantity: planned.quantity } }];
  });
  return unasked.length > 0 ? { ok: false, faults: unasked } : derive(planned.quantity, [...entered, ...fixed]);
}

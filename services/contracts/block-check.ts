import type { InspectionContent } from './inspection-content';
import type { PlanRequirement } from './plan-content';

const decimalForm = /^-?[0-9]{1,16}(\.[0-9]{1,16})?$/;

/** A decimal as a whole number of 10^-16. */
function scaled(text: string): bigint {
  const [whole = '0', fraction = ''] = text.split('.');
  const digits = BigInt(`${whole.replace('-', '')}${fraction.padEnd(16, '0')}`);
  return whole.startsWith('-') ? -digits : digits;
}

/** |read − nominal| ≤ tolerance, exactly; null when the reading is no decimal. All three in the block's unit. */
export function stepWithin(read: string, nominal: string, tolerance: string): boolean | null {
  if (![read, nominal, tolerance].every((text) => decimalForm.test(text))) return null;
  const difference = scaled(read) - scaled(nominal);
  return (difference < 0n ? -difference : difference) <= scaled(tolerance);
}

export interface StepAnswer {
  readonly when: 'block-check-before' | 'block-check-after';
  readonly nominal: string;
  readonly read: string | null;
  /** Null while there is no reading that can be judged. */
  readonly within: boolean | null;
}

/** Every step of the block before and after; the act's values hold what was read under each step's nominal. */
export function blockSteps(asked: NonNullable<PlanRequirement['blockCheck']>, acts: InspectionContent['acts']): StepAnswer[] {
  return (['block-check-before', 'block-check-after'] as const).flatMap((when) => {
    const act = acts.find(({ kind }) => kind === when);
    return asked.steps.map(({ nominal, tolerance }) => {
      const read = act?.values[nominal]?.trim() ?? '';
      return {
        when,
        nominal,
        read: read === '' ? null : read,
        within: read === '' ? null : stepWithin(read, nominal, tolerance),
      };
    });
  });
}

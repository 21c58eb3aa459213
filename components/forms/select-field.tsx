'use client';

import { useMessages } from '@/components/theme/use-messages';
import { describedInput, FieldFrame, useFieldWiring } from './field-frame';
import type { FieldProps } from './field-frame';

export interface SelectFieldProps extends FieldProps {
  options: readonly { value: string; label: string; disabled?: boolean }[];
  /** The first, empty choice; 'Choose…' unless told. Null leaves it out. */
  emptyLabel?: string | null;
}

/** One of several. */
export function SelectField({ name, label, hint, optional, disabled, options, emptyLabel }: SelectFieldProps) {
  const t = useMessages('forms');
  const wiring = useFieldWiring<string>(name);
  return (
    <FieldFrame wiring={wiring} label={label} hint={hint} optional={optional}>
      <select {...wiring.field} {...describedInput(wiring, { hint, optional })} disabled={disabled} className="field">
        {emptyLabel !== null && <option value="">{emptyLabel ?? t('choose')}</option>}
        {options.map((option) => (
          <option key={option.value} value={option.value} disabled={option.disabled}>
            {option.label}
          </option>
        ))}
      </select>
    </FieldFrame>
  );
}

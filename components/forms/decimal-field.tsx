'use client';

import { useMessages } from '@/components/theme/use-messages';
import { decimalFrom } from './decimal-text';
import { describedInput, FieldFrame, useFieldWiring } from './field-frame';
import type { FieldProps } from './field-frame';

export interface DecimalFieldProps extends FieldProps {
  unit?: string;
}

/**
 * A decimal as typed, comma or point. The form keeps the text; send `decimalFrom(text)`.
 * A text that is no plain decimal is answered on leaving the field, and kept.
 */
export function DecimalField({ name, label, hint, optional, disabled, unit }: DecimalFieldProps) {
  const t = useMessages('forms');
  const wiring = useFieldWiring<string>(name);
  const typed = wiring.field.value;
  const unclear = wiring.touched && typed.trim() !== '' && decimalFrom(typed) === undefined ? t('notADecimal') : undefined;
  const told = { ...wiring, error: unclear ?? wiring.error };
  return (
    <FieldFrame wiring={told} label={label} hint={hint} optional={optional}>
      <span className="flex items-center gap-2">
        <input
          {...wiring.field}
          {...describedInput(told, { hint, optional })}
          inputMode="decimal"
          autoComplete="off"
          disabled={disabled}
          className="field text-right font-mono"
        />
        {unit !== undefined && <span className="min-w-10 text-ink-soft">{unit}</span>}
      </span>
    </FieldFrame>
  );
}

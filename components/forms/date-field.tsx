'use client';

import { useMessages } from '@/components/theme/use-messages';
import { dayFrom } from './day-text';
import { describedInput, FieldFrame, useFieldWiring } from './field-frame';
import type { FieldProps } from './field-frame';

/**
 * A calendar day, typed and kept as 2026-03-09. Not the browser's own date control: that shows the order of the
 * computer's language, and its calendar is a white sheet in a dark room.
 */
export function DateField({ name, label, hint, optional, disabled }: FieldProps) {
  const t = useMessages('forms');
  const wiring = useFieldWiring<string>(name);
  const typed = wiring.field.value;
  const unclear = wiring.touched && typed.trim() !== '' && dayFrom(typed) === undefined ? t('notADay') : undefined;
  const told = { ...wiring, error: unclear ?? wiring.error };
  return (
    <FieldFrame wiring={told} label={label} hint={hint} optional={optional}>
      <input
        {...wiring.field}
        {...describedInput(told, { hint, optional })}
        onBlur={(event) => {
          wiring.field.onBlur(event);
          const day = dayFrom(typed);
          if (day !== undefined && day !== typed) void wiring.helpers.setValue(day);
        }}
        inputMode="numeric"
        autoComplete="off"
        placeholder={t('dayForm')}
        disabled={disabled}
        className="field max-w-44 font-mono"
      />
    </FieldFrame>
  );
}

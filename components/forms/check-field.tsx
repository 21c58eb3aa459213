'use client';

import { describedInput, FieldError, useFieldWiring } from './field-frame';
import type { FieldProps } from './field-frame';

/** Yes or no, on one line that can be pressed as a whole. */
export function CheckField({ name, label, hint, disabled }: FieldProps) {
  const wiring = useFieldWiring<boolean>(name);
  const { value, ...field } = wiring.field;
  return (
    <div className="flex flex-col gap-1">
      <label className="control flex min-h-10 items-center gap-3">
        <input
          {...field}
          {...describedInput(wiring, { hint, optional: true })}
          type="checkbox"
          checked={value}
          disabled={disabled}
          className="size-5 shrink-0"
        />
        <span>{label}</span>
      </label>
      {hint !== undefined && (
        <p id={wiring.hintId} className="pl-8 text-sm text-ink-soft">
          {hint}
        </p>
      )}
      {wiring.error !== undefined && <FieldError id={wiring.errorId}>{wiring.error}</FieldError>}
    </div>
  );
}

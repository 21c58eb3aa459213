'use client';

import { describedInput, FieldFrame, useFieldWiring } from './field-frame';
import type { FieldProps } from './field-frame';

export interface TextFieldProps extends FieldProps {
  type?: 'text' | 'email' | 'search' | 'tel';
  autoComplete?: string;
  /** Serials, numbers and other codes are set in mono and never corrected by the browser. */
  code?: boolean;
  placeholder?: string;
  maxLength?: number;
}

/** One line of text. */
export function TextField({ name, label, hint, optional, disabled, type = 'text', code = false, ...rest }: TextFieldProps) {
  const wiring = useFieldWiring<string>(name);
  return (
    <FieldFrame wiring={wiring} label={label} hint={hint} optional={optional}>
      <input
        {...wiring.field}
        {...rest}
        {...describedInput(wiring, { hint, optional })}
        type={type}
        disabled={disabled}
        spellCheck={code ? false : undefined}
        autoCapitalize={code ? 'off' : undefined}
        className={`field ${code ? 'font-mono' : ''}`}
      />
    </FieldFrame>
  );
}

export interface TextAreaFieldProps extends FieldProps {
  rows?: number;
  maxLength?: number;
}

/** Several lines of text. */
export function TextAreaField({ name, label, hint, optional, disabled, rows = 3, maxLength }: TextAreaFieldProps) {
  const wiring = useFieldWiring<string>(name);
  return (
    <FieldFrame wiring={wiring} label={label} hint={hint} optional={optional}>
      <textarea
        {...wiring.field}
        {...describedInput(wiring, { hint, optional })}
        rows={rows}
        maxLength={maxLength}
        disabled={disabled}
        className="field"
      />
    </FieldFrame>
  );
}

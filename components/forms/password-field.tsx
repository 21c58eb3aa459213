'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { describedInput, FieldFrame, useFieldWiring } from './field-frame';
import type { FieldProps } from './field-frame';

export interface PasswordFieldProps extends FieldProps {
  autoComplete?: 'current-password' | 'new-password' | 'one-time-code';
}

/** A password, which its owner may look at. */
export function PasswordField({ name, label, hint, disabled, autoComplete = 'current-password' }: PasswordFieldProps) {
  const t = useMessages('forms');
  const [shown, setShown] = useState(false);
  const wiring = useFieldWiring<string>(name);
  return (
    <FieldFrame wiring={wiring} label={label} hint={hint}>
      <span className="flex gap-2">
        <input
          {...wiring.field}
          {...describedInput(wiring, { hint })}
          type={shown ? 'text' : 'password'}
          autoComplete={autoComplete}
          autoCapitalize="off"
          spellCheck={false}
          disabled={disabled}
          className="field"
        />
        <Button aria-pressed={shown} onClick={() => setShown(!shown)}>
          {shown ? t('hide') : t('show')}
        </Button>
      </span>
    </FieldFrame>
  );
}

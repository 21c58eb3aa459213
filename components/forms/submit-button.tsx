'use client';

import { useFormikContext } from 'formik';
import type { ReactNode } from 'react';
import { Button } from '@/components/ui/button';
import type { ButtonKind, ButtonSize } from '@/components/ui/button';

export interface SubmitButtonProps {
  children: ReactNode;
  kind?: ButtonKind;
  size?: ButtonSize;
  disabled?: boolean;
}

/** Sends the form once: pressed twice it is still sent once. */
export function SubmitButton({ children, kind = 'primary', size, disabled }: SubmitButtonProps) {
  const { isSubmitting } = useFormikContext();
  return (
    <Button type="submit" kind={kind} size={size} busy={isSubmitting} disabled={disabled}>
      {children}
    </Button>
  );
}

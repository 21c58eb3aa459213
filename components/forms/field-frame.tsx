'use client';

import { getIn, useField, useFormikContext } from 'formik';
import { useId } from 'react';
import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from '@/components/ui/glyph';

/** What every field takes. */
export interface FieldProps {
  name: string;
  label: ReactNode;
  /** What is expected, under the label. */
  hint?: ReactNode;
  optional?: boolean;
  disabled?: boolean;
}

interface Refused {
  message: string;
  value: unknown;
}

/** The wiring of one field: ids, error and description. A refusal by the server stays until the value changes. */
export function useFieldWiring<Value>(name: string) {
  const [field, meta, helpers] = useField<Value>(name);
  const { status, submitCount } = useFormikContext();
  const id = useId();
  const refused = getIn(status, name) as Refused | undefined;
  const own = meta.touched || submitCount > 0 ? meta.error : undefined;
  const error = own ?? (refused !== undefined && Object.is(refused.value, field.value) ? refused.message : undefined);
  return { field, helpers, error, touched: meta.touched || submitCount > 0, id, errorId: `${id}-error`, hintId: `${id}-hint` };
}

export type Wiring = Pick<ReturnType<typeof useFieldWiring>, 'id' | 'errorId' | 'hintId' | 'error'>;

/** The attributes that tie an input to its label, hint and error. */
export function describedInput(
  { id, errorId, hintId, error }: Wiring,
  { hint, optional }: Pick<FieldProps, 'hint' | 'optional'>,
) {
  const described = [hint === undefined ? '' : hintId, error === undefined ? '' : errorId]
    .filter((text) => text !== '')
    .join(' ');
  return {
    id,
    'aria-describedby': described === '' ? undefined : described,
    'aria-invalid': error === undefined ? undefined : true,
    'aria-required': optional === true ? undefined : true,
  };
}

/** The message under a field. */
export function FieldError({ id, children }: { id: string; children: ReactNode }) {
  return (
    <p id={id} className="flex items-baseline gap-1.5 text-sm font-semibold text-reject">
      <Glyph name="reject" pixels={14} />
      <span>{children}</span>
    </p>
  );
}

/** Label above, hint, input, error below. */
export function FieldFrame({
  wiring,
  label,
  hint,
  optional = false,
  children,
}: Pick<FieldProps, 'label' | 'hint' | 'optional'> & { wiring: Wiring; children: ReactNode }) {
  const t = useMessages('forms');
  return (
    <div className="flex min-w-0 flex-col gap-1">
      <label htmlFor={wiring.id} className="font-semibold">
        {label}
        {optional && <span className="ml-2 font-normal text-ink-soft">{t('optional')}</span>}
      </label>
      {hint !== undefined && (
        <p id={wiring.hintId} className="text-sm text-ink-soft">
          {hint}
        </p>
      )}
      {children}
      {wiring.error !== undefined && <FieldError id={wiring.errorId}>{wiring.error}</FieldError>}
    </div>
  );
}

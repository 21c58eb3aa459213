'use client';

import { FieldArray, getIn, useField, useFormikContext } from 'formik';
import { useId } from 'react';
import type { ReactNode } from 'react';
import { FieldError } from '@/components/forms/field-frame';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';

interface Column {
  readonly name: string;
  readonly title: string;
  /** Columns of twelve that the field takes on a wide screen. */
  readonly span: number;
  readonly kind?: 'text' | 'decimal' | 'check' | 'select';
  readonly options?: readonly { readonly value: string; readonly label: string }[];
}

/** What the server refused at a cell, or at its row as a whole, while the cell still holds what was refused. */
function useRefusal(path: string): string | undefined {
  const { status } = useFormikContext();
  const row = path.slice(0, path.lastIndexOf('.'));
  return [path, row]
    .map((place) => (getIn(status, place) as { message?: unknown } | undefined)?.message)
    .find((message) => typeof message === 'string');
}

function Control({ path, column, label, invalid }: { path: string; column: Column; label: string; invalid: string | undefined }) {
  const [field] = useField<string | boolean>(path);
  const { name, onChange, onBlur } = field;
  const named = {
    name,
    onChange,
    onBlur,
    'aria-label': label,
    'aria-describedby': invalid,
    'aria-invalid': invalid ? true : undefined,
  };
  const look = `field w-full ${column.kind === 'decimal' ? 'text-right font-mono' : ''}`;
  if (column.kind === 'check')
    return (
      <label className="control flex min-h-10 items-center gap-2">
        <input {...named} type="checkbox" checked={field.value === true} className="size-5 shrink-0" />
        <span aria-hidden>{column.title}</span>
      </label>
    );
  if (column.kind === 'select')
    return (
      <select {...named} value={String(field.value)} className={look}>
        {column.options?.map(({ value, label: word }) => (
          <option key={value} value={value}>
            {word}
          </option>
        ))}
      </select>
    );
  return <input {...named} value={String(field.value)} placeholder={column.title} className={look} autoComplete="off" />;
}

function Cell({ path, column, label }: { path: string; column: Column; label: string }) {
  const id = useId();
  const refusal = useRefusal(path);
  return (
    <>
      <Control path={path} column={column} label={label} invalid={refusal === undefined ? undefined : id} />
      {refusal === undefined ? null : <FieldError id={id}>{refusal}</FieldError>}
    </>
  );
}

// Written out whole, so that the style sheet holds them.
const spans: Readonly<Record<number, string>> = {
  1: 'md:col-span-1',
  2: 'md:col-span-2',
  3: 'md:col-span-3',
  4: 'md:col-span-4',
  5: 'md:col-span-5',
  6: 'md:col-span-6',
  11: 'md:col-span-11',
};

/** Rows of fields under one heading; rows are added and taken away. */
export function RowList<Row extends object>({
  path,
  title,
  hint,
  columns,
  rows,
  emptyRow,
}: {
  path: string;
  title: string;
  hint?: ReactNode;
  columns: readonly Column[];
  rows: readonly Row[];
  emptyRow: Row;
}) {
  const t = useMessages('techniques');
  return (
    <fieldset className="flex flex-col gap-2 rounded border border-line p-3">
      <legend className="px-1 font-semibold">{title}</legend>
      {hint === undefined ? null : <p className="text-sm text-ink-soft">{hint}</p>}
      <FieldArray name={path}>
        {({ push, remove }) => (
          <>
            {rows.length > 0 ? (
              <div aria-hidden className="hidden gap-2 text-sm text-ink-soft md:grid md:grid-cols-12">
                {columns.map(({ name, title: word, span, kind }) => (
                  <span key={name} className={spans[span]}>
                    {kind === 'check' ? '' : word}
                  </span>
                ))}
              </div>
            ) : null}
            {rows.map((_row, place) => (
              // A row has no other name than its place.
              <div key={place} className="grid items-start gap-2 md:grid-cols-12">
                {columns.map((column) => (
                  <div key={column.name} className={spans[column.span]}>
                    <Cell
                      path={`${path}.${String(place)}.${column.name}`}
                      column={column}
                      label={`${title} ${String(place + 1)}: ${column.title}`}
                    />
                  </div>
                ))}
                <Button
                  kind="bare"
                  glyph="away"
                  aria-label={t('removeRow', { row: place + 1, list: title })}
                  onClick={() => remove(place)}
                />
              </div>
            ))}
            <div>
              <Button aria-label={t('addRowTo', { list: title })} onClick={() => push({ ...emptyRow })}>
                {t('addRow')}
              </Button>
            </div>
          </>
        )}
      </FieldArray>
    </fieldset>
  );
}

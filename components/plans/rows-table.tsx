'use client';

import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { textOfValue, type EntryKind, type Option } from './entry-values';
import { PlanFault, PlanField } from './plan-field';
import { usePlanEditing } from './plan-editing';
import { AddRow, RowButtons } from './row-buttons';

export interface RowsColumn {
  /** Path in the row. */
  readonly key: string;
  readonly title: string;
  readonly kind: EntryKind;
  readonly options?: readonly Option[];
  /** Tailwind class of a width for the column. */
  readonly width?: string;
  /** Another cell than a plain field; gets the path of the row and its name. */
  readonly cell?: (row: string, name: string) => ReactNode;
}

export interface RowsTableProps {
  readonly path: string;
  readonly caption: string;
  readonly columns: readonly RowsColumn[];
  /** What names a row: the path of its number in it. */
  readonly nameKey: string;
  readonly fresh: unknown;
  readonly addLabel: string;
}

/** A list of the plan as a table of entries, in drawing order. */
export function RowsTable({ path, caption, columns, nameKey, fresh, addLabel }: RowsTableProps) {
  const t = useMessages('plans');
  const { rows, at, faultAt, readOnly } = usePlanEditing();
  const list = rows(path);
  return (
    <div className="flex flex-col gap-3">
      <PlanFault text={faultAt(path)} />
      {list.length === 0 ? <p className="text-ink-soft">{t('noRows')}</p> : null}
      {list.length === 0 ? null : (
        <div className="relative overflow-x-auto" role="region" aria-label={caption} tabIndex={0}>
          <table className="w-full border-collapse">
            <caption className="sr-only">{caption}</caption>
            <thead>
              <tr className="border-b border-line-strong">
                {columns.map(({ key, title, width = '' }) => (
                  <th key={key} scope="col" className={`px-1.5 py-1 text-left text-sm font-semibold text-ink-soft ${width}`}>
                    {title}
                  </th>
                ))}
                {readOnly ? null : <th scope="col">{t('rows')}</th>}
              </tr>
            </thead>
            <tbody>
              {list.map((_, place) => {
                const row = `${path}.${String(place)}`;
                const name = textOfValue(at(`${row}.${nameKey}`)) || String(place + 1);
                return (
                  <tr key={place} className="border-b border-line align-top">
                    {columns.map(({ key, title, kind, options, cell }) => (
                      <td key={key} className="px-1.5 py-1">
                        {cell ? (
                          cell(row, name)
                        ) : (
                          <PlanField
                            quiet
                            path={`${row}.${key}`}
                            label={`${title} ${name}`}
                            kind={kind}
                            options={options ?? []}
                          />
                        )}
                      </td>
                    ))}
                    {readOnly ? null : (
                      <td className="py-1">
                        <RowButtons path={path} place={place} name={name} />
                      </td>
                    )}
                  </tr>
                );
              })}
            </tbody>
          </table>
        </div>
      )}
      <div>
        <AddRow path={path} row={fresh} label={addLabel} />
      </div>
    </div>
  );
}

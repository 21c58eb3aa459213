import type { ReactNode } from 'react';

export interface DataColumn<Row> {
  key: string;
  title: ReactNode;
  cell: (row: Row) => ReactNode;
  /** Numbers stand to the right. */
  align?: 'start' | 'end';
  /** The column that names the row. */
  names?: boolean;
}

export interface DataTableProps<Row> {
  /** Says what the table holds; read out, and shown when `showCaption`. */
  caption: string;
  showCaption?: boolean;
  columns: readonly DataColumn<Row>[];
  rows: readonly Row[];
  rowKey: (row: Row) => string;
  /** Shown instead of an empty body. */
  empty?: ReactNode;
}

/** A plain table from column data, for lists short enough to be read whole. */
export function DataTable<Row>({ caption, showCaption = false, columns, rows, rowKey, empty }: DataTableProps<Row>) {
  const side = ({ align }: DataColumn<Row>) => (align === 'end' ? 'text-right' : 'text-left');
  return (
    <div className="relative overflow-x-auto" role="region" aria-label={caption} tabIndex={0}>
      <table className="w-full border-collapse">
        <caption className={showCaption ? 'px-3 py-2 text-left font-semibold' : 'sr-only'}>{caption}</caption>
        <thead>
          <tr className="border-b border-line-strong">
            {columns.map((column) => (
              <th key={column.key} scope="col" className={`px-3 py-2 text-sm font-semibold text-ink-soft ${side(column)}`}>
                {column.title}
              </th>
            ))}
          </tr>
        </thead>
        <tbody>
          {rows.map((row) => (
            <tr key={rowKey(row)} className="border-b border-line last:border-b-0 hover:bg-accent-wash">
              {columns.map((column) =>
                column.names === true ? (
                  <th key={column.key} scope="row" className={`px-3 py-2 font-normal ${side(column)}`}>
                    {column.cell(row)}
                  </th>
                ) : (
                  <td key={column.key} className={`px-3 py-2 ${side(column)}`}>
                    {column.cell(row)}
                  </td>
                ),
              )}
            </tr>
          ))}
          {rows.length === 0 && empty !== undefined && (
            <tr>
              <td colSpan={columns.length}>{empty}</td>
            </tr>
          )}
        </tbody>
      </table>
    </div>
  );
}

import type { RingSegment } from '@/components/ui/ring-geometry';
import type { Verdict } from '@/components/ui/verdict-mark';

interface ColumnBase {
  /** Name of the column; also what is sent as `sort`. */
  key: string;
  title: string;
  /** Pixels; a column without takes its share of the rest. */
  width?: number;
  minWidth?: number;
  /** Can be sorted (by the server for lists that grow). */
  sort?: boolean;
}

export interface RingCellValue {
  segments: readonly RingSegment[];
  held?: boolean;
  /** '21/24, next: final penetrant'. */
  text?: string;
}

/** A column as data: what kind of cell it is, and where in the row its value is. */
export type GridColumn<Row> = ColumnBase &
  (
    | { kind: 'text'; value: (row: Row) => string | null }
    | { kind: 'serial'; value: (row: Row) => string | null }
    | { kind: 'count'; value: (row: Row) => number | null }
    | { kind: 'state'; value: (row: Row) => string | null }
    | { kind: 'verdict'; value: (row: Row) => Verdict | null }
    | { kind: 'ring'; value: (row: Row) => RingCellValue }
    | { kind: 'decimal'; unit?: string; places?: number; value: (row: Row) => string | null }
    | { kind: 'when'; to?: 'day' | 'minute'; value: (row: Row) => string | null }
    | { kind: 'link'; value: (row: Row) => { text: string; href: string } | null }
  );

/** The plain text of a cell, for sorting in the browser and for CSV. */
export function cellText<Row>(column: GridColumn<Row>, row: Row): string {
  if (column.kind === 'ring') return column.value(row).text ?? '';
  if (column.kind === 'link') return column.value(row)?.text ?? '';
  if (column.kind === 'count') return String(column.value(row) ?? '');
  return column.value(row) ?? '';
}

/** A spreadsheet would run a text that begins like a formula; an apostrophe keeps it a text. Numbers stay numbers. */
function guarded(text: string): string {
  return /^[=+@\t\r]|^-(?!\d+(\.\d+)?$)/.test(text) ? `'${text}` : text;
}

/** Rows as CSV after RFC 4180, with a header line. */
export function csvOf<Row>(columns: readonly GridColumn<Row>[], rows: readonly Row[]): string {
  const quote = (text: string) => (/[",\r\n]/.test(text) ? `"${text.replaceAll('"', '""')}"` : text);
  const lines = [
    columns.map(({ title }) => title),
    ...rows.map((row) => columns.map((column) => guarded(cellText(column, row)))),
  ];
  return lines.map((cells) => `${cells.map(quote).join(',')}\r\n`).join('');
}

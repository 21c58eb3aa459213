import type { ColDef, ICellRendererParams } from 'ag-grid-community';
import { GridCell } from './grid-cells';
import { cellText } from './grid-columns';
import type { GridColumn } from './grid-columns';

/** Widths in pixels of cells whose content is known; the others share the rest. */
const usualWidths: Partial<Record<GridColumn<unknown>['kind'], number>> = {
  serial: 170,
  count: 110,
  state: 170,
  verdict: 170,
  decimal: 140,
  when: 230,
};

function compare(one: string | null | undefined, other: string | null | undefined): number {
  return (one ?? '').localeCompare(other ?? '', 'en', { numeric: true });
}

/** AG Grid's column definitions from our column data. */
export function columnDefinitions<Row>(
  columns: readonly GridColumn<Row>[],
  hrefOf: ((row: Row) => string) | undefined,
): ColDef<Row, string>[] {
  return columns.map((column) => {
    const width = column.width ?? usualWidths[column.kind];
    const right = column.kind === 'decimal' || column.kind === 'count';
    return {
      colId: column.key,
      headerName: column.title,
      sortable: column.sort === true,
      resizable: true,
      suppressMovable: true,
      comparator: compare,
      ...(width === undefined ? { flex: 1 } : { width }),
      minWidth: column.minWidth ?? Math.min(width ?? 160, 160),
      cellClass: right ? 'text-right' : '',
      headerClass: right ? 'ag-right-aligned-header' : '',
      valueGetter: ({ data }) => (data === undefined ? '' : cellText(column, data)),
      cellRenderer: ({ data }: ICellRendererParams<Row, string>) => (
        <GridCell column={column} row={data} href={data === undefined ? undefined : hrefOf?.(data)} />
      ),
    };
  });
}

'use client';

import {
  CellStyleModule,
  ClientSideRowModelModule,
  InfiniteRowModelModule,
  LocaleModule,
  ModuleRegistry,
  RenderApiModule,
} from 'ag-grid-community';
import type { CellKeyDownEvent, GridReadyEvent, IDatasource, RowClickedEvent } from 'ag-grid-community';
import { AgGridReact } from 'ag-grid-react';
import { useRouter } from 'next/navigation';
import { useMemo, useState } from 'react';
import type { ReactNode } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf } from '@/components/ui/problem';
import type { Problem } from '@/components/ui/problem';
import { columnDefinitions } from './column-definitions';
import type { GridColumn } from './grid-columns';
import { gridTheme } from './grid-theme';
import { KeysetSource, pageUrl } from './keyset-source';
import type { KeysetPage } from './keyset-source';

ModuleRegistry.registerModules([
  CellStyleModule,
  ClientSideRowModelModule,
  InfiniteRowModelModule,
  LocaleModule,
  RenderApiModule,
]);

export type GridSource<Row> =
  /** A small set, already here: sorted in the browser. */
  | { kind: 'rows'; rows: Row[] }
  /** A list of the API with its filters in the address; pages, and sorts by `sort=key` or `sort=-key`, on the server. */
  | { kind: 'keyset'; url: string; pageRows?: number };

export interface DataGridProps<Row> {
  label: string;
  columns: readonly GridColumn<Row>[];
  source: GridSource<Row>;
  rowId: (row: Row) => string;
  /** Where a row leads: click or Enter opens it, with Ctrl beside this page. */
  hrefOf?: (row: Row) => string;
  /** Shown instead of the table when there is nothing in it. */
  empty: ReactNode;
  /** CSS height for lists that scroll inside; a small set is as high as its rows. */
  height?: string;
}

type Outcome = { kind: 'some' } | { kind: 'none' } | { kind: 'refused'; problem: Problem };

/** A table of records. Row click opens, Ctrl-click opens beside, Enter does the same from the keyboard. */
export function DataGrid<Row>({ source, empty, ...rest }: DataGridProps<Row>) {
  const t = useMessages('grids');
  const [attempt, setAttempt] = useState(0);
  const [refusal, setRefusal] = useState<{ url: string; outcome: Outcome } | undefined>(undefined);
  const url = source.kind === 'keyset' ? source.url : '';
  const outcome =
    source.kind === 'rows' ? (source.rows.length === 0 ? 'none' : 'some') : refusal?.url === url ? refusal.outcome.kind : 'some';
  if (outcome === 'none') return <div className="rounded border border-line bg-raised">{empty}</div>;
  if (outcome === 'refused' && refusal?.outcome.kind === 'refused') {
    return (
      <ProblemNotice
        problem={refusal.outcome.problem}
        actions={
          <Button
            onClick={() => {
              setRefusal(undefined);
              setAttempt(attempt + 1);
            }}
          >
            {t('again')}
          </Button>
        }
      />
    );
  }
  return (
    <GridBody key={`${url}#${attempt}`} source={source} onOutcome={(answer) => setRefusal({ url, outcome: answer })} {...rest} />
  );
}

type BodyProps<Row> = Omit<DataGridProps<Row>, 'empty'> & { onOutcome: (outcome: Outcome) => void };

function GridBody<Row>({ label, columns, source, rowId, hrefOf, height, onOutcome }: BodyProps<Row>) {
  const t = useMessages('grids');
  const router = useRouter();
  const { nonce } = useWorkstation();
  const definitions = useMemo(() => columnDefinitions(columns, hrefOf), [columns, hrefOf]);
  const [datasource] = useState(() =>
    source.kind === 'keyset' ? keysetDatasource<Row>(source.url, source.pageRows ?? 50, onOutcome) : undefined,
  );
  const open = (row: Row | undefined, beside: boolean) => {
    const href = row === undefined ? undefined : hrefOf?.(row);
    if (href === undefined) return;
    if (beside) window.open(href, '_blank', 'noopener');
    else router.push(href);
  };
  const onRowClicked = ({ data, event }: RowClickedEvent<Row>) => {
    // A real link in the cell has already been followed.
    if (event?.target instanceof Element && event.target.closest('a, button')) return;
    if (window.getSelection()?.type === 'Range') return;
    open(data, event instanceof MouseEvent && (event.ctrlKey || event.metaKey));
  };
  const onCellKeyDown = (happened: { event?: Event | null; data?: Row | undefined }) => {
    if (happened.event instanceof KeyboardEvent && happened.event.key === 'Enter')
      open(happened.data, happened.event.ctrlKey || happened.event.metaKey);
  };
  const few = source.kind === 'rows' && source.rows.length <= 15 && height === undefined;
  return (
    <div
      className={hrefOf ? '[&_.ag-row]:cursor-pointer' : ''}
      style={few ? undefined : { height: height ?? 'max(20rem, calc(100dvh - 17rem))' }}
    >
      <AgGridReact<Row>
        theme={gridTheme}
        styleNonce={nonce}
        columnDefs={definitions}
        getRowId={({ data }) => rowId(data)}
        localeText={{ loadingOoo: t('loading'), noRowsToShow: t('none'), ariaSortableColumn: t('sortable') }}
        onGridReady={({ api }: GridReadyEvent<Row>) => api.setGridAriaProperty('label', label)}
        onRowClicked={onRowClicked}
        onCellKeyDown={(event: CellKeyDownEvent<Row> | object) => onCellKeyDown(event)}
        domLayout={few ? 'autoHeight' : 'normal'}
        animateRows={false}
        suppressColumnMoveAnimation
        enableCellTextSelection
        ensureDomOrder
        suppressDragLeaveHidesColumns
        {...(source.kind === 'rows'
          ? { rowModelType: 'clientSide' as const, rowData: source.rows }
          : {
              rowModelType: 'infinite' as const,
              datasource,
              cacheBlockSize: source.pageRows ?? 50,
              maxConcurrentDatasourceRequests: 1,
              infiniteInitialRowCount: 20,
            })}
      />
    </div>
  );
}

/** The grid's wish for rows from–to, answered out of a keyset list. A new sort starts a new walk. */
function keysetDatasource<Row>(url: string, pageRows: number, onOutcome: (outcome: Outcome) => void): IDatasource {
  let sorted: string | undefined;
  const walk = (sort: string | undefined) =>
    new KeysetSource<Row>(
      (limit, after) => sendJson<KeysetPage<Row>>(pageUrl(url, limit, after, sort), { method: 'GET' }),
      pageRows,
    );
  let source = walk(undefined);
  return {
    getRows: ({ startRow, sortModel, successCallback, failCallback }) => {
      const [first] = sortModel;
      const sort = first === undefined ? undefined : `${first.sort === 'desc' ? '-' : ''}${first.colId}`;
      if (sort !== sorted) {
        sorted = sort;
        source = walk(sort);
      }
      source.page(startRow).then(
        ({ rows, lastRow }) => {
          successCallback(rows, lastRow);
          if (lastRow === 0) onOutcome({ kind: 'none' });
        },
        (failure: unknown) => {
          failCallback();
          onOutcome({ kind: 'refused', problem: problemOf(failure) });
        },
      );
    },
  };
}

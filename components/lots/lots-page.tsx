'use client';

import { useMemo, useState } from 'react';
import { DataGrid } from '@/components/grids/data-grid';
import type { GridColumn } from '@/components/grids/grid-columns';
import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { PageHeader } from '@/components/ui/page-header';
import { lotKind, type Lot } from '@/services/contracts/parts';
import { NewLotForm } from './new-lot-form';

type Row = Omit<Lot, 'parents' | 'children'>;

function useColumns(): GridColumn<Row>[] {
  const t = useMessages('lots');
  return useMemo(
    () => [
      { key: 'number', title: t('number'), kind: 'serial', width: 220, value: (row) => row.number },
      { key: 'kind', title: t('kind'), kind: 'text', value: (row) => t(`kinds.${row.kind}`) },
      { key: 'quantity', title: t('quantity'), kind: 'count', value: (row) => row.quantity },
      { key: 'parts', title: t('parts'), kind: 'count', width: 190, value: (row) => row.partCount },
      { key: 'state', title: t('state'), kind: 'state', value: (row) => (row.held ? 'held' : t('free')) },
      { key: 'created', title: t('created'), kind: 'when', value: (row) => row.createdAt },
    ],
    [t],
  );
}

const hrefOf = (row: Row) => `/lots/${row.id}`;
const rowId = (row: Row) => row.id;

/** Find lots: server-paged, with the filters in the address; and enter one. */
export function LotsPage({ mayEnter }: { mayEnter: boolean }) {
  const t = useMessages('lots');
  const columns = useColumns();
  const { filters, set, reset, query, filtered } = useUrlFilters(['number', 'kind'] as const);
  const [entering, setEntering] = useState(false);
  return (
    <div className="flex h-full flex-col gap-4">
      <PageHeader
        title={t('title')}
        subtitle={t('subtitle')}
        actions={mayEnter ? <Button onClick={() => setEntering(true)}>{t('newLot')}</Button> : undefined}
      />
      <Dialog open={entering} onClose={() => setEntering(false)} title={t('newLot')} width="wide">
        <NewLotForm />
      </Dialog>
      <div className="flex flex-wrap items-end gap-4">
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('find')}</span>
          <input className="field font-mono" value={filters.number} onChange={(event) => set({ number: event.target.value })} />
        </label>
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('kind')}</span>
          <select className="field" value={filters.kind} onChange={(event) => set({ kind: event.target.value })}>
            <option value="">{t('allKinds')}</option>
            {lotKind.options.map((kind) => (
              <option key={kind} value={kind}>
                {t(`kinds.${kind}`)}
              </option>
            ))}
          </select>
        </label>
        {filtered ? <Button onClick={reset}>{t('clear')}</Button> : null}
      </div>
      <DataGrid
        label={t('title')}
        columns={columns}
        source={{ kind: 'keyset', url: query === '' ? '/api/lots' : `/api/lots?${query}` }}
        rowId={rowId}
        hrefOf={hrefOf}
        empty={<EmptyState title={t('empty')}>{t('emptyHint')}</EmptyState>}
      />
    </div>
  );
}

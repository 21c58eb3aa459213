'use client';

import { useMemo } from 'react';
import { DataGrid } from '@/components/grids/data-grid';
import type { GridColumn } from '@/components/grids/grid-columns';
import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageHeader } from '@/components/ui/page-header';
import type { PartSummary } from '@/services/contracts/parts';

const filterNames = ['serial', 'state', 'findings', 'partNumber', 'cluster', 'held'] as const;
const states = ['serialised', 'in-process', 'finished', 'released', 'scrapped'] as const;

function useColumns(): GridColumn<PartSummary>[] {
  const t = useMessages('parts');
  return useMemo(
    () => [
      { key: 'serial', title: t('serial'), kind: 'serial', width: 130, value: (row) => row.serial },
      {
        key: 'partNumber',
        title: t('partNumber'),
        kind: 'text',
        width: 220,
        value: (row) => `${row.partNumber} ${row.revision}`,
      },
      {
        key: 'ring',
        title: t('ring'),
        kind: 'ring',
        minWidth: 300,
        value: (row) => ({
          segments: row.ring,
          held: row.held,
          text:
            row.next === null
              ? t('done', { met: row.met, required: row.required })
              : t('next', { met: row.met, required: row.required, next: row.next }),
        }),
      },
      { key: 'state', title: t('state'), kind: 'state', width: 170, value: (row) => (row.held ? 'held' : row.state) },
      { key: 'cluster', title: t('cluster'), kind: 'text', width: 140, value: (row) => row.cluster },
      { key: 'customer', title: t('customer'), kind: 'text', width: 180, value: (row) => row.customer },
    ],
    [t],
  );
}

const hrefOf = (row: PartSummary) => `/parts/${row.id}`;
const rowId = (row: PartSummary) => row.id;

/** Find parts: server-paged, with the filters in the address. */
export function PartsPage() {
  const t = useMessages('parts');
  const columns = useColumns();
  const { filters, set, reset, query, filtered } = useUrlFilters(filterNames);
  return (
    <div className="flex h-full flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <div className="flex flex-wrap items-end gap-4">
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('find')}</span>
          <input className="field font-mono" value={filters.serial} onChange={(event) => set({ serial: event.target.value })} />
        </label>
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('state')}</span>
          <select className="field" value={filters.state} onChange={(event) => set({ state: event.target.value })}>
            <option value="">{t('allStates')}</option>
            {states.map((state) => (
              <option key={state} value={state}>
                {state}
              </option>
            ))}
          </select>
        </label>
        <label className="flex items-center gap-2 py-2">
          <input
            type="checkbox"
            checked={filters.findings === 'open'}
            onChange={(event) => set({ findings: event.target.checked ? 'open' : '' })}
          />
          {t('onlyFindings')}
        </label>
        {filtered ? <Button onClick={reset}>{t('clear')}</Button> : null}
      </div>
      <DataGrid
        label={t('title')}
        columns={columns}
        source={{ kind: 'keyset', url: query === '' ? '/api/parts' : `/api/parts?${query}` }}
        rowId={rowId}
        hrefOf={hrefOf}
        empty={<EmptyState title={t('empty')} />}
        height="calc(100vh - 17rem)"
      />
    </div>
  );
}

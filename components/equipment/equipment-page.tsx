'use client';

import Link from 'next/link';
import { useState } from 'react';
import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useMethodWords } from '@/components/personnel/method-words';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { Toolbar } from '@/components/ui/toolbar';
import { When } from '@/components/ui/when';
import { method } from '@/services/contracts/common';
import type { EquipmentHead } from '@/services/contracts/equipment';
import { AddEquipmentForm } from './add-equipment-form';
import { EquipmentState } from './equipment-state';

function useColumns(): DataColumn<EquipmentHead>[] {
  const t = useMessages('equipment');
  const methodWords = useMethodWords();
  return [
    {
      key: 'number',
      title: t('number'),
      names: true,
      cell: ({ id, number, title }) => (
        <>
          <Link
            className="font-mono font-semibold whitespace-nowrap text-accent underline underline-offset-4"
            href={`/equipment/${id}`}
          >
            {number}
          </Link>
          <span className="block">{title}</span>
        </>
      ),
    },
    { key: 'state', title: t('state'), cell: ({ state }) => <EquipmentState state={state} /> },
    {
      key: 'due',
      title: t('due'),
      cell: ({ dueOn }) => (
        <span className="whitespace-nowrap tabular-nums">
          <When at={dueOn} />
        </span>
      ),
    },
    { key: 'method', title: t('method'), cell: (row) => methodWords(row.method) },
    { key: 'kind', title: t('kind'), cell: ({ kind }) => <span className="font-mono">{kind}</span> },
    { key: 'location', title: t('location'), cell: ({ location }) => location ?? '–' },
    {
      key: 'suspects',
      title: t('suspects'),
      cell: ({ openSuspects }) =>
        openSuspects === 0 ? '–' : <span className="font-semibold text-held">{t('openSuspects', { count: openSuspects })}</span>,
    },
  ];
}

/** All equipment: what does not count, or lapses soonest, first. */
export function EquipmentPage({ mayKeep }: { mayKeep: boolean }) {
  const t = useMessages('equipment');
  const methodWords = useMethodWords();
  const [entering, setEntering] = useState(false);
  const { filters, set } = useUrlFilters(['number', 'method', 'show'] as const);
  const find = filters.number === '' ? '' : `&number=${encodeURIComponent(filters.number)}`;
  const query = `${find}${filters.method === '' ? '' : `&method=${filters.method}`}${filters.show === 'all' ? '' : '&retired=false'}`;
  const { rows, problem, more, busy, renew } = useKeysetList<EquipmentHead>(`/api/equipment?limit=100${query}`);
  const columns = useColumns();
  const enter = (
    <Button kind="primary" onClick={() => setEntering(true)}>
      {t('add')}
    </Button>
  );
  return (
    <>
      <PageHeader title={t('title')} subtitle={t('subtitle')} actions={mayKeep ? enter : undefined} />
      <Toolbar label={t('show')}>
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('find')}</span>
          <input className="field font-mono" value={filters.number} onChange={(event) => set({ number: event.target.value })} />
        </label>
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('method')}</span>
          <select className="field" value={filters.method} onChange={(event) => set({ method: event.target.value })}>
            <option value="">{t('allMethods')}</option>
            {method.options.map((one) => (
              <option key={one} value={one}>
                {methodWords(one)}
              </option>
            ))}
          </select>
        </label>
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('show')}</span>
          <select className="field" value={filters.show} onChange={(event) => set({ show: event.target.value })}>
            <option value="">{t('inUse')}</option>
            <option value="all">{t('all')}</option>
          </select>
        </label>
      </Toolbar>
      {problem ? <ProblemNotice problem={problem} /> : null}
      <Panel flush>
        {rows ? (
          <DataTable
            caption={t('title')}
            rows={rows}
            rowKey={({ id }) => id}
            columns={columns}
            empty={<EmptyState title={t('none')}>{t('noneHint')}</EmptyState>}
          />
        ) : problem ? null : (
          <Skeleton lines={6} />
        )}
      </Panel>
      {more ? (
        <div className="mt-3">
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
      <Dialog open={entering} onClose={() => setEntering(false)} title={t('add')}>
        <AddEquipmentForm onAdded={() => void renew()} />
      </Dialog>
    </>
  );
}

'use client';

import Link from 'next/link';
import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { BasketSummary } from '@/services/contracts/baskets';
import { OpenBasketForm } from './open-basket-form';

function useColumns(): DataColumn<BasketSummary>[] {
  const t = useMessages('baskets');
  const shapes = { open: 'half-disc', signed: 'closed', closed: 'cross' } as const;
  const tones = { open: 'accent', signed: 'accept', closed: 'soft' } as const;
  return [
    {
      key: 'number',
      title: t('number'),
      names: true,
      cell: (row) => (
        <Link className="font-mono whitespace-nowrap text-accent underline underline-offset-4" href={`/baskets/${row.id}`}>
          {row.number}
        </Link>
      ),
    },
    {
      key: 'operation',
      title: t('operation'),
      cell: ({ requirement, line }) => `${requirement.operation} ${requirement.title}${line === null ? '' : `, ${line}`}`,
    },
    { key: 'part', title: t('part'), cell: (row) => <span className="font-mono">{row.partNumber}</span> },
    { key: 'evaluator', title: t('evaluator'), cell: (row) => row.evaluator.name },
    {
      key: 'counts',
      title: t('counts'),
      align: 'end',
      cell: ({ counts }) => (
        <span className="font-mono tabular-nums">{`${String(counts.in)} / ${String(counts.scanned)} / ${String(counts.out)}`}</span>
      ),
    },
    { key: 'opened', title: t('opened'), cell: (row) => <When at={row.openedAt} /> },
    {
      key: 'state',
      title: t('state'),
      cell: (row) => (
        <StateWord state={row.state} word={t(`states.${row.state}`)} glyph={shapes[row.state]} tone={tones[row.state]} />
      ),
    },
  ];
}

const queries = { '': '&state=open', mine: '&mine=true', all: '' } as const;

/** Baskets in work and signed; whoever inspects opens one from a scan. */
export function BasketsPage({ me, mayInspect }: { me: { readonly id: string }; mayInspect: boolean }) {
  const t = useMessages('baskets');
  const { filters, set } = useUrlFilters(['show'] as const);
  const query = filters.show === 'all' || filters.show === 'mine' ? queries[filters.show] : queries[''];
  const { rows, problem, more, busy } = useKeysetList<BasketSummary>(`/api/baskets?limit=50${query}`);
  const columns = useColumns();
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      {mayInspect ? <OpenBasketForm me={me.id} /> : null}
      <label className="flex max-w-64 flex-col gap-1">
        <span className="font-semibold">{t('show')}</span>
        <select className="field" value={filters.show} onChange={(event) => set({ show: event.target.value })}>
          <option value="">{t('showOpen')}</option>
          <option value="mine">{t('showMine')}</option>
          <option value="all">{t('showAll')}</option>
        </select>
      </label>
      {problem ? <ProblemNotice problem={problem} /> : null}
      {rows ? (
        <DataTable
          caption={t('title')}
          rows={rows}
          rowKey={(row) => row.id}
          columns={columns}
          empty={<EmptyState title={t('empty')}>{t('emptyHint')}</EmptyState>}
        />
      ) : problem ? null : (
        <Skeleton lines={6} />
      )}
      {more ? (
        <div>
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
    </div>
  );
}

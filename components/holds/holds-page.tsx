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
import { When } from '@/components/ui/when';
import type { Hold } from '@/services/contracts/parts';
import { RecallList } from './hold-dialog';
import { LiftDialog } from './lift-dialog';

function useColumns(mayLift: boolean, onLifted: () => void): DataColumn<Hold>[] {
  const t = useMessages('holds');
  return [
    {
      key: 'number',
      title: t('number'),
      names: true,
      cell: (row) => <span className="font-mono whitespace-nowrap">{row.number}</span>,
    },
    {
      key: 'target',
      title: t('target'),
      cell: ({ target }) => (
        <Link className="text-accent underline underline-offset-4" href={`/${target.kind}s/${target.id}`}>
          {target.name}
        </Link>
      ),
    },
    { key: 'reason', title: t('reason'), cell: (row) => row.reason },
    {
      key: 'placed',
      title: t('placed'),
      cell: (row) => (
        <>
          <When at={row.placedAt} /> {row.placedBy}
        </>
      ),
    },
    { key: 'reached', title: t('reached'), align: 'end', cell: (row) => row.held },
    { key: 'recall', title: t('recall'), cell: (row) => (row.recall.length === 0 ? '–' : <RecallList hold={row} />) },
    {
      key: 'lifted',
      title: t('lifted'),
      cell: (row) =>
        row.liftedAt === null ? (
          mayLift ? (
            <LiftDialog hold={row} onLifted={onLifted} />
          ) : (
            '–'
          )
        ) : (
          <>
            <When at={row.liftedAt} /> {row.liftedBy}: {row.liftedReason}
          </>
        ),
    },
  ];
}

/** Holds, open ones first seen; reviewers lift them. */
export function HoldsPage({ mayLift }: { mayLift: boolean }) {
  const t = useMessages('holds');
  const { filters, set } = useUrlFilters(['show'] as const);
  const open = filters.show === 'all' ? '' : filters.show === 'lifted' ? '&open=false' : '&open=true';
  const { rows, problem, more, busy, renew } = useKeysetList<Hold>(`/api/holds?limit=50${open}`);
  const columns = useColumns(mayLift, () => void renew());
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <label className="flex max-w-64 flex-col gap-1">
        <span className="font-semibold">{t('show')}</span>
        <select className="field" value={filters.show} onChange={(event) => set({ show: event.target.value })}>
          <option value="">{t('onlyOpen')}</option>
          <option value="lifted">{t('onlyLifted')}</option>
          <option value="all">{t('all')}</option>
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

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
import type { RunSummary } from '@/services/contracts/runs';
import { EnterRunForm } from './enter-run-form';
import { StandingWord } from './standing-word';

function useColumns(): DataColumn<RunSummary>[] {
  const t = useMessages('runs');
  return [
    {
      key: 'number',
      title: t('number'),
      names: true,
      cell: (row) => (
        <Link className="font-mono whitespace-nowrap text-accent underline underline-offset-4" href={`/runs/${row.id}`}>
          {row.number}
        </Link>
      ),
    },
    { key: 'kind', title: t('kind'), cell: (row) => t(`kinds.${row.kind}`) },
    { key: 'technique', title: t('technique'), cell: (row) => <span className="font-mono">{row.technique}</span> },
    { key: 'line', title: t('line'), cell: (row) => row.line ?? '–' },
    { key: 'parts', title: t('parts'), align: 'end', cell: (row) => row.parts },
    { key: 'standing', title: t('standing'), cell: (row) => <StandingWord standing={row.standing} /> },
    {
      key: 'entered',
      title: t('entered'),
      cell: (row) => (
        <>
          <When at={row.enteredAt} /> {row.enteredBy}
        </>
      ),
    },
  ];
}

/** Runs, newest first; whoever inspects enters one. */
export function RunsPage({ me, mayInspect }: { me: { readonly id: string }; mayInspect: boolean }) {
  const t = useMessages('runs');
  const { filters, set } = useUrlFilters(['standing'] as const);
  const query = filters.standing === 'void' || filters.standing === 'incomplete' ? `&standing=${filters.standing}` : '';
  const { rows, problem, more, busy } = useKeysetList<RunSummary>(`/api/runs?limit=50${query}`);
  const columns = useColumns();
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      {mayInspect ? <EnterRunForm me={me.id} /> : null}
      <label className="flex max-w-64 flex-col gap-1">
        <span className="font-semibold">{t('show')}</span>
        <select className="field" value={filters.standing} onChange={(event) => set({ standing: event.target.value })}>
          <option value="">{t('all')}</option>
          <option value="void">{t('onlyVoid')}</option>
          <option value="incomplete">{t('onlyIncomplete')}</option>
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

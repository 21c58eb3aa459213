'use client';

import Link from 'next/link';
import { useRouter } from 'next/navigation';
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
import type { TechniqueHead } from '@/services/contracts/techniques';
import { TechniqueForm } from './technique-form';
import { TechniqueState } from './technique-state';

function useColumns(): DataColumn<TechniqueHead>[] {
  const t = useMessages('techniques');
  const methodWords = useMethodWords();
  return [
    {
      key: 'number',
      title: t('number'),
      names: true,
      cell: ({ id, number, issue }) => (
        <Link className="whitespace-nowrap text-accent underline underline-offset-4" href={`/techniques/${id}`}>
          <span className="font-mono font-semibold">{number}</span> {t('issueOf', { issue })}
        </Link>
      ),
    },
    {
      key: 'title',
      title: t('name'),
      cell: ({ title, standard }) => (
        <>
          {title}
          <span className="block text-sm text-ink-soft">{standard}</span>
        </>
      ),
    },
    { key: 'method', title: t('method'), cell: (row) => methodWords(row.method) },
    { key: 'state', title: t('state'), cell: ({ state }) => <TechniqueState state={state} /> },
    { key: 'author', title: t('author'), cell: ({ author }) => author?.name ?? '–' },
    {
      key: 'approved',
      title: t('approvedBy'),
      cell: ({ approved }) =>
        approved ? (
          <>
            {approved.name}
            <span className="block text-sm text-ink-soft">
              <When at={approved.at} to="day" />
            </span>
          </>
        ) : (
          '–'
        ),
    },
  ];
}

/** Technique issues by number, the newest of each first. */
export function TechniquesPage({ mayWrite }: { mayWrite: boolean }) {
  const t = useMessages('techniques');
  const methodWords = useMethodWords();
  const router = useRouter();
  const [writing, setWriting] = useState(false);
  const { filters, set } = useUrlFilters(['method'] as const);
  const query = filters.method === '' ? '' : `&method=${filters.method}`;
  const { rows, problem, more, busy } = useKeysetList<TechniqueHead>(`/api/techniques?limit=100${query}`);
  const columns = useColumns();
  const write = (
    <Button kind="primary" onClick={() => setWriting(true)}>
      {t('write')}
    </Button>
  );
  return (
    <>
      <PageHeader title={t('title')} subtitle={t('subtitle')} actions={mayWrite ? write : undefined} />
      <Toolbar label={t('method')}>
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
      <Dialog open={writing} onClose={() => setWriting(false)} title={t('write')} width="wide">
        <TechniqueForm onSaved={({ id }) => router.push(`/techniques/${id}`)} />
      </Dialog>
    </>
  );
}

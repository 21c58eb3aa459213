'use client';

import Link from 'next/link';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { Check } from '@/services/contracts/checks';
import { CheckState } from './check-words';

function useColumns(): DataColumn<Check>[] {
  const t = useMessages('checks');
  return [
    { key: 'at', title: t('at'), names: true, cell: ({ at }) => <When at={at} /> },
    { key: 'scope', title: t('scope'), cell: ({ scope }) => <span className="font-mono whitespace-nowrap">{scope}</span> },
    {
      key: 'title',
      title: t('check'),
      cell: ({ title, note }) => (
        <>
          {title}
          {note === null ? null : <span className="block text-sm text-ink-soft">{note}</span>}
        </>
      ),
    },
    { key: 'result', title: t('result'), cell: ({ result }) => <CheckState state={result} /> },
    {
      key: 'value',
      title: t('value'),
      align: 'end',
      cell: ({ value, unit }) =>
        value === null ? '–' : <span className="font-mono whitespace-nowrap">{`${value} ${unit ?? ''}`}</span>,
    },
    {
      key: 'until',
      title: t('validUntil'),
      cell: ({ validUntil, result }) => (result === 'good' ? <When at={validUntil} /> : '–'),
    },
    { key: 'by', title: t('by'), cell: ({ doneBy }) => doneBy.name },
    {
      key: 'suspects',
      title: t('suspects'),
      cell: ({ suspects }) =>
        suspects ? (
          <Link
            className="font-mono whitespace-nowrap text-accent underline underline-offset-4"
            href={`/suspects/${suspects.id}`}
          >
            {suspects.number}
          </Link>
        ) : (
          '–'
        ),
    },
  ];
}

/** Checks on record, newest first. */
export function RecentChecks({ turn }: { /** Rises when one was recorded. */ turn: number }) {
  const t = useMessages('checks');
  const { rows, problem, more, busy } = useKeysetList<Check>(`/api/checks?limit=50&turn=${String(turn)}`);
  const columns = useColumns();
  return (
    <Panel title={t('recent')} flush>
      {problem ? <ProblemNotice problem={problem} /> : null}
      {rows ? (
        <DataTable
          caption={t('recent')}
          rows={rows}
          rowKey={({ id }) => id}
          columns={columns}
          empty={<EmptyState title={t('none')}>{t('noneHint')}</EmptyState>}
        />
      ) : problem ? null : (
        <Skeleton lines={4} />
      )}
      {more ? (
        <div className="border-t border-line p-3">
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
    </Panel>
  );
}

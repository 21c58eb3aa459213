'use client';

import Link from 'next/link';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { SuspectListHead } from '@/services/contracts/suspects';

/** Whether a list or group still waits for its decision. */
export function DecisionState({ state }: { state: 'open' | 'closed' }) {
  const t = useMessages('suspects');
  return state === 'open' ? (
    <StateWord state="held" word={t('openState')} />
  ) : (
    <StateWord state="closed" word={t('closedState')} />
  );
}

function useColumns(): DataColumn<SuspectListHead>[] {
  const t = useMessages('suspects');
  return [
    {
      key: 'number',
      title: t('number'),
      names: true,
      cell: ({ id, number }) => (
        <Link
          className="font-mono font-semibold whitespace-nowrap text-accent underline underline-offset-4"
          href={`/suspects/${id}`}
        >
          {number}
        </Link>
      ),
    },
    { key: 'state', title: t('state'), cell: ({ state }) => <DecisionState state={state} /> },
    {
      key: 'named',
      title: t('named'),
      cell: ({ named, reason, cause }) => (
        <>
          <span className="block font-semibold">
            {named} <span className="font-normal text-ink-soft">{t(`causes.${cause}`)}</span>
          </span>
          <span className="block text-sm">{reason}</span>
        </>
      ),
    },
    { key: 'inspections', title: t('inspections'), align: 'end', cell: ({ inspections }) => inspections },
    { key: 'held', title: t('held'), align: 'end', cell: ({ held }) => held },
    { key: 'recall', title: t('recall'), align: 'end', cell: ({ recall }) => recall },
    {
      key: 'opened',
      title: t('opened'),
      cell: ({ openedAt, openedBy }) => (
        <>
          <When at={openedAt} />
          <span className="block text-sm text-ink-soft">{openedBy.name}</span>
        </>
      ),
    },
  ];
}

/** Suspect lists, newest first. `query` narrows them, such as `open=true`. */
export function SuspectListsTable({ query }: { query: string }) {
  const t = useMessages('suspects');
  const { rows, problem, more, busy } = useKeysetList<SuspectListHead>(
    `/api/suspects?limit=50${query === '' ? '' : `&${query}`}`,
  );
  const columns = useColumns();
  if (problem) return <ProblemNotice problem={problem} />;
  if (!rows) return <Skeleton lines={3} />;
  return (
    <>
      <DataTable
        caption={t('title')}
        rows={rows}
        rowKey={({ id }) => id}
        columns={columns}
        empty={<EmptyState title={t('empty')}>{t('emptyHint')}</EmptyState>}
      />
      {more ? (
        <div className="border-t border-line p-3">
          <Button busy={busy} onClick={more}>
            {t('more')}
          </Button>
        </div>
      ) : null}
    </>
  );
}

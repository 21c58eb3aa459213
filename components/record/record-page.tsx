'use client';

import Link from 'next/link';
import { useMessages, useSentences } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Digest } from '@/components/ui/digest';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { JournalEvent } from '@/services/contracts/trace';
import { useKeysetList } from './use-keyset-list';

const pages: Readonly<Record<string, string>> = { part: '/trace', lot: '/lots', inspection: '/inspections' };

function detailsOf(event: JournalEvent): string {
  return Object.entries(event.details)
    .filter(([name, value]) => !/digest|sha256/i.test(name) && ['string', 'number', 'boolean'].includes(typeof value))
    .map(([name, value]) => `${name} ${String(value)}`)
    .join(', ');
}

/** The journal of every change, newest first. */
export function RecordPage() {
  const t = useMessages('record');
  const kindWords = useSentences('record');
  const { rows, problem, more, busy } = useKeysetList<JournalEvent>('/api/record?limit=100');
  if (problem) return <ProblemNotice problem={problem} />;
  if (!rows) return <Skeleton lines={10} />;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <DataTable
        caption={t('title')}
        rows={rows}
        rowKey={(row) => row.id}
        empty={<EmptyState title={t('empty')} />}
        columns={[
          { key: 'seq', title: '#', align: 'end', cell: (row) => <span className="font-mono">{row.seq}</span> },
          { key: 'at', title: t('at'), cell: (row) => <When at={row.at} to="second" /> },
          { key: 'kind', title: t('what'), names: true, cell: (row) => kindWords(`kinds.${row.kind}`) },
          { key: 'actor', title: t('who'), cell: (row) => row.actor?.name ?? t('product') },
          {
            key: 'subject',
            title: t('about'),
            cell: ({ subject }) => {
              const page = pages[subject.kind];
              return page === undefined ? (
                subject.kind
              ) : (
                <Link className="text-accent underline underline-offset-4" href={`${page}/${subject.id}`}>
                  {subject.kind}
                </Link>
              );
            },
          },
          {
            key: 'details',
            title: t('details'),
            cell: (row) => <span className="block max-w-prose min-w-64 break-words">{detailsOf(row)}</span>,
          },
          { key: 'digest', title: t('digest'), cell: (row) => <Digest value={row.digest} /> },
        ]}
      />
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

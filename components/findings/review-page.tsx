'use client';

import Link from 'next/link';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { FindingSummary } from '@/services/contracts/findings';

/** Findings that need judgement or follow-up. */
export function ReviewPage() {
  const t = useMessages('findings');
  const { answer, problem } = useAnswer<{ items: FindingSummary[] }>('/api/findings?limit=200');
  if (problem) return <ProblemNotice problem={problem} />;
  if (!answer) return <Skeleton lines={6} />;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('review')} subtitle={t('subtitle')} />
      <DataTable
        caption={t('review')}
        rows={answer.items}
        rowKey={(row) => row.number}
        empty={<EmptyState title={t('empty')} />}
        columns={[
          {
            key: 'number',
            title: t('number'),
            names: true,
            cell: (row) => (
              <Link href={`/findings/${row.number}`} className="font-mono text-accent underline underline-offset-4">
                {row.number}
              </Link>
            ),
          },
          { key: 'serial', title: t('serial'), cell: (row) => <span className="font-mono">{row.part.serial}</span> },
          { key: 'operation', title: t('operation'), cell: (row) => `${row.requirement.operation} ${row.requirement.title}` },
          { key: 'summary', title: t('summary'), cell: (row) => row.summary },
          { key: 'state', title: t('state'), cell: (row) => <StateWord state={row.state} /> },
          { key: 'opened', title: t('opened'), cell: (row) => <When at={row.openedAt} /> },
        ]}
      />
    </div>
  );
}

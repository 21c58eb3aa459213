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
import type { CertificateSummary } from '@/services/contracts/certificates';

/** Certificates this person may see. */
export function CertificatesPage() {
  const t = useMessages('certificates');
  const { answer, problem } = useAnswer<{ items: CertificateSummary[] }>('/api/certificates?limit=200');
  if (problem) return <ProblemNotice problem={problem} />;
  if (!answer) return <Skeleton lines={6} />;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <DataTable
        caption={t('title')}
        rows={answer.items}
        rowKey={(row) => row.number}
        empty={<EmptyState title={t('empty')} />}
        columns={[
          {
            key: 'number',
            title: t('number'),
            names: true,
            cell: (row) => (
              <Link href={`/certificates/${row.number}`} className="font-mono text-accent underline underline-offset-4">
                {row.number}
              </Link>
            ),
          },
          { key: 'customer', title: t('customer'), cell: (row) => row.customer },
          { key: 'order', title: t('order'), cell: (row) => row.purchaseOrder },
          { key: 'part', title: t('part'), cell: (row) => row.partNumber },
          { key: 'quantity', title: t('quantity'), align: 'end', cell: (row) => row.quantity },
          { key: 'state', title: t('state'), cell: (row) => <StateWord state={row.state} /> },
          { key: 'signed', title: t('signed'), cell: (row) => <When at={row.signedAt} /> },
        ]}
      />
    </div>
  );
}

'use client';

import { PageTurner, usePageTrail } from '@/components/accounts/page-trail';
import { useMessages } from '@/components/theme/use-messages';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { VisionTest } from '@/services/contracts/personnel';

/** The last vision tests of each person, with the day to which each counts. */
export function VisionPanel({ turn }: { /** Rises when a new one was recorded. */ turn: number }) {
  const t = useMessages('personnel');
  const rows = usePageTrail<VisionTest>(`/api/vision-tests?newest=true&limit=100&turn=${String(turn)}`);
  return (
    <Panel title={t('vision')} subtitle={t('visionSubtitle')} flush>
      {rows.problem ? <ProblemNotice problem={rows.problem} /> : null}
      {rows.answer ? (
        <DataTable
          caption={t('vision')}
          rows={rows.answer.items}
          rowKey={(row) => row.id}
          empty={<EmptyState title={t('noVision')} />}
          columns={[
            {
              key: 'person',
              title: t('person'),
              names: true,
              cell: (row) => <span className="font-semibold">{row.person.name}</span>,
            },
            { key: 'test', title: t('test'), cell: (row) => t(`tests.${row.test}`) },
            {
              key: 'result',
              title: t('result'),
              cell: (row) => (
                <>
                  {t(`results.${row.result}`)}
                  {row.corrected ? <span className="block text-sm text-ink-soft">{t('corrected')}</span> : null}
                </>
              ),
            },
            { key: 'tested', title: t('testedOn'), cell: (row) => <When at={row.testedOn} /> },
            { key: 'counts', title: t('countsTo'), cell: (row) => <When at={row.countsTo} /> },
            {
              key: 'state',
              title: t('state'),
              cell: (row) => <StateWord state={row.state} {...(row.state === 'due-soon' ? { word: t('lapsing') } : {})} />,
            },
          ]}
        />
      ) : (
        <Skeleton lines={4} />
      )}
      <PageTurner forward={rows.forward} back={rows.back} />
    </Panel>
  );
}

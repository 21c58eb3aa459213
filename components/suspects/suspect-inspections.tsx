'use client';

import Link from 'next/link';
import { useKeysetList } from '@/components/record/use-keyset-list';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { SuspectInspection } from '@/services/contracts/suspects';

const link = 'text-accent underline underline-offset-4';

function Certificates({ row: { certificates } }: { row: SuspectInspection }) {
  if (certificates.length === 0) return '–';
  return certificates.map(({ number, customer }) => (
    <span key={number} className="block">
      <Link className={`${link} font-mono whitespace-nowrap`} href={`/certificates/${number}`}>
        {number}
      </Link>{' '}
      {customer}
    </span>
  ));
}

function useColumns(): DataColumn<SuspectInspection>[] {
  const t = useMessages('suspects');
  return [
    {
      key: 'serial',
      title: t('serial'),
      names: true,
      cell: ({ part }) => (
        <Link className={`${link} font-mono font-semibold`} href={`/parts/${part.id}`}>
          {part.serial}
        </Link>
      ),
    },
    { key: 'part', title: t('part'), cell: ({ part }) => <span className="font-mono whitespace-nowrap">{part.partNumber}</span> },
    {
      key: 'state',
      title: t('partState'),
      cell: ({ part }) => (
        <>
          <StateWord state={part.state} />
          {part.held ? (
            <span className="block">
              <StateWord state="held" />
            </span>
          ) : null}
        </>
      ),
    },
    {
      key: 'inspection',
      title: t('inspection'),
      cell: ({ id, number, operation, title }) => (
        <>
          <Link className={`${link} font-mono whitespace-nowrap`} href={`/inspections/${id}`}>
            {number}
          </Link>
          <span className="block text-sm">{`${operation} ${title}`}</span>
        </>
      ),
    },
    { key: 'verdict', title: t('verdict'), cell: ({ verdict }) => <VerdictMark verdict={verdict} /> },
    { key: 'acted', title: t('acted'), cell: ({ actedAt }) => <When at={actedAt} /> },
    { key: 'rests', title: t('rests'), cell: ({ rests }) => (rests ? t('yes') : t('replaced')) },
    { key: 'certificates', title: t('certificates'), cell: (row) => <Certificates row={row} /> },
  ];
}

/** Every signed inspection of a list, gone ones first. */
export function SuspectInspections({ listId, turn }: { listId: string; /** Changes when a decision was made. */ turn: string }) {
  const t = useMessages('suspects');
  const { rows, more, busy } = useKeysetList<SuspectInspection>(`/api/suspects/${listId}?limit=100&turn=${turn}`);
  const columns = useColumns();
  return (
    <Panel title={t('items')} subtitle={t('itemsHint')} flush>
      {rows ? <DataTable caption={t('items')} rows={rows} rowKey={({ id }) => id} columns={columns} /> : <Skeleton lines={5} />}
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

'use client';

import { useState } from 'react';
import { PageTurner, usePageTrail } from '@/components/accounts/page-trail';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Authorisation } from '@/services/contracts/personnel';
import { DecideDialog, type Decision } from './decide-dialog';
import { useMethodWords } from './method-words';

const states = ['prepared', 'due-soon', 'valid', 'not-yet-valid', 'expired', 'withdrawn'] as const;

export interface Reader {
  readonly id: string;
  readonly name: string;
  readonly mayApprove: boolean;
}

const Day = ({ on }: { on: string }) => (
  <span className="whitespace-nowrap">
    <When at={on} />
  </span>
);

function AuthorisationState({ row }: { row: Authorisation }) {
  const t = useMessages('personnel');
  if (row.state === 'prepared') return <StateWord state="prepared" word={t('prepared')} glyph="dotted" tone="unsure" />;
  if (row.state === 'due-soon') return <StateWord state="due-soon" word={t('lapsing')} />;
  return <StateWord state={row.state} />;
}

function Decide({ row, reader, onDecide }: { row: Authorisation; reader: Reader; onDecide: (decision: Decision) => void }) {
  const t = useMessages('personnel');
  const methodWords = useMethodWords();
  const words = { name: row.person.name, method: methodWords(row.method) };
  const grants = row.state === 'prepared' && row.person.id !== reader.id && row.preparedBy?.id !== reader.id;
  if (row.state === 'withdrawn') return <span className="text-ink-soft">{row.withdrawnReason}</span>;
  return (
    <span className="flex flex-wrap gap-2">
      {grants ? (
        <Button kind="primary" aria-label={t('grantOf', words)} onClick={() => onDecide({ kind: 'grant', row })}>
          {t('grant')}
        </Button>
      ) : null}
      {row.state === 'expired' ? null : (
        <Button aria-label={t('withdrawOf', words)} onClick={() => onDecide({ kind: 'withdraw', row })}>
          {t('withdraw')}
        </Button>
      )}
    </span>
  );
}

function useColumns(reader: Reader, onDecide: (decision: Decision) => void): DataColumn<Authorisation>[] {
  const t = useMessages('personnel');
  const methodWords = useMethodWords();
  return [
    { key: 'person', title: t('person'), names: true, cell: (row) => <span className="font-semibold">{row.person.name}</span> },
    {
      key: 'method',
      title: t('method'),
      cell: (row) => (
        <>
          <span className="block">{methodWords(row.method)}</span>
          {row.technique === null ? null : <span className="block font-mono text-sm">{row.technique}</span>}
          {row.products === null ? null : <span className="block text-sm text-ink-soft">{row.products}</span>}
        </>
      ),
    },
    { key: 'level', title: t('level'), cell: (row) => <span className="whitespace-nowrap">{t(`levels.${row.level}`)}</span> },
    { key: 'from', title: t('validFrom'), cell: (row) => <Day on={row.validFrom} /> },
    { key: 'to', title: t('validTo'), cell: (row) => <Day on={row.validTo} /> },
    { key: 'state', title: t('state'), cell: (row) => <AuthorisationState row={row} /> },
    {
      key: 'granted',
      title: t('grantedBy'),
      cell: (row) =>
        row.grantedBy?.name ?? (row.preparedBy ? <span className="text-ink-soft">{t('preparedBy', row.preparedBy)}</span> : '–'),
    },
    ...(reader.mayApprove
      ? [
          {
            key: 'decide',
            title: t('decide'),
            cell: (row: Authorisation) => <Decide row={row} reader={reader} onDecide={onDecide} />,
          },
        ]
      : []),
  ];
}

/** Who may do what until when; a level 3 grants here. */
export function AuthorisationsPanel({
  reader,
  turn,
}: {
  reader: Reader;
  /** Rises when a new one was prepared. */ turn: number;
}) {
  const t = useMessages('personnel');
  const stateWords = useMessages('ui');
  const [state, setState] = useState('');
  const [decision, setDecision] = useState<Decision>();
  const rows = usePageTrail<Authorisation>(
    `/api/authorisations?limit=100&turn=${String(turn)}${state === '' ? '' : `&state=${state}`}`,
  );
  const columns = useColumns(reader, setDecision);
  const wordOf = (one: (typeof states)[number]) =>
    one === 'prepared' ? t('prepared') : one === 'due-soon' ? t('lapsing') : stateWords(`state.${one}`);
  return (
    <Panel
      title={t('authorisations')}
      subtitle={t('authorisationsSubtitle')}
      flush
      actions={
        <label className="flex items-center gap-2">
          <span className="text-ink-soft">{t('state')}</span>
          <select className="field" value={state} onChange={(event) => setState(event.target.value)}>
            <option value="">{t('all')}</option>
            {states.map((one) => (
              <option key={one} value={one}>
                {wordOf(one)}
              </option>
            ))}
          </select>
        </label>
      }
    >
      {rows.problem ? <ProblemNotice problem={rows.problem} /> : null}
      {rows.answer ? (
        <DataTable
          caption={t('authorisations')}
          rows={rows.answer.items}
          rowKey={(row) => row.id}
          columns={columns}
          empty={<EmptyState title={t('none')} />}
        />
      ) : (
        <Skeleton lines={6} />
      )}
      <PageTurner forward={rows.forward} back={rows.back} />
      <DecideDialog
        decision={decision}
        me={reader.name}
        onClose={() => setDecision(undefined)}
        onDone={() => {
          setDecision(undefined);
          void rows.renew();
        }}
      />
    </Panel>
  );
}

'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { OwnAccount } from '@/services/contracts/accounts';
import { browserWords } from './browser-words';

const looks = {
  'signed-in': { glyph: 'closed', tone: 'accept' },
  refused: { glyph: 'cross', tone: 'reject' },
  limited: { glyph: 'cross', tone: 'reject' },
  'signature-refused': { glyph: 'cross', tone: 'unsure' },
} as const;

/** Where the account is signed in now, and the way out of all of it. */
export function SessionsPanel({ sessions }: { sessions: OwnAccount['sessions'] }) {
  const t = useMessages('accounts');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const leave = async () => {
    setBusy(true);
    try {
      await sendJson('/api/session?everywhere=true', { method: 'DELETE' });
      window.location.replace('/sign-in');
    } catch (failure) {
      setProblem(problemOf(failure));
      setBusy(false);
    }
  };
  return (
    <Panel
      title={t('sessions')}
      subtitle={t('everywhereDetail')}
      flush
      actions={
        <Button kind="danger" busy={busy} onClick={() => void leave()}>
          {t('everywhere')}
        </Button>
      }
    >
      {problem ? <ProblemNotice problem={problem} /> : null}
      <DataTable
        caption={t('sessions')}
        rows={sessions}
        rowKey={(row) => row.openedAt}
        columns={[
          { key: 'opened', title: t('openedAt'), names: true, cell: (row) => <When at={row.openedAt} /> },
          { key: 'ends', title: t('endsAt'), cell: (row) => <When at={row.endsAt} /> },
          { key: 'address', title: t('address'), cell: (row) => (row.address === 'direct' ? t('direct') : row.address) },
          {
            key: 'browser',
            title: t('browser'),
            cell: (row) => (
              <span className="block max-w-xs break-words">
                {row.current ? <strong>{t('thisOne')} · </strong> : null}
                {browserWords(row.agent)}
              </span>
            ),
          },
        ]}
      />
    </Panel>
  );
}

/** The last tries to sign in as this person, so that a stranger's are noticed. */
export function SignInsPanel({ signIns }: { signIns: OwnAccount['signIns'] }) {
  const t = useMessages('accounts');
  return (
    <Panel title={t('lastSignIns')} flush>
      <DataTable
        caption={t('lastSignIns')}
        rows={signIns}
        rowKey={(row) => `${row.at} ${row.outcome}`}
        empty={<p className="p-4">{t('none')}</p>}
        columns={[
          { key: 'when', title: t('when'), names: true, cell: (row) => <When at={row.at} to="second" /> },
          {
            key: 'address',
            title: t('address'),
            cell: (row) => (row.address === '' ? '–' : row.address === 'direct' ? t('direct') : row.address),
          },
          {
            key: 'outcome',
            title: t('outcome'),
            cell: (row) => <StateWord state={row.outcome} word={t(`outcomes.${row.outcome}`)} {...looks[row.outcome]} />,
          },
        ]}
      />
    </Panel>
  );
}

'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import { When } from '@/components/ui/when';
import type { MachineToken } from '@/services/contracts/accounts';
import { MachineTokenForm } from './machine-token-form';

/** Tokens of programs: made, seen once, revoked. */
export function MachineTokensPanel() {
  const t = useMessages('accounts');
  const { answer, problem, renew } = useAnswer<{ items: MachineToken[]; mayName: string[] }>('/api/machine-tokens');
  const [making, setMaking] = useState(false);
  const [refusal, setRefusal] = useState<Problem>();
  const revoke = async (id: string) => {
    setRefusal(undefined);
    try {
      await sendJson(`/api/machine-tokens/${id}`, { method: 'DELETE' });
    } catch (failure) {
      setRefusal(problemOf(failure));
    }
    await renew();
  };
  const refused = problem ?? refusal;
  return (
    <Panel
      title={t('tokens')}
      subtitle={t('tokensSubtitle')}
      flush
      actions={<Button onClick={() => setMaking(true)}>{t('newToken')}</Button>}
    >
      {refused ? <ProblemNotice problem={refused} /> : null}
      <DataTable
        caption={t('tokens')}
        rows={answer?.items ?? []}
        rowKey={(row) => row.id}
        empty={<EmptyState title={t('noTokens')} />}
        columns={[
          { key: 'name', title: t('tokenName'), names: true, cell: (row) => row.name },
          {
            key: 'calls',
            title: t('tokenCalls'),
            cell: (row) => <span className="font-mono text-sm">{row.calls.join(', ')}</span>,
          },
          { key: 'by', title: t('madeBy'), cell: (row) => row.madeBy },
          { key: 'at', title: t('madeAt'), cell: (row) => <When at={row.createdAt} to="day" /> },
          {
            key: 'revoke',
            title: t('revoke'),
            cell: (row) =>
              row.revokedAt === null ? (
                <Button kind="danger" aria-label={t('revokeOf', { name: row.name })} onClick={() => void revoke(row.id)}>
                  {t('revoke')}
                </Button>
              ) : (
                <span className="text-ink-soft">
                  {t('revoked')} <When at={row.revokedAt} to="day" />
                </span>
              ),
          },
        ]}
      />
      <Dialog open={making} onClose={() => setMaking(false)} title={t('newToken')} width="wide">
        <MachineTokenForm mayName={answer?.mayName ?? []} onMade={() => void renew()} />
      </Dialog>
    </Panel>
  );
}

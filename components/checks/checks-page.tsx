'use client';

import { useState } from 'react';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { usePlant } from '@/components/theme/workstation';
import { Button, LinkButton } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { plantTime } from '@/components/ui/plant-time';
import { Skeleton } from '@/components/ui/skeleton';
import type { CheckStanding } from '@/services/contracts/checks';
import { CheckEntry, type CheckAnswer } from './check-entry';
import { RecentChecks } from './recent-checks';
import { StandingChecks } from './standing-checks';

/** What a check just recorded came to. */
function Outcome({ answer: { check, suspects } }: { answer: CheckAnswer }) {
  const t = useMessages('checks');
  const { timeZone } = usePlant();
  const { date, time, zone } = plantTime(check.validUntil, timeZone);
  const { scope } = check;
  if (check.result === 'good') return <Notice kind="done" title={t('doneGood', { scope, until: `${date} ${time} ${zone}` })} />;
  return (
    <Notice
      kind="held"
      title={t('doneFailed', { scope })}
      actions={suspects ? <LinkButton href={`/suspects/${suspects.id}`}>{t('openList')}</LinkButton> : undefined}
    >
      {suspects ? <p>{t('doneList', { number: suspects.number, held: suspects.held, recall: suspects.recall })}</p> : null}
    </Notice>
  );
}

/** Process checks: how each stands, and recording one. */
export function ChecksPage({ mayRecord }: { mayRecord: boolean }) {
  const t = useMessages('checks');
  const { answer, problem, renew } = useAnswer<{ items: CheckStanding[] }>('/api/checks/standing', 60_000);
  const [entry, setEntry] = useState<{ of: CheckStanding | undefined }>();
  const [outcome, setOutcome] = useState<CheckAnswer>();
  const [turn, setTurn] = useState(0);
  const recorded = (done: CheckAnswer) => {
    setEntry(undefined);
    setOutcome(done);
    setTurn(turn + 1);
    void renew();
  };
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={t('title')}
        subtitle={t('subtitle')}
        actions={
          mayRecord ? (
            <Button size="capture" onClick={() => setEntry({ of: undefined })}>
              {t('other')}
            </Button>
          ) : undefined
        }
      />
      {outcome ? <Outcome answer={outcome} /> : null}
      {problem ? <ProblemNotice problem={problem} /> : null}
      {answer ? (
        <StandingChecks rows={answer.items} onRecord={mayRecord ? (of) => setEntry({ of }) : undefined} />
      ) : problem ? null : (
        <Skeleton lines={6} />
      )}
      <RecentChecks turn={turn} />
      <Dialog
        open={entry !== undefined}
        onClose={() => setEntry(undefined)}
        title={entry?.of ? `${entry.of.scope} · ${entry.of.title}` : t('other')}
      >
        {entry ? <CheckEntry of={entry.of} onRecorded={recorded} /> : null}
      </Dialog>
    </div>
  );
}

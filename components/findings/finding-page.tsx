'use client';

import Link from 'next/link';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Finding } from '@/services/contracts/findings';
import { DispositionForm } from './disposition-form';

/** One finding: what was seen, its history, what was decided, and the decision to be made. */
export function FindingPage({ number, name, mayDecide }: { number: string; name: string; mayDecide: boolean }) {
  const t = useMessages('findings');
  const { answer: finding, problem, renew } = useAnswer<Finding>(`/api/findings/${number}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!finding) return <Skeleton lines={8} />;
  const open = finding.state === 'open' || finding.state === 'awaiting-follow-up';
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={finding.number}
        code={finding.part.serial}
        subtitle={`${finding.requirement.operation} ${finding.requirement.title} · ${finding.part.partNumber}`}
        actions={<StateWord state={finding.state} />}
      />
      <div className="grid gap-4 lg:grid-cols-2">
        <div className="flex flex-col gap-4">
          <Panel title={t('summary')}>
            <p>{finding.summary}</p>
            {finding.inspection ? (
              <Link href={`/inspections/${finding.inspection.id}`} className="text-accent underline underline-offset-4">
                {t('open', { number: finding.inspection.number })}
              </Link>
            ) : null}
          </Panel>
          <Panel title={t('history')}>
            <ul>
              {finding.history.map((one) => (
                <li key={one.id}>
                  <Link href={`/inspections/${one.id}`} className="font-mono text-accent underline underline-offset-4">
                    {one.number}
                  </Link>{' '}
                  {one.verdict}, {one.signedBy}, <When at={one.signedAt} />
                </li>
              ))}
            </ul>
          </Panel>
          <Panel title={t('decisions')}>
            {finding.dispositions.length === 0 ? t('none') : null}
            {finding.dispositions.map((one) => (
              <p key={one.decidedAt}>
                {one.sentence} {one.reason} (<When at={one.decidedAt} />)
              </p>
            ))}
          </Panel>
        </div>
        {mayDecide && open ? (
          <Panel title={t('decide')}>
            <DispositionForm finding={finding} name={name} onDecided={(next) => void renew(next)} />
          </Panel>
        ) : null}
      </div>
    </div>
  );
}

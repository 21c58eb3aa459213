'use client';

import Link from 'next/link';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Digest } from '@/components/ui/digest';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Ring } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { Trace } from '@/services/contracts/trace';

function Inspections({ rows }: { rows: Trace['inspections'] }) {
  const t = useMessages('trace');
  return (
    <Panel title={t('inspections')}>
      <ol className="flex flex-col gap-3">
        {rows.map((one) => (
          <li key={one.id} className="border-b border-line pb-3">
            <Link href={`/inspections/${one.id}`} className="font-mono text-accent underline underline-offset-4">
              {one.number}
            </Link>{' '}
            {one.operation} {one.title}: {t('signed', { verdict: one.verdict, by: one.signedBy })}, <When at={one.signedAt} />
            {one.ended ? ` (${one.ended})` : ''}
            <p className="text-sm text-ink-soft">
              {t('people', { names: one.people.join(', ') })}. {t('equipment', { names: one.equipment.join(', ') || '–' })}.{' '}
              {t('digest')} <Digest value={one.recordDigest} />
            </p>
            {one.evidence.map((file) => (
              <p key={file.id} className="text-sm">
                <a href={`/api/evidence/${file.id}`} className="text-accent underline underline-offset-4">
                  {file.name}
                </a>{' '}
                <Digest value={file.sha256} />
              </p>
            ))}
          </li>
        ))}
      </ol>
    </Panel>
  );
}

/** The whole history of one part, read only. */
export function TracePage({ id }: { id: string }) {
  const t = useMessages('trace');
  const { answer, problem } = useAnswer<Trace>(`/api/trace/${id}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!answer) return <Skeleton lines={10} />;
  const { part } = answer;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={t('heading', { serial: part.serial })}
        code={`${part.partNumber} ${part.revision}`}
        subtitle={`${part.customer} · ${part.state}`}
        ring={<Ring segments={part.ring} held={part.held} size="large" pixels={64} />}
      />
      <div className="grid gap-4 lg:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
        <Inspections rows={answer.inspections} />
        <div className="flex flex-col gap-4">
          <Panel title={t('origin')}>
            <ul>
              {part.lots.map((lot) => (
                <li key={lot.id} style={{ paddingInlineStart: `${String(lot.depth)}rem` }}>
                  {lot.kind}{' '}
                  <Link href={`/lots/${lot.id}`} className="font-mono text-accent underline underline-offset-4">
                    {lot.number}
                  </Link>
                </li>
              ))}
            </ul>
          </Panel>
          <Panel title={t('certificates')}>
            {part.certificates.map(({ number, state }) => (
              <p key={number}>
                <Link href={`/certificates/${number}`} className="font-mono text-accent underline underline-offset-4">
                  {number}
                </Link>{' '}
                {state}
              </p>
            ))}
          </Panel>
        </div>
      </div>
      <Panel title={t('journal')}>
        <ol className="flex flex-col gap-1">
          {answer.events.map((event) => (
            <li key={event.id}>
              <When at={event.at} to="second" /> <strong>{event.kind.replaceAll('-', ' ')}</strong>{' '}
              {t('by', { name: event.actor?.name ?? t('product') })} <Digest value={event.digest} />
            </li>
          ))}
        </ol>
      </Panel>
    </div>
  );
}

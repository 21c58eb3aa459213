'use client';

import Link from 'next/link';
import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages, useSentences } from '@/components/theme/use-messages';
import { usePlant } from '@/components/theme/workstation';
import { LinkButton } from '@/components/ui/button';
import { Digest } from '@/components/ui/digest';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Ring } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Trace } from '@/services/contracts/trace';
import { AsOfSwitch } from './as-of-switch';
import { endOfDay } from './end-of-day';
import { GenealogyTree } from './genealogy-tree';
import { TracedCertificates, TracedFindings, TracedHolds } from './traced-decisions';
import { TracedInspections } from './traced-inspections';

function Journal({ events }: { events: Trace['events'] }) {
  const t = useMessages('trace');
  const kindWords = useSentences('record');
  return (
    <Panel title={t('journal')}>
      <ol className="flex flex-col gap-1">
        {events.map((event) => (
          <li key={event.id}>
            <When at={event.at} to="second" /> <strong>{kindWords(`kinds.${event.kind}`)}</strong>{' '}
            {t('by', { name: event.actor?.name ?? t('product') })} <Digest value={event.digest} />
          </li>
        ))}
      </ol>
    </Panel>
  );
}

function Siblings({ part }: { part: Trace['part'] }) {
  const t = useMessages('trace');
  return (
    <Panel title={t('siblings')}>
      {part.siblings.length === 0 ? t('nothing') : null}
      <ul className="flex flex-wrap gap-x-6 gap-y-1">
        {part.siblings.map((one) => (
          <li key={one.id}>
            <Link href={`/trace/${one.id}`} className="font-mono text-accent underline underline-offset-4">
              {one.serial}
            </Link>{' '}
            <StateWord state={one.state} />
          </li>
        ))}
      </ul>
    </Panel>
  );
}

function Document({ trace }: { trace: Trace }) {
  const t = useMessages('trace');
  return (
    <>
      <div className="grid gap-4 lg:grid-cols-[minmax(0,2fr)_minmax(0,1fr)]">
        <Panel title={t('inspections')}>
          <TracedInspections rows={trace.inspections} />
        </Panel>
        <div className="flex flex-col gap-4">
          <Panel title={t('origin')}>
            <GenealogyTree lots={trace.genealogy} />
          </Panel>
          <Siblings part={trace.part} />
        </div>
      </div>
      <Panel title={t('findings')}>
        <TracedFindings rows={trace.findings} />
      </Panel>
      <Panel title={t('holds')}>
        <TracedHolds rows={trace.holds} />
      </Panel>
      <Panel title={t('certificates')}>
        <TracedCertificates rows={trace.certificates} />
      </Panel>
      <Journal events={trace.events} />
    </>
  );
}

/** The whole history of one part as a document, read only; as of a day when one is chosen. */
export function TracePage({ id }: { id: string }) {
  const t = useMessages('trace');
  const { timeZone } = usePlant();
  const { filters, set } = useUrlFilters(['by'] as const);
  const day = /^\d{4}-\d{2}-\d{2}$/.test(filters.by) ? filters.by : '';
  const asked = day === '' ? '' : `?recordedBy=${encodeURIComponent(endOfDay(day, timeZone))}`;
  const { answer, problem } = useAnswer<Trace>(`/api/trace/${id}${asked}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!answer) return <Skeleton lines={10} />;
  const { part } = answer;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={t('heading', { serial: part.serial })}
        code={`${part.partNumber} ${part.revision}`}
        subtitle={`${part.title} · ${part.customer}`}
        ring={<Ring segments={part.ring} held={part.held} pixels={64} />}
        actions={
          <>
            <StateWord state={part.held ? 'held' : part.state} />
            <LinkButton href={`/parts/${part.id}`}>{t('part')}</LinkButton>
          </>
        }
      />
      <AsOfSwitch key={day} day={day} onChoose={(by) => set({ by })} />
      {day === '' ? null : <Notice title={t('past', { day })} />}
      <Document trace={answer} />
    </div>
  );
}

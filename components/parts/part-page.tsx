'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import { useAnswer } from '@/components/theme/use-answer';
import { DataTable } from '@/components/ui/data-table';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { LinkButton } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Ring } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Part } from '@/services/contracts/parts';
import { OpenInspection } from './open-inspection';

type Requirement = Part['requirements'][number];

function RequirementAction({ part, one, mayInspect }: { part: Part; one: Requirement; mayInspect: boolean }) {
  const t = useMessages('parts');
  const open = ['open', 'in-work', 'to-be-repeated'].includes(one.state) && mayInspect && !part.held;
  return (
    <span className="flex flex-wrap items-center gap-3">
      {one.inspection ? (
        <Link className="text-accent underline underline-offset-4" href={`/inspections/${one.inspection.id}`}>
          {t('read', { number: one.inspection.number })}
        </Link>
      ) : null}
      {open ? (
        <OpenInspection
          part={part.id}
          requirement={one.id}
          label={t(one.draft ? 'goOn' : 'begin', { operation: one.operation, title: one.title })}
        />
      ) : null}
    </span>
  );
}

function Route({ part, mayInspect }: { part: Part; mayInspect: boolean }) {
  const t = useMessages('parts');
  return (
    <Panel title={t('route')} flush>
      <DataTable<Requirement>
        caption={t('route')}
        rows={part.requirements}
        rowKey={(row) => row.id}
        columns={[
          { key: 'operation', title: '#', cell: (row) => row.operation },
          { key: 'title', title: t('ring'), cell: (row) => row.title, names: true },
          { key: 'state', title: t('state'), cell: (row) => <StateWord state={row.state} /> },
          { key: 'act', title: '', cell: (row) => <RequirementAction part={part} one={row} mayInspect={mayInspect} /> },
        ]}
      />
    </Panel>
  );
}

function Side({ part }: { part: Part }) {
  const t = useMessages('parts');
  return (
    <div className="flex flex-col gap-4">
      <Panel title={t('findings')}>
        {part.findings.length === 0 ? t('none') : null}
        <ul className="flex flex-col gap-2">
          {part.findings.map((one) => (
            <li key={one.number}>
              <Link className="text-accent underline underline-offset-4" href={`/findings/${one.number}`}>
                {one.number}
              </Link>{' '}
              <StateWord state={one.state} /> {one.summary}
            </li>
          ))}
        </ul>
      </Panel>
      <Panel title={t('holds')}>
        {part.holds.length === 0
          ? t('none')
          : part.holds.map((one) => <p key={one.id}>{`${one.number} ${one.target}: ${one.reason}`}</p>)}
      </Panel>
      <Panel title={t('certificates')}>
        {part.certificates.length === 0 ? t('none') : null}
        {part.certificates.map((one) => (
          <p key={one.number}>
            <Link className="text-accent underline underline-offset-4" href={`/certificates/${one.number}`}>
              {one.number}
            </Link>{' '}
            <StateWord state={one.state} /> <When at={one.signedAt} to="day" />
          </p>
        ))}
      </Panel>
      <Panel title={t('lots')}>
        <ul>
          {part.lots.map((one) => (
            <li key={one.id} style={{ paddingInlineStart: `${String(one.depth)}rem` }}>
              {one.kind} <span className="font-mono">{one.number}</span>
            </li>
          ))}
        </ul>
      </Panel>
      <Panel title={t('siblings')}>
        <ul className="flex flex-wrap gap-x-4 gap-y-1">
          {part.siblings.map((one) => (
            <li key={one.id}>
              <Link className="font-mono text-accent underline underline-offset-4" href={`/parts/${one.id}`}>
                {one.serial}
              </Link>
            </li>
          ))}
        </ul>
      </Panel>
    </div>
  );
}

/** The whole present state of one part. */
export function PartPage({ id, mayInspect }: { id: string; mayInspect: boolean }) {
  const t = useMessages('parts');
  const { answer: part, problem } = useAnswer<Part>(`/api/parts/${id}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!part) return <Skeleton lines={8} />;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={part.serial}
        code={`${part.partNumber} ${part.revision}`}
        subtitle={`${part.title} · ${part.cluster}, ${t('position', { position: part.position })} · ${part.customer}`}
        ring={<Ring segments={part.ring} held={part.held} size="large" pixels={64} />}
        actions={<LinkButton href={`/trace/${part.id}`}>{t('trace')}</LinkButton>}
      />
      <div className="grid gap-4 xl:grid-cols-[minmax(0,1fr)_24rem]">
        <Route part={part} mayInspect={mayInspect} />
        <Side part={part} />
      </div>
    </div>
  );
}

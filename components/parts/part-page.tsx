'use client';

import Link from 'next/link';
import { sendJson } from '@/components/forms/send-json';
import { HoldDialog } from '@/components/holds/hold-dialog';
import { useMessages } from '@/components/theme/use-messages';
import { useAnswer } from '@/components/theme/use-answer';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { LinkButton } from '@/components/ui/button';
import { Panel } from '@/components/ui/panel';
import { Ring } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Part } from '@/services/contracts/parts';
import { PartRoute } from './part-route';

function Side({ part }: { part: Part }) {
  const t = useMessages('parts');
  const lotWords = useMessages('lots');
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
        {part.holds.length === 0 ? t('none') : null}
        {part.holds.map((one) => (
          <p key={one.id}>
            <Link className="font-mono text-accent underline underline-offset-4" href="/holds">
              {one.number}
            </Link>{' '}
            {one.target}: {one.reason} (<When at={one.placedAt} />)
          </p>
        ))}
      </Panel>
      <Panel title={t('certificates')}>
        {part.certificates.length === 0 ? t('none') : null}
        {part.shipment === null ? null : (
          <p>
            <Link className="text-accent underline underline-offset-4" href={`/shipments/${part.shipment}`}>
              {t('shipment', { number: part.shipment })}
            </Link>
          </p>
        )}
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
              {lotWords(`kinds.${one.kind}`)}{' '}
              <Link className="font-mono text-accent underline underline-offset-4" href={`/lots/${one.id}`}>
                {one.number}
              </Link>
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
              </Link>{' '}
              <StateWord state={one.state} />
            </li>
          ))}
        </ul>
      </Panel>
    </div>
  );
}

interface Props {
  readonly id: string;
  readonly mayInspect: boolean;
  readonly mayHold: boolean;
}

/** The whole present state of one part. */
export function PartPage({ id, mayInspect, mayHold }: Props) {
  const t = useMessages('parts');
  const { answer: part, problem, renew } = useAnswer<Part>(`/api/parts/${id}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!part) return <Skeleton lines={8} />;
  const plan = t('planIssue', { issue: part.planIssue });
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={part.serial}
        code={`${part.partNumber} ${part.revision}`}
        subtitle={`${part.title} · ${plan} · ${part.cluster}, ${t('position', { position: part.position })} · ${part.customer}`}
        ring={<Ring segments={part.ring} held={part.held} pixels={64} />}
        actions={
          <>
            <StateWord state={part.held ? 'held' : part.state} />
            <LinkButton href={`/trace/${part.id}`}>{t('trace')}</LinkButton>
            {mayHold ? (
              <HoldDialog
                target={{ kind: 'part', id, name: part.serial }}
                onPlaced={() => void sendJson<Part>(`/api/parts/${id}`, { method: 'GET' }).then(renew, () => renew())}
              />
            ) : null}
          </>
        }
      />
      {part.holds.map((hold) => (
        <Notice key={hold.id} kind="held" title={`${hold.number}, ${hold.target}`}>
          {hold.reason}
        </Notice>
      ))}
      <div className="grid gap-4 xl:grid-cols-[minmax(0,1fr)_24rem]">
        <PartRoute part={part} mayInspect={mayInspect} />
        <Side part={part} />
      </div>
    </div>
  );
}

'use client';

import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button, LinkButton } from '@/components/ui/button';
import { Caution } from '@/components/ui/caution';
import { Digest } from '@/components/ui/digest';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Certificate } from '@/services/contracts/certificates';

function Acknowledge({ number, onDone }: { number: string; onDone: (next: Certificate) => void }) {
  const t = useMessages('certificates');
  const [received, setReceived] = useState<'complete' | 'with-difference'>('complete');
  const [note, setNote] = useState('');
  const [problem, setProblem] = useState<Problem>();
  const send = async () => {
    try {
      onDone(
        await sendJson<Certificate>(`/api/certificates/${number}/acknowledgement`, {
          body: { received, ...(note.trim() === '' ? {} : { note }) },
        }),
      );
    } catch (failure) {
      setProblem(problemOf(failure));
    }
  };
  return (
    <Panel title={t('acknowledge')}>
      <fieldset className="flex flex-col gap-2">
        <legend className="sr-only">{t('acknowledge')}</legend>
        {(['complete', 'with-difference'] as const).map((value) => (
          <label key={value} className="flex min-h-10 items-center gap-2">
            <input type="radio" name="received" checked={received === value} onChange={() => setReceived(value)} />
            {t(value === 'complete' ? 'complete' : 'difference')}
          </label>
        ))}
        <label className="flex flex-col gap-1">
          <span>{t('note')}</span>
          <input className="field" value={note} onChange={(event) => setNote(event.target.value)} />
        </label>
        {problem ? <ProblemNotice problem={problem} /> : null}
        <Button kind="primary" onClick={() => void send()}>
          {t('send')}
        </Button>
      </fieldset>
    </Panel>
  );
}

/** One certificate: what it covers, the file, and what became of it. */
export function CertificatePage({ number, mayAcknowledge }: { number: string; mayAcknowledge: boolean }) {
  const t = useMessages('certificates');
  const [every, setEvery] = useState(1000);
  const { answer: certificate, problem, renew } = useAnswer<Certificate>(`/api/certificates/${number}`, every);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!certificate) return <Skeleton lines={8} />;
  const waiting = certificate.state === 'signed';
  if (!waiting && every !== 0) setEvery(0);
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={certificate.number}
        subtitle={`${certificate.customer} · ${certificate.purchaseOrder} · ${certificate.partNumber} ${certificate.revision}`}
        actions={
          waiting ? null : (
            <LinkButton kind="primary" href={`/api/certificates/${number}/pdf`} download>
              {t('download')}
            </LinkButton>
          )
        }
      />
      <p className="flex flex-wrap items-center gap-3">
        <StateWord state={certificate.state} /> <When at={certificate.signedAt} /> {certificate.signedBy}
        {certificate.sha256 ? (
          <>
            {t('digest')} <Digest value={certificate.sha256} />
          </>
        ) : null}
      </p>
      {waiting ? <Notice kind="unsure" title={t('waits', { reason: certificate.waitsFor ?? '' })} /> : null}
      <Caution title={t('number')}>{t('caution')}</Caution>
      <div className="grid gap-4 lg:grid-cols-2">
        <Panel title={t('serials')}>
          <ul>
            {certificate.serials.map((one) => (
              <li key={one.serial}>
                <span className="font-mono">{one.serial}</span> {t('heat', { heat: one.heat })}{' '}
                {one.withdrawn ? <strong className="text-reject">{t('withdrawn')}</strong> : null}
              </li>
            ))}
          </ul>
        </Panel>
        <div className="flex flex-col gap-4">
          {mayAcknowledge && !waiting ? <Acknowledge number={number} onDone={(next) => void renew(next)} /> : null}
          <Panel title={t('receipts')}>
            {certificate.receipts.length === 0 ? t('none') : null}
            {certificate.receipts.map((one) => (
              <p key={`${one.kind}${one.at}`}>
                {t('by', { kind: one.kind.replaceAll('-', ' '), name: one.by })}, <When at={one.at} /> {one.note}
              </p>
            ))}
          </Panel>
        </div>
      </div>
    </div>
  );
}

'use client';

import { useState } from 'react';
import { answerOf, sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { VerifyAnswer } from '@/services/contracts/certificates';

const kinds = {
  valid: 'done',
  'valid-except': 'unsure',
  superseded: 'unsure',
  withdrawn: 'refusal',
  altered: 'refusal',
  unknown: 'refusal',
} as const;

async function digestOf(file: File): Promise<string> {
  const digest = await crypto.subtle.digest('SHA-256', await file.arrayBuffer());
  return [...new Uint8Array(digest)].map((byte) => byte.toString(16).padStart(2, '0')).join('');
}

async function judge(file: File): Promise<VerifyAnswer> {
  const known = await sendJson<VerifyAnswer>('/api/verify', { body: { sha256: await digestOf(file) } });
  if (known.state !== 'unknown') return known;
  return answerOf(await fetch('/api/verify', { method: 'POST', headers: { 'content-type': 'application/pdf' }, body: file }));
}

/** The public page: valid, withdrawn, altered or unknown, and nothing more than the paper says. */
export function VerifyPage({ number: given, check: code }: { number: string; check: string }) {
  const t = useMessages('verify');
  const [number, setNumber] = useState(given);
  const [check, setCheck] = useState(code);
  const [answer, setAnswer] = useState<VerifyAnswer>();
  const [problem, setProblem] = useState<Problem>();
  const run = (ask: () => Promise<VerifyAnswer>) => {
    setProblem(undefined);
    setAnswer(undefined);
    ask()
      .then(setAnswer)
      .catch((failure: unknown) => setProblem(problemOf(failure)));
  };
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('lead')} />
      {answer ? (
        <Notice kind={kinds[answer.state]} title={t(`answer.${answer.state}`)}>
          {answer.number ? (
            <p>{t('details', { number: answer.number, partNumber: answer.partNumber ?? '', quantity: answer.quantity ?? 0 })}</p>
          ) : null}
          {answer.withdrawnSerials.length > 0 ? <p>{t('serials', { serials: answer.withdrawnSerials.join(', ') })}</p> : null}
        </Notice>
      ) : null}
      {problem ? <ProblemNotice problem={problem} /> : null}
      <Panel title={t('number')}>
        <form
          className="flex flex-wrap items-end gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            run(() =>
              sendJson<VerifyAnswer>(
                `/api/verify/${encodeURIComponent(number.trim())}?check=${encodeURIComponent(check.trim())}`,
                { method: 'GET' },
              ),
            );
          }}
        >
          <label className="flex flex-col gap-1">
            <span>{t('number')}</span>
            <input className="field font-mono" value={number} onChange={(event) => setNumber(event.target.value)} />
          </label>
          <label className="flex flex-col gap-1">
            <span>{t('check')}</span>
            <input className="field w-80 font-mono" value={check} onChange={(event) => setCheck(event.target.value)} />
          </label>
          <Button kind="primary" type="submit">
            {t('ask')}
          </Button>
        </form>
      </Panel>
      <Panel title={t('file')} subtitle={t('fileHint')}>
        <input
          type="file"
          aria-label={t('file')}
          accept="application/pdf"
          onChange={(event) => {
            const file = event.target.files?.[0];
            if (file) run(() => judge(file));
          }}
        />
      </Panel>
    </div>
  );
}

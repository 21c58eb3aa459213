'use client';

import Link from 'next/link';
import { useState } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { inspectionSentence } from '@/services/contracts/signing-sentence';
import type { Draft } from './use-draft';

interface Signed {
  readonly number: string;
  readonly findings: readonly { readonly number: string }[];
}

export interface SignDialogProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly me: { readonly name: string };
  readonly onSigned: () => void;
}

/** The sentence, the proof of the person, and every reason when it may not be signed yet. */
export function SignDialog({ draft, answer, me, onSigned }: SignDialogProps) {
  const t = useMessages('inspections');
  const [open, setOpen] = useState(false);
  const [proof, setProof] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const [signed, setSigned] = useState<Signed>();
  const { part, requirement, plan } = answer;
  const sentence = inspectionSentence({
    name: me.name,
    serial: part.serial,
    partNumber: part.partNumber,
    revision: part.revision,
    planIssue: plan.issue,
    operation: requirement.operation,
    title: requirement.title,
    verdict: draft.judgement.evaluation?.verdict ?? 'not-evaluable',
  });
  const sign = async () => {
    setBusy(true);
    setProblem(undefined);
    try {
      if (await draft.flush()) {
        const body = /^\d{4,8}$/.test(proof) ? { pin: proof } : { password: proof };
        setSigned(await sendJson<Signed>(`/api/inspections/${answer.id}/signature`, { body }));
        onSigned();
      }
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setProof('');
    setBusy(false);
  };
  return (
    <>
      <Button kind="primary" size="capture" onClick={() => setOpen(true)}>
        {t('sign')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('signTitle')} width="wide">
        {signed ? (
          <div className="flex flex-col gap-3" role="status">
            <p className="text-lg font-semibold">{t('signedAs', { number: signed.number })}</p>
            {signed.findings.map(({ number }) => (
              <Link key={number} href={`/findings/${number}`} className="text-accent underline underline-offset-4">
                {t('finding', { number })}
              </Link>
            ))}
            <Link href={`/parts/${part.id}`} className="text-accent underline underline-offset-4">
              {t('toPart', { serial: part.serial })}
            </Link>
          </div>
        ) : (
          <form
            className="flex flex-col gap-3"
            onSubmit={(event) => {
              event.preventDefault();
              if (!busy) void sign();
            }}
          >
            <p className="border-s-4 border-accent ps-3">{sentence}</p>
            {problem ? <ProblemNotice problem={problem} /> : null}
            <label className="flex flex-col gap-1">
              <span className="font-semibold">{t('password')}</span>
              <input
                className="field"
                type="password"
                autoComplete="current-password"
                value={proof}
                onChange={(event) => setProof(event.target.value)}
              />
            </label>
            <div className="flex gap-3">
              <Button kind="primary" size="capture" type="submit" busy={busy} disabled={proof === ''}>
                {t('signNow')}
              </Button>
              <Button size="capture" onClick={() => setOpen(false)}>
                {t('close')}
              </Button>
            </div>
          </form>
        )}
      </Dialog>
    </>
  );
}

'use client';

import { useRef, useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import type { Judgement } from '@/services/contracts/live-judgement';
import { inspectionSentence } from '@/services/contracts/signing-sentence';
import { useFieldWords, useMissingWords } from './entry-words';
import type { MissingEntry } from './missing-entries';
import type { Draft } from './use-draft';

export interface SignDialogProps {
  readonly draft: Draft;
  readonly answer: InspectionAnswer;
  readonly me: { readonly name: string };
  readonly missing: readonly MissingEntry[];
  /** Reads the inspection again: it is signed now. */
  readonly onSigned: () => Promise<unknown>;
}

/** The sentence exactly as it will be stored, made from what the server would find. */
function sentenceOf({ answer, me, draft }: SignDialogProps): string {
  const { part, requirement, plan } = answer;
  return inspectionSentence({
    name: me.name,
    serial: part.serial,
    partNumber: part.partNumber,
    revision: part.revision,
    planIssue: plan.issue,
    operation: requirement.operation,
    title: requirement.title,
    verdict: draft.judgement.evaluation?.verdict ?? 'not-evaluable',
  });
}

/** Whether there is something to say: everything judged, or void by a process value. Until then no sentence would be true. */
function hasOutcome({ evaluation, faults }: Judgement): boolean {
  if (!evaluation) return false;
  return evaluation.process.some(({ verdict }) => verdict === 'reject') || (evaluation.complete && faults.length === 0);
}

/** Reasons that stand field by field are not said a second time in one long sentence. */
function onlyReasons({ detail, ...problem }: Problem): Problem {
  return (problem.errors ?? []).length > 0 || detail === undefined ? problem : { ...problem, detail };
}

/** The proof of a person: a PIN is all digits, anything else a password. */
function proofOf(text: string): { pin: string } | { password: string } {
  return /^\d{4,8}$/.test(text) ? { pin: text } : { password: text };
}

function SignForm(props: SignDialogProps & { onClose: () => void }) {
  const { draft, answer, missing, onSigned, onClose } = props;
  const t = useMessages('inspections');
  const fieldWords = useFieldWords(draft.content);
  const missingWords = useMissingWords();
  const [proof, setProof] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const pressed = useRef(false);
  const sign = async (event: FormEvent) => {
    event.preventDefault();
    // A second press while the first is on its way must not sign twice.
    if (pressed.current || proof === '') return;
    pressed.current = true;
    setBusy(true);
    setProblem(undefined);
    try {
      if (await draft.flush()) {
        await sendJson(`/api/inspections/${answer.id}/signature`, { body: proofOf(proof) });
        await onSigned();
      }
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setProof('');
    setBusy(false);
    pressed.current = false;
  };
  return (
    <form className="flex flex-col gap-3" onSubmit={(event) => void sign(event)}>
      <blockquote className="border-s-4 border-accent bg-accent-wash px-4 py-3 text-lg">
        {hasOutcome(draft.judgement) ? sentenceOf(props) : t('sentenceLater')}
      </blockquote>
      <p className="text-sm text-ink-soft">{t('caution.acceptance')}</p>
      {missing.length > 0 ? (
        <Notice kind="unsure" title={t('missing', { count: missing.length })}>
          <p>{missing.map(missingWords).join(' · ')}</p>
        </Notice>
      ) : null}
      {draft.saved.kind === 'unsaved' ? (
        <Notice kind="unsure" title={t('signUnsaved')}>
          {draft.saved.problem.detail}
        </Notice>
      ) : null}
      {problem ? <ProblemNotice problem={onlyReasons(problem)} labelOf={fieldWords} /> : null}
      <label className="flex max-w-sm flex-col gap-1">
        <span className="font-semibold">{t('password')}</span>
        <input
          className="field"
          type="password"
          autoComplete="current-password"
          autoFocus
          readOnly={busy}
          value={proof}
          onChange={(event) => setProof(event.target.value)}
        />
      </label>
      <div className="flex gap-3">
        <Button kind="primary" size="capture" type="submit" busy={busy} disabled={proof === ''}>
          {t('signNow')}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('close')}
        </Button>
      </div>
    </form>
  );
}

/** The sentence, the proof of the person, and every reason when it may not be signed yet. */
export function SignDialog(props: SignDialogProps) {
  const t = useMessages('inspections');
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button kind="primary" size="capture" onClick={() => setOpen(true)}>
        {t('sign')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('signTitle')} width="wide">
        <SignForm {...props} onClose={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

'use client';

import { useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { BasketAnswer } from '@/services/contracts/baskets';

export interface ReasonDialogProps {
  readonly open: boolean;
  readonly title: string;
  readonly text?: string;
  readonly does: string;
  /** Where the reason is sent; the basket comes back. */
  readonly url: string;
  readonly onDone: (answer: BasketAnswer) => void;
  readonly onClose: () => void;
}

function ReasonForm({ text, does, url, onDone, onClose }: Omit<ReasonDialogProps, 'open' | 'title'>) {
  const t = useMessages('baskets');
  const [reason, setReason] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const send = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    try {
      onDone(await sendJson<BasketAnswer>(url, { body: { reason } }));
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
  };
  return (
    <form data-density="capture" className="flex flex-col gap-4" onSubmit={(event) => void send(event)}>
      {text === undefined ? null : <p>{text}</p>}
      {problem ? <ProblemNotice problem={problem} /> : null}
      <label className="flex flex-col gap-1">
        <span className="font-semibold">{t('reason')}</span>
        <input className="field" autoFocus maxLength={400} value={reason} onChange={(event) => setReason(event.target.value)} />
        <span className="text-sm text-ink-soft">{t('reasonHint')}</span>
      </label>
      <div className="flex gap-3">
        <Button kind="danger" size="capture" type="submit" busy={busy} disabled={reason.trim() === ''}>
          {does}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('cancel')}
        </Button>
      </div>
    </form>
  );
}

/** Something that needs a reason: taking a part out, giving the basket up. */
export function ReasonDialog({ open, title, ...rest }: ReasonDialogProps) {
  return (
    <Dialog open={open} onClose={rest.onClose} title={title}>
      <ReasonForm {...rest} />
    </Dialog>
  );
}

'use client';

import { useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { RunAnswer } from '@/services/contracts/runs';
import { RunValuesFields } from './run-values-fields';

interface Changed {
  readonly run: RunAnswer;
  readonly voided: readonly { readonly number: string; readonly serial: string }[];
  readonly recall: readonly { readonly part: string; readonly serial: string; readonly hold: string }[];
}

function ChangeForm({ run, onChanged, onClose }: { run: RunAnswer; onChanged: (changed: Changed) => void; onClose: () => void }) {
  const t = useMessages('runs');
  const [process, setProcess] = useState(run.process);
  const [reason, setReason] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    try {
      onChanged(await sendJson<Changed>(`/api/runs/${run.id}/values`, { body: { process, reason } }));
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
  };
  return (
    <form data-density="capture" className="flex flex-col gap-4" onSubmit={(event) => void save(event)}>
      <p>{t('changeWarns', { count: run.inspections.filter(({ voided }) => !voided).length })}</p>
      {problem ? <ProblemNotice problem={problem} /> : null}
      <RunValuesFields windows={run.windows} process={process} onChange={setProcess} />
      <label className="flex flex-col gap-1">
        <span className="font-semibold">{t('reason')}</span>
        <input className="field" maxLength={400} value={reason} onChange={(event) => setReason(event.target.value)} />
        <span className="text-sm text-ink-soft">{t('reasonHint')}</span>
      </label>
      <div className="flex gap-3">
        <Button
          kind="primary"
          size="capture"
          type="submit"
          busy={busy}
          disabled={reason.trim().length < 5 || process.length === 0}
        >
          {t('save')}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('cancel')}
        </Button>
      </div>
    </form>
  );
}

/** What a void value took with it. */
export function VoidedNotice({ changed }: { changed: Changed }) {
  const t = useMessages('runs');
  if (changed.run.standing !== 'void') return null;
  return (
    <Notice kind="refusal" title={t('voidNow', { count: changed.voided.length })}>
      <p className="font-mono">{changed.voided.map(({ serial }) => serial).join(', ')}</p>
      {changed.recall.length > 0 ? (
        <>
          <p className="font-semibold">{t('recall')}</p>
          <ul className="list-disc pl-5">
            {changed.recall.map(({ part, serial, hold }) => (
              <li key={part}>{t('recallLine', { serial, hold })}</li>
            ))}
          </ul>
        </>
      ) : null}
    </Notice>
  );
}

/** Values are never written over: they are entered anew, with the reason, and what they void is told at once. */
export function ChangeValuesDialog({ run, onChanged }: { run: RunAnswer; onChanged: (changed: Changed) => void }) {
  const t = useMessages('runs');
  const [open, setOpen] = useState(false);
  return (
    <>
      <Button size="capture" onClick={() => setOpen(true)}>
        {t('change')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('changeTitle', { number: run.number })} width="wide">
        <ChangeForm
          run={run}
          onClose={() => setOpen(false)}
          onChanged={(changed) => {
            setOpen(false);
            onChanged(changed);
          }}
        />
      </Dialog>
    </>
  );
}

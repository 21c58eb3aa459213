'use client';

import { useRouter } from 'next/navigation';
import { useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { BasketAnswer } from '@/services/contracts/baskets';
import type { RunSetUp } from '@/services/contracts/runs';

function SplitForm({
  basket,
  me,
  onClose,
  onSplit,
}: {
  basket: BasketAnswer;
  me: string;
  onClose: () => void;
  onSplit: () => void;
}) {
  const t = useMessages('baskets');
  const router = useRouter();
  const own = basket.evaluator.id === me;
  const left = basket.counts.in - basket.counts.scanned - basket.counts.out;
  const { answer: choices } = useAnswer<RunSetUp>(own ? '/api/runs/set-up' : null);
  const [to, setTo] = useState('');
  const [count, setCount] = useState(String(left));
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const split = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    try {
      const next = await sendJson<BasketAnswer>(`/api/baskets/${basket.id}/split`, {
        body: { count: Number(count), ...(own ? { to } : {}) },
      });
      if (own) onSplit();
      else router.push(`/baskets/${next.id}`);
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
  };
  return (
    <form data-density="capture" className="flex flex-col gap-4" onSubmit={(event) => void split(event)}>
      <p>{t('splitText', { scanned: basket.counts.scanned, left, name: basket.evaluator.name })}</p>
      {problem ? <ProblemNotice problem={problem} /> : null}
      {own ? (
        <label className="flex max-w-80 flex-col gap-1">
          <span className="font-semibold">{t('splitTo')}</span>
          <select className="field" value={to} onChange={(event) => setTo(event.target.value)}>
            <option value="">{t('choose')}</option>
            {(choices?.people ?? [])
              .filter(({ id }) => id !== me)
              .map(({ id, name }) => (
                <option key={id} value={id}>
                  {name}
                </option>
              ))}
          </select>
        </label>
      ) : null}
      <label className="flex max-w-60 flex-col gap-1">
        <span className="font-semibold">{t('splitCount')}</span>
        <input
          className="field font-mono text-xl"
          inputMode="numeric"
          autoComplete="off"
          value={count}
          onChange={(event) => setCount(event.target.value.replace(/\D/g, ''))}
        />
      </label>
      <div className="flex gap-3">
        <Button kind="primary" size="capture" type="submit" busy={busy} disabled={count === '' || (own && to === '')}>
          {t('splitNow')}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('cancel')}
        </Button>
      </div>
    </form>
  );
}

/** At a shift change: what is left goes on in a basket of the next evaluator. */
export function SplitDialog({ basket, me, onSplit }: { basket: BasketAnswer; me: string; onSplit: () => void }) {
  const t = useMessages('baskets');
  const [open, setOpen] = useState(false);
  const { in: put, scanned, out } = basket.counts;
  return (
    <>
      <Button size="capture" disabled={put - scanned - out < 1} onClick={() => setOpen(true)}>
        {basket.evaluator.id === me ? t('split') : t('takeOver')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('splitTitle')}>
        <SplitForm
          basket={basket}
          me={me}
          onClose={() => setOpen(false)}
          onSplit={() => {
            setOpen(false);
            onSplit();
          }}
        />
      </Dialog>
    </>
  );
}

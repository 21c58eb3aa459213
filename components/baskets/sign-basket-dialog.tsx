'use client';

import { useRef, useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { BasketAnswer, BasketPart } from '@/services/contracts/baskets';

export interface SignBasketProps {
  readonly basket: BasketAnswer;
  /** Scans the server does not have yet. */
  readonly waiting: number;
  readonly onSigned: () => Promise<unknown>;
}

const inBasket = ({ mark }: BasketPart) => mark === 'clean' || mark === 'marked';

/** The proof of a person: a PIN is all digits, anything else a password. */
function proofOf(text: string): { pin: string } | { password: string } {
  return /^\d{4,12}$/.test(text) ? { pin: text } : { password: text };
}

/** What the signature says of parts that are not simply clean. */
function Exceptions({ basket }: { basket: BasketAnswer }) {
  const t = useMessages('baskets');
  const marked = basket.parts.filter((part) => inBasket(part) && part.mark === 'marked');
  if (basket.setUp.void) return <Notice kind="refusal" title={t('void')} />;
  if (marked.length === 0) return <p>{t('signAllClean', { count: basket.counts.scanned })}</p>;
  return (
    <div>
      <p className="font-semibold">{t('signExceptions')}</p>
      <ul className="max-h-40 overflow-y-auto">
        {marked.map((part) => (
          <li key={part.inspection} className="flex items-center gap-3">
            <span className="font-mono">{part.serial}</span>
            {part.verdict ? <VerdictMark verdict={part.verdict} /> : t('marks.marked')}
          </li>
        ))}
      </ul>
    </div>
  );
}

/** Reasons stand line by line, not a second time in one long sentence. */
function onlyReasons({ detail, ...problem }: Problem): Problem {
  return (problem.errors ?? []).length > 0 || detail === undefined ? problem : { ...problem, detail };
}

function SignForm({ basket, waiting, onSigned, onClose }: SignBasketProps & { onClose: () => void }) {
  const t = useMessages('baskets');
  const [count, setCount] = useState('');
  const [proof, setProof] = useState('');
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const pressed = useRef(false);
  const sign = async (event: FormEvent) => {
    event.preventDefault();
    if (pressed.current || proof === '' || count === '') return;
    pressed.current = true;
    setBusy(true);
    setProblem(undefined);
    try {
      await sendJson(`/api/baskets/${basket.id}/signature`, { body: { count: Number(count), ...proofOf(proof) } });
      await onSigned();
      onClose();
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setProof('');
    setBusy(false);
    pressed.current = false;
  };
  return (
    <form data-density="capture" className="flex flex-col gap-3" onSubmit={(event) => void sign(event)}>
      <blockquote className="border-s-4 border-accent bg-accent-wash px-4 py-2 text-lg">{basket.sentence}</blockquote>
      <Exceptions basket={basket} />
      {waiting > 0 ? <Notice kind="unsure" title={t('signWaiting')} /> : null}
      {problem ? (
        <div tabIndex={0} role="region" aria-label={problem.title} className="max-h-48 overflow-y-auto">
          <ProblemNotice problem={onlyReasons(problem)} />
        </div>
      ) : null}
      <div className="flex flex-wrap gap-4">
        <label className="flex w-64 flex-col gap-1">
          <span className="font-semibold">{t('countNow')}</span>
          <input
            className="field font-mono text-xl"
            inputMode="numeric"
            autoComplete="off"
            autoFocus
            value={count}
            onChange={(event) => setCount(event.target.value.replace(/\D/g, ''))}
          />
        </label>
        <label className="flex w-64 flex-col gap-1">
          <span className="font-semibold">{t('pin')}</span>
          <input
            className="field font-mono text-xl"
            type="password"
            autoComplete="current-password"
            readOnly={busy}
            value={proof}
            onChange={(event) => setProof(event.target.value)}
          />
        </label>
      </div>
      <div className="flex gap-3">
        <Button
          kind="primary"
          size="capture"
          type="submit"
          busy={busy}
          disabled={proof === '' || count === '' || waiting > 0 || basket.counts.scanned === 0}
        >
          {t('signNow', { count: basket.counts.scanned })}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('cancel')}
        </Button>
      </div>
    </form>
  );
}

/** The sentence, the count by hand, the proof of the person, and every reason by serial when it may not be signed. */
export function SignBasketDialog(props: SignBasketProps) {
  const t = useMessages('baskets');
  const [open, setOpen] = useState(false);
  const { counts } = props.basket;
  return (
    <>
      <Button kind="primary" size="capture" disabled={counts.scanned === 0} onClick={() => setOpen(true)}>
        {t('sign')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('signTitle')} width="wide">
        <SignForm {...props} onClose={() => setOpen(false)} />
      </Dialog>
    </>
  );
}

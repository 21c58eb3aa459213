'use client';

import { useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Glyph } from '@/components/ui/glyph';
import { ProblemNotice } from '@/components/ui/notice';
import { problemOf, type Problem } from '@/components/ui/problem';
import { Skeleton } from '@/components/ui/skeleton';
import type { BasketAnswer, BasketSetUp } from '@/services/contracts/baskets';
import { SetUpFields, type SetUpValues } from './set-up-fields';

type Change = (answer: BasketAnswer) => void;

function EditForm({
  basket,
  offered,
  onDone,
  onClose,
}: {
  basket: BasketAnswer;
  offered: BasketSetUp;
  onDone: Change;
  onClose: () => void;
}) {
  const t = useMessages('baskets');
  const [values, setValues] = useState<SetUpValues>({ process: basket.process, acts: basket.acts });
  const [countIn, setCountIn] = useState(String(basket.counts.in));
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const operation = offered.operations.find(({ key }) => key === basket.requirement.key);
  const save = async (event: FormEvent) => {
    event.preventDefault();
    setBusy(true);
    try {
      const process = basket.run ? {} : { process: values.process };
      const body = { countIn: Number(countIn), acts: values.acts, ...process };
      onDone(await sendJson<BasketAnswer>(`/api/baskets/${basket.id}`, { method: 'PATCH', body }));
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
  };
  return (
    <form data-density="capture" className="flex flex-col gap-4" onSubmit={(event) => void save(event)}>
      <p className="text-ink-soft">{t('editHint')}</p>
      {problem ? <ProblemNotice problem={problem} /> : null}
      <label className="flex max-w-60 flex-col gap-1">
        <span className="font-semibold">{t('countIn')}</span>
        <input
          className="field font-mono text-xl"
          inputMode="numeric"
          autoComplete="off"
          value={countIn}
          onChange={(event) => setCountIn(event.target.value.replace(/\D/g, ''))}
        />
      </label>
      {operation ? (
        <SetUpFields
          asked={{ ...operation, people: offered.people }}
          values={values}
          byRun={basket.run !== null}
          onChange={setValues}
        />
      ) : null}
      <div className="flex gap-3">
        <Button kind="primary" size="capture" type="submit" busy={busy} disabled={countIn === ''}>
          {t('save')}
        </Button>
        <Button size="capture" onClick={onClose}>
          {t('cancel')}
        </Button>
      </div>
    </form>
  );
}

function EditDialog({ basket, onDone }: { basket: BasketAnswer; onDone: Change }) {
  const t = useMessages('baskets');
  const [open, setOpen] = useState(false);
  const { answer: offered } = useAnswer<BasketSetUp>(
    open ? `/api/baskets/set-up?partNumber=${encodeURIComponent(basket.partNumber)}` : null,
  );
  return (
    <>
      <Button size="capture" onClick={() => setOpen(true)}>
        {t('editSetUp')}
      </Button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('editTitle')} width="wide">
        {offered ? (
          <EditForm
            basket={basket}
            offered={offered}
            onClose={() => setOpen(false)}
            onDone={(answer) => {
              setOpen(false);
              onDone(answer);
            }}
          />
        ) : (
          <Skeleton lines={5} />
        )}
      </Dialog>
    </>
  );
}

/** What was entered once for all parts, how the engine judges it, and what is still missing. */
export function SetUpPanel({ basket, writable, onChange }: { basket: BasketAnswer; writable: boolean; onChange: Change }) {
  const t = useMessages('baskets');
  const verdictOf = (number: string) => basket.setUp.judged.find((one) => one.number === number)?.verdict;
  return (
    <section className="flex min-h-0 flex-1 flex-col rounded border border-line bg-raised">
      <header className="flex items-center justify-between gap-3 border-b border-line px-3 py-1">
        <h2 className="font-semibold">{t('setUp')}</h2>
        {writable ? <EditDialog basket={basket} onDone={onChange} /> : null}
      </header>
      <div className="min-h-0 flex-1 overflow-y-auto px-3 py-2" tabIndex={0} role="region" aria-label={t('setUp')}>
        {basket.setUp.void ? <p className="font-semibold text-reject">{t('void')}</p> : null}
        <dl className="grid grid-cols-[1fr_auto] gap-x-3">
          {basket.windows.map(({ number, title }) => {
            const value = basket.process.find((one) => one.number === number);
            const verdict = verdictOf(number);
            return (
              <div key={number} className="col-span-2 grid grid-cols-subgrid">
                <dt>{title}</dt>
                <dd className={`flex items-center gap-2 font-mono ${verdict === 'reject' ? 'text-reject' : ''}`}>
                  {value ? `${value.value} ${value.unit}` : '–'}
                  {verdict ? <Glyph name={verdict} /> : null}
                </dd>
              </div>
            );
          })}
        </dl>
        {basket.setUp.faults.length > 0 ? (
          <div className="mt-2 text-unsure">
            <p className="font-semibold">{t('missing')}</p>
            <ul className="list-disc pl-5 text-ink">
              {basket.setUp.faults.map(({ path, message }) => (
                <li key={path}>{message}</li>
              ))}
            </ul>
          </div>
        ) : null}
      </div>
    </section>
  );
}

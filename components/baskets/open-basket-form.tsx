'use client';

import { useRouter } from 'next/navigation';
import { useRef, useState, type FormEvent } from 'react';
import { sendJson } from '@/components/forms/send-json';
import { clockHere } from '@/components/inspections/act-time';
import { useScans } from '@/components/scanner/page-scanner';
import { playTone } from '@/components/scanner/tones';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { Panel } from '@/components/ui/panel';
import { problemOf, type Problem } from '@/components/ui/problem';
import type { BasketAnswer, BasketSetUp } from '@/services/contracts/baskets';
import { SetUpFields, type SetUpValues } from './set-up-fields';

type Operation = BasketSetUp['operations'][number];

interface Chosen {
  readonly key: string;
  readonly countIn: string;
  readonly line: string;
  readonly run: string;
  readonly setUp: SetUpValues;
}

/** As the person who opens it would most likely enter: they judge now, and processed a moment ago. */
function startOf({ key }: Operation, me: string): Chosen {
  return {
    key,
    countIn: '',
    line: '',
    run: '',
    setUp: { process: [], acts: [{ kind: 'processed', person: me, at: clockHere(), equipment: [], values: {} }] },
  };
}

function bodyOf(offered: BasketSetUp, operation: Operation, chosen: Chosen): object {
  const needed = operation.neededActs.map(({ kind }) => kind);
  return {
    partNumber: offered.partNumber,
    requirement: chosen.key,
    countIn: Number(chosen.countIn),
    ...(chosen.line.trim() === '' ? {} : { line: chosen.line.trim() }),
    ...(chosen.run === '' ? { process: chosen.setUp.process } : { run: chosen.run }),
    acts: chosen.setUp.acts.filter(({ kind }) => needed.includes(kind)),
  };
}

interface Step {
  readonly offered: BasketSetUp;
  readonly chosen: Chosen | undefined;
  readonly onChoose: (chosen: Chosen) => void;
  readonly me: string;
}

function OperationChoice({ offered, chosen, onChoose, me }: Step) {
  const t = useMessages('baskets');
  return (
    <fieldset className="flex flex-wrap gap-2">
      <legend className="mb-1 font-semibold">
        {t('chooseOperation')} <span className="font-mono">{offered.partNumber}</span> {offered.title}
      </legend>
      {offered.operations
        .filter(({ refusal }) => refusal === null)
        .map((one) => (
          <Button
            key={one.key}
            size="capture"
            aria-pressed={chosen?.key === one.key}
            glyph={chosen?.key === one.key ? 'accept' : 'ring'}
            onClick={() => onChoose(startOf(one, me))}
          >
            {one.operation} {one.title}
            {one.waiting ? null : <span className="font-normal text-ink-soft">{t('notWaiting')}</span>}
          </Button>
        ))}
      <p className="basis-full text-sm text-ink-soft">
        {offered.operations
          .flatMap(({ operation, title, refusal }) => (refusal === null ? [] : [t('cannot', { operation, title, refusal })]))
          .join(' · ')}
      </p>
    </fieldset>
  );
}

function CountsAndRun({
  operation,
  chosen,
  onChoose,
}: {
  operation: Operation;
  chosen: Chosen;
  onChoose: (chosen: Chosen) => void;
}) {
  const t = useMessages('baskets');
  return (
    <div className="grid gap-x-4 gap-y-3 sm:grid-cols-3">
      <label className="flex flex-col gap-0.5">
        <span className="font-semibold">{t('countIn')}</span>
        <input
          className="field font-mono text-xl"
          inputMode="numeric"
          autoComplete="off"
          autoFocus
          value={chosen.countIn}
          onChange={(event) => onChoose({ ...chosen, countIn: event.target.value.replace(/\D/g, '') })}
        />
        <span className="text-sm text-ink-soft">{t('countInHint')}</span>
      </label>
      <label className="flex flex-col gap-0.5">
        <span>{t('line')}</span>
        <input
          className="field"
          autoComplete="off"
          maxLength={60}
          value={chosen.line}
          onChange={(event) => onChoose({ ...chosen, line: event.target.value })}
        />
      </label>
      {operation.runs.length > 0 ? (
        <label className="flex flex-col gap-0.5">
          <span>{t('run')}</span>
          <select className="field" value={chosen.run} onChange={(event) => onChoose({ ...chosen, run: event.target.value })}>
            <option value="">{t('noRun')}</option>
            {operation.runs.map(({ id, number, line }) => (
              <option key={id} value={id}>
                {number} {line ?? ''}
              </option>
            ))}
          </select>
          <span className="text-sm text-ink-soft">{t('runHint')}</span>
        </label>
      ) : null}
    </div>
  );
}

function ChosenForm({
  offered,
  operation,
  chosen,
  onChoose,
}: Omit<Step, 'chosen' | 'me'> & { operation: Operation; chosen: Chosen }) {
  const t = useMessages('baskets');
  const router = useRouter();
  const [busy, setBusy] = useState(false);
  const [problem, setProblem] = useState<Problem>();
  const pressed = useRef(false);
  const open = async (event: FormEvent) => {
    event.preventDefault();
    if (pressed.current) return;
    pressed.current = true;
    setBusy(true);
    setProblem(undefined);
    try {
      const { id } = await sendJson<BasketAnswer>('/api/baskets', { body: bodyOf(offered, operation, chosen) });
      router.push(`/baskets/${id}`);
      return;
    } catch (failure) {
      setProblem(problemOf(failure));
    }
    setBusy(false);
    pressed.current = false;
  };
  return (
    <form className="flex flex-col gap-4" onSubmit={(event) => void open(event)}>
      <CountsAndRun operation={operation} chosen={chosen} onChoose={onChoose} />
      <SetUpFields
        asked={{ ...operation, people: offered.people }}
        values={chosen.setUp}
        byRun={chosen.run !== ''}
        onChange={(setUp) => onChoose({ ...chosen, setUp })}
      />
      {problem ? <ProblemNotice problem={problem} /> : null}
      <div>
        <Button kind="primary" size="capture" type="submit" busy={busy} disabled={chosen.countIn === ''}>
          {t('openNow')}
        </Button>
      </div>
    </form>
  );
}

/** Opening a basket: one part of the load is scanned, the operation chosen, and everything common entered once. */
export function OpenBasketForm({ me }: { me: string }) {
  const t = useMessages('baskets');
  const [serial, setSerial] = useState('');
  const [offered, setOffered] = useState<BasketSetUp>();
  const [chosen, setChosen] = useState<Chosen>();
  const [problem, setProblem] = useState<Problem>();
  const look = async (scan: string) => {
    setProblem(undefined);
    setChosen(undefined);
    try {
      const found = await sendJson<BasketSetUp>(`/api/baskets/set-up?scan=${encodeURIComponent(scan)}`, { method: 'GET' });
      setOffered(found);
      playTone('added');
      const able = found.operations.filter(({ refusal, waiting }) => refusal === null && waiting);
      if (able.length === 1 && able[0]) setChosen(startOf(able[0], me));
    } catch (failure) {
      setOffered(undefined);
      setProblem(problemOf(failure));
      playTone('unknown');
    }
  };
  useScans({ onScan: (text) => void look(text) });
  const operation = offered?.operations.find(({ key }) => key === chosen?.key);
  return (
    <Panel title={t('openTitle')} subtitle={t('openHint')}>
      <div data-density="capture" className="flex flex-col gap-4">
        <form
          className="flex flex-wrap items-end gap-3"
          onSubmit={(event) => {
            event.preventDefault();
            if (serial.trim() !== '') void look(serial);
          }}
        >
          <label className="flex w-64 flex-col gap-1">
            <span className="font-semibold">{t('serial')}</span>
            <input
              className="field font-mono"
              autoComplete="off"
              spellCheck={false}
              value={serial}
              onChange={(event) => setSerial(event.target.value)}
            />
          </label>
          <Button size="capture" type="submit">
            {offered ? t('another') : t('look')}
          </Button>
        </form>
        {problem ? <Notice kind="refusal" title={problem.detail ?? problem.title} /> : null}
        {offered ? <OperationChoice offered={offered} chosen={chosen} onChoose={setChosen} me={me} /> : null}
        {offered && operation && chosen ? (
          <ChosenForm key={chosen.key} offered={offered} operation={operation} chosen={chosen} onChoose={setChosen} />
        ) : null}
      </div>
    </Panel>
  );
}

'use client';

import { useState, type ClipboardEvent, type KeyboardEvent } from 'react';
import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { BandLine } from '@/components/ui/band-line';
import { Notice } from '@/components/ui/notice';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { Panel } from '@/components/ui/panel';
import { parseReadingsFile, type RowFault } from '@/services/contracts/readings-file';
import type { CharacteristicRow } from './plan-rows';
import type { Draft } from './use-draft';

export interface ReadingsPanelProps {
  readonly draft: Draft;
  readonly rows: readonly CharacteristicRow[];
  readonly uncertaintyOf: (number: string) => string | undefined;
  readonly readOnly: boolean;
}

function goOn(event: KeyboardEvent<HTMLInputElement>): void {
  if (event.key !== 'Enter') return;
  event.preventDefault();
  const fields = [...document.querySelectorAll<HTMLInputElement>('[data-reading]')];
  fields[fields.indexOf(event.currentTarget) + 1]?.focus();
}

/** One field for each station in drawing order, each with its gauge line and live verdict. */
export function ReadingsPanel({ draft, rows, uncertaintyOf, readOnly }: ReadingsPanelProps) {
  const t = useMessages('inspections');
  const [faults, setFaults] = useState<readonly RowFault[]>([]);
  const { content, judgement, change } = draft;
  const valueOf = (number: string) => content.readings.find((one) => one.characteristic === number)?.value ?? '';
  const put = (values: ReadonlyMap<string, string>, source: 'typed' | 'pasted' | 'file') => {
    const others = content.readings.filter(({ characteristic }) => !values.has(characteristic));
    const made = [...values].map(([characteristic, text]) => ({
      characteristic,
      // A decimal comma becomes a point; what is no decimal stays as typed and is named by the engine.
      value: decimalFrom(text) ?? text,
      unit: rows.find(({ number }) => number === characteristic)?.unit ?? '',
      source,
    }));
    const order = rows.map(({ number }) => number);
    change({ readings: [...others, ...made].sort((a, b) => order.indexOf(a.characteristic) - order.indexOf(b.characteristic)) });
  };
  const paste = (event: ClipboardEvent<HTMLInputElement>, number: string) => {
    const lines = event.clipboardData
      .getData('text')
      .split(/\r?\n/)
      .map((line) => line.trim())
      .filter((line) => line !== '');
    if (lines.length < 2) return;
    event.preventDefault();
    const from = rows.findIndex((row) => row.number === number);
    put(new Map(lines.slice(0, rows.length - from).map((line, at) => [rows[from + at]?.number ?? '', line])), 'pasted');
  };
  const take = async (file: File) => {
    const parsed = parseReadingsFile(
      await file.text(),
      rows.map(({ number, title, unit }) => ({ number, title: title ?? number, unit })),
    );
    setFaults(parsed.faults);
    put(new Map(parsed.readings.map(({ characteristic, value }) => [characteristic, value])), 'file');
  };
  return (
    <Panel title={t('readings')} subtitle={t('pasteHint')}>
      <ul className="flex flex-col gap-2">
        {rows.map((row) => {
          const judged = judgement.evaluation?.readings.find(({ characteristic }) => characteristic === row.number);
          const place = content.readings.findIndex(({ characteristic }) => characteristic === row.number);
          const fault = judgement.faults.find(({ path }) => path.startsWith(`readings.${String(place)}.`));
          const value = decimalFrom(valueOf(row.number));
          const uncertainty = uncertaintyOf(row.number);
          return (
            <li
              key={row.number}
              className="grid grid-cols-[minmax(0,1fr)_8rem] items-center gap-x-3 gap-y-1 border-b border-line pb-2"
            >
              <label htmlFor={`reading-${row.number}`}>
                <span className="font-mono">{row.number}</span> {row.title}
              </label>
              <input
                id={`reading-${row.number}`}
                aria-label={t('reading', { number: row.number })}
                aria-describedby={`said-${row.number}`}
                data-reading=""
                inputMode="decimal"
                className="field text-right font-mono tabular-nums"
                readOnly={readOnly}
                value={valueOf(row.number)}
                onChange={(event) => put(new Map([[row.number, event.target.value]]), 'typed')}
                onBlur={(event) =>
                  value !== undefined && value !== event.target.value && put(new Map([[row.number, value]]), 'typed')
                }
                onKeyDown={goOn}
                onPaste={(event) => paste(event, row.number)}
              />
              <BandLine
                unit={row.unit}
                {...(row.lower === undefined ? {} : { lower: row.lower })}
                {...(row.upper === undefined ? {} : { upper: row.upper })}
                {...(row.nominal === undefined ? {} : { nominal: row.nominal })}
                {...(uncertainty === undefined
                  ? {}
                  : { uncertainty, ...(row.decision.rule === 'guarded' ? { guardBand: uncertainty } : {}) })}
                {...(value === undefined ? {} : { value })}
                {...(judged ? { verdict: judged.verdict } : {})}
              />
              <span id={`said-${row.number}`} className="text-sm">
                {judged ? <VerdictMark verdict={judged.verdict} /> : null}
                {fault ? <span className="text-reject">{fault.message}</span> : null}
              </span>
              {judged && judged.verdict !== 'accept' ? (
                <p className="col-span-2 text-sm text-ink-soft">{judged.sentence.text}</p>
              ) : null}
            </li>
          );
        })}
      </ul>
      {readOnly ? null : (
        <label className="mt-3 flex flex-col gap-1">
          <span className="font-semibold">{t('file')}</span>
          <input
            type="file"
            accept=".csv,.txt,text/csv"
            onChange={(event) => event.target.files?.[0] && void take(event.target.files[0])}
          />
        </label>
      )}
      {faults.length > 0 ? (
        <Notice kind="refusal" title={t('fileFaults')}>
          {faults.slice(0, 20).map(({ line, message }) => (
            <p key={`${String(line)}${message}`}>{t('line', { line, message })}</p>
          ))}
        </Notice>
      ) : null}
    </Panel>
  );
}

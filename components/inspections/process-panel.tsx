'use client';

import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';
import { Panel } from '@/components/ui/panel';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { useFaultWords } from './fault-words';
import { goOn } from './go-on';
import type { ProcessRow } from './plan-rows';
import type { Draft } from './use-draft';

/** The window in words, with the reader's decimal sign. */
function useWindowWords(): (row: ProcessRow) => string {
  const t = useMessages('inspections');
  const { locale } = useWorkstation();
  const local = (text: string) => (locale === 'fr' ? text.replace('.', ',') : text);
  return ({ lower, upper, unit }) => {
    if (lower !== undefined && upper !== undefined) return t('between', { lower: local(lower), upper: local(upper), unit });
    if (lower !== undefined) return t('atLeast', { lower: local(lower), unit });
    return t('atMost', { upper: local(upper ?? ''), unit });
  };
}

/** Process values in their windows: one outside voids the inspection, it does not reject the part. */
export function ProcessPanel({ draft, rows, readOnly }: { draft: Draft; rows: readonly ProcessRow[]; readOnly: boolean }) {
  const t = useMessages('inspections');
  const windowWords = useWindowWords();
  const faultWords = useFaultWords();
  const { process } = draft.content;
  const put = (row: ProcessRow, text: string) => {
    const order = rows.map(({ number }) => number);
    const others = process.filter(({ number }) => number !== row.number);
    const next = [...others, { number: row.number, value: text.slice(0, 60), unit: row.unit }];
    draft.change({ process: next.sort((a, b) => order.indexOf(a.number) - order.indexOf(b.number)) });
  };
  const outside = draft.judgement.evaluation?.process.some(({ verdict }) => verdict === 'reject') ?? false;
  return (
    <Panel title={t('process')}>
      <div className="@container">
        <div className="grid gap-x-4 gap-y-2 @sm:grid-cols-2">
          {rows.map((row) => {
            const place = process.findIndex(({ number }) => number === row.number);
            const value = process[place]?.value ?? '';
            const exact = decimalFrom(value);
            const judged = draft.judgement.evaluation?.process.find(({ number }) => number === row.number);
            const fault = faultWords(draft.judgement.faults, `process.${String(place)}`, value);
            return (
              <div key={row.number} className="flex flex-col gap-0.5">
                <label htmlFor={`process-${row.number}`}>
                  <span className="font-mono font-semibold">{row.number}</span> {row.title}
                </label>
                <span className="flex flex-wrap items-center gap-x-2">
                  <input
                    id={`process-${row.number}`}
                    aria-describedby={`window-${row.number}`}
                    aria-invalid={fault ? true : undefined}
                    data-next=""
                    className="field w-24 shrink-0 text-right font-mono tabular-nums"
                    inputMode="decimal"
                    autoComplete="off"
                    readOnly={readOnly}
                    value={value}
                    onChange={(event) => put(row, event.target.value)}
                    onBlur={() => {
                      if (!readOnly && exact !== undefined && exact !== value) put(row, exact);
                    }}
                    onKeyDown={goOn}
                  />
                  <span className="text-ink-soft">{row.unit}</span>
                  {judged ? <VerdictMark verdict={judged.verdict} /> : null}
                </span>
                <span id={`window-${row.number}`} className="text-sm text-ink-soft">
                  {windowWords(row)}
                  {fault ? <strong className="block text-reject">{fault}</strong> : null}
                </span>
              </div>
            );
          })}
        </div>
      </div>
      {outside ? <p className="mt-3 font-semibold text-reject">{t('processVoid')}</p> : null}
    </Panel>
  );
}

'use client';

import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { ProcessRow } from './plan-rows';
import type { Draft } from './use-draft';

/** Process values in their windows: one outside voids the inspection, it does not reject the part. */
export function ProcessPanel({ draft, rows, readOnly }: { draft: Draft; rows: readonly ProcessRow[]; readOnly: boolean }) {
  const t = useMessages('inspections');
  const { process } = draft.content;
  const windowOf = ({ lower, upper, unit }: ProcessRow) =>
    lower !== undefined && upper !== undefined
      ? t('between', { lower, upper, unit })
      : lower !== undefined
        ? t('atLeast', { lower, unit })
        : t('atMost', { upper: upper ?? '', unit });
  const put = (row: ProcessRow, text: string) =>
    draft.change({
      process: [...process.filter(({ number }) => number !== row.number), { number: row.number, value: text, unit: row.unit }],
    });
  return (
    <Panel title={t('process')}>
      <div className="grid gap-3 sm:grid-cols-2">
        {rows.map((row) => {
          const place = process.findIndex(({ number }) => number === row.number);
          const judged = draft.judgement.evaluation?.process.find(({ number }) => number === row.number);
          const fault = draft.judgement.faults.find(({ path }) => path.startsWith(`process.${String(place)}.`));
          return (
            <label key={row.number} className="flex flex-col gap-1">
              <span>
                <span className="font-mono">{row.number}</span> {row.title}
              </span>
              <span className="flex items-center gap-2">
                <input
                  className="field w-28 text-right font-mono"
                  inputMode="decimal"
                  readOnly={readOnly}
                  value={process[place]?.value ?? ''}
                  onChange={(event) => put(row, event.target.value)}
                  onBlur={(event) => put(row, decimalFrom(event.target.value) ?? event.target.value)}
                />
                {row.unit}
                {judged ? <VerdictMark verdict={judged.verdict} /> : null}
              </span>
              <span className="text-sm text-ink-soft">{windowOf(row)}</span>
              {fault ? <span className="text-sm text-reject">{fault.message}</span> : null}
            </label>
          );
        })}
      </div>
    </Panel>
  );
}

'use client';

import { useWindowWords } from '@/components/baskets/window-words';
import { useMessages } from '@/components/theme/use-messages';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { RunWindow } from '@/services/contracts/runs';

type Process = InspectionContent['process'];

export interface RunValuesFieldsProps {
  readonly windows: readonly RunWindow[];
  readonly process: Process;
  readonly onChange: (process: Process) => void;
}

/** One field for each value the run must keep, with its window beside it. */
export function RunValuesFields({ windows, process, onChange }: RunValuesFieldsProps) {
  const t = useMessages('runs');
  const windowWords = useWindowWords();
  if (windows.length === 0) return <p className="text-unsure">{t('noWindows')}</p>;
  const put = ({ number, unit }: RunWindow, value: string) =>
    onChange([...process.filter((one) => one.number !== number), ...(value === '' ? [] : [{ number, value, unit }])]);
  return (
    <fieldset className="grid gap-x-4 gap-y-3 sm:grid-cols-2 lg:grid-cols-3">
      <legend className="mb-1 font-semibold">{t('process')}</legend>
      {windows.map((row) => (
        <label key={row.number} className="flex flex-col gap-0.5">
          <span>{row.title}</span>
          <input
            className="field max-w-48 text-right font-mono tabular-nums"
            inputMode="decimal"
            autoComplete="off"
            value={process.find((one) => one.number === row.number)?.value ?? ''}
            onChange={(event) => put(row, event.target.value)}
          />
          <span className="text-sm text-ink-soft">{windowWords(row)}</span>
        </label>
      ))}
    </fieldset>
  );
}

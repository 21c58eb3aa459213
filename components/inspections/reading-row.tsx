'use client';

import type { ClipboardEvent } from 'react';
import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { BandLine } from '@/components/ui/band-line';
import { VerdictMark } from '@/components/ui/verdict-mark';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import { EngineSentence } from './engine-sentence';
import { goOn } from './go-on';
import type { CharacteristicRow } from './plan-rows';

export interface ReadingRowProps {
  readonly row: CharacteristicRow;
  readonly value: string;
  /** As entered; another unit than the plan's is shown beside the field. */
  readonly unit: string;
  readonly judged: EvaluationAnswer['readings'][number] | undefined;
  readonly fault: string | undefined;
  readonly uncertainty: string | undefined;
  readonly readOnly: boolean;
  readonly onType: (text: string) => void;
  readonly onPaste: (event: ClipboardEvent<HTMLInputElement>) => void;
}

/** The width of the guard band in the unit of the limits, for the gauge line only. */
function guardBandOf({ row, judged, uncertainty }: ReadingRowProps): string | undefined {
  if (row.decision.rule === 'simple') return undefined;
  const pairs = [
    [judged?.acceptLower, judged?.lower],
    [judged?.acceptUpper, judged?.upper],
  ];
  const pair = pairs.find(
    ([guarded, limit]) => guarded !== null && guarded !== undefined && limit !== null && limit !== undefined,
  );
  if (pair) return String(Number(Math.abs(Number(pair[0]) - Number(pair[1])).toPrecision(6)));
  if (uncertainty === undefined || row.decision.rule !== 'guarded') return undefined;
  const factor = Number(row.decision.g ?? '1');
  return factor === 1 ? uncertainty : String(Number((Number(uncertainty) * factor).toPrecision(6)));
}

function Gauge(props: ReadingRowProps) {
  const { row, value, unit, judged, uncertainty } = props;
  const exact = unit === row.unit ? decimalFrom(value) : undefined;
  const guardBand = guardBandOf(props);
  return (
    <BandLine
      unit={row.unit}
      {...(row.lower === undefined ? {} : { lower: row.lower })}
      {...(row.upper === undefined ? {} : { upper: row.upper })}
      {...(row.nominal === undefined ? {} : { nominal: row.nominal })}
      {...(uncertainty === undefined ? {} : { uncertainty })}
      {...(guardBand === undefined ? {} : { guardBand })}
      {...(exact === undefined ? {} : { value: exact })}
      {...(judged ? { verdict: judged.verdict } : {})}
    />
  );
}

/** One station: name, gauge line, field, verdict, and the reason when it is not accepted. A wrong entry stays as typed. */
export function ReadingRow(props: ReadingRowProps) {
  const t = useMessages('inspections');
  const { row, value, unit, judged, fault, readOnly, onType, onPaste } = props;
  const exact = decimalFrom(value);
  const said = `said-${row.number}`;
  return (
    <li className="grid grid-cols-[minmax(0,1fr)_7.5rem] items-center gap-x-3 border-b border-line py-1 last:border-b-0 @2xl:grid-cols-[minmax(0,1fr)_minmax(8rem,15rem)_7.5rem_8.5rem]">
      <label htmlFor={`reading-${row.number}`} className="leading-snug">
        <span className="font-mono font-semibold">{row.number}</span> {row.title}
      </label>
      <span className="order-last col-span-1 @2xl:order-none">
        <Gauge {...props} />
      </span>
      <span className="flex items-center gap-1.5">
        <input
          id={`reading-${row.number}`}
          aria-label={t('reading', { number: row.number })}
          aria-describedby={said}
          aria-invalid={fault === undefined ? undefined : true}
          data-next=""
          inputMode="decimal"
          autoComplete="off"
          className="field text-right font-mono tabular-nums"
          readOnly={readOnly}
          value={value}
          onChange={(event) => onType(event.target.value)}
          onBlur={() => {
            if (!readOnly && exact !== undefined && exact !== value) onType(exact);
          }}
          onKeyDown={goOn}
          onPaste={onPaste}
        />
        <span className={unit === row.unit ? 'text-ink-soft' : 'font-semibold text-unsure'}>{unit}</span>
      </span>
      <span id={said} className="order-last @2xl:order-none">
        {judged ? <VerdictMark verdict={judged.verdict} /> : null}
        {fault === undefined ? null : <span className="text-sm font-semibold text-reject">{fault}</span>}
      </span>
      {judged && judged.verdict !== 'accept' ? (
        <p className="order-last col-span-full pb-1 text-sm">
          <EngineSentence sentence={judged.sentence} />
        </p>
      ) : null}
    </li>
  );
}

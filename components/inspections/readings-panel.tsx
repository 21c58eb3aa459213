'use client';

import { useState, type ClipboardEvent } from 'react';
import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import { useFaultWords } from './fault-words';
import { pastedColumn } from './pasted-column';
import type { CharacteristicRow } from './plan-rows';
import { ReadingRow } from './reading-row';
import { ReadingsFileField } from './readings-file-field';
import type { Draft } from './use-draft';

type Reading = InspectionContent['readings'][number];

export interface ReadingsPanelProps {
  readonly draft: Draft;
  readonly rows: readonly CharacteristicRow[];
  readonly uncertaintyOf: (number: string) => string | undefined;
  readonly readOnly: boolean;
  /** The file that readings were taken from, to be attached as their proof. */
  readonly onFile: (file: File) => void;
}

/** New readings put in their places in drawing order. Voided ones stay: they are part of what happened. */
function withReadings(before: readonly Reading[], made: readonly Reading[], rows: readonly CharacteristicRow[]): Reading[] {
  const replaced = new Set(made.map(({ characteristic }) => characteristic));
  const kept = before.filter((one) => one.void || !replaced.has(one.characteristic));
  const order = new Map(rows.map(({ number }, place) => [number, place]));
  const placeOf = ({ characteristic }: Reading) => order.get(characteristic) ?? rows.length;
  return [...kept, ...made].sort((a, b) => placeOf(a) - placeOf(b));
}

/** One field for each station in drawing order, each with its gauge line and live verdict. */
export function ReadingsPanel({ draft, rows, uncertaintyOf, readOnly, onFile }: ReadingsPanelProps) {
  const t = useMessages('inspections');
  const faultWords = useFaultWords();
  const [leftOver, setLeftOver] = useState(0);
  const { content, judgement, change } = draft;
  const put = (made: readonly Reading[]) => change({ readings: withReadings(content.readings, made, rows) });
  const typed = (row: CharacteristicRow, text: string, source: 'typed' | 'pasted'): Reading => ({
    characteristic: row.number,
    value: text.slice(0, 60),
    unit: row.unit,
    source,
  });
  const paste = (event: ClipboardEvent<HTMLInputElement>, from: number) => {
    const cells = pastedColumn(event.clipboardData.getData('text'));
    if (readOnly || cells.length < 2) return;
    event.preventDefault();
    setLeftOver(Math.max(0, cells.length - (rows.length - from)));
    put(
      rows.slice(from).flatMap((row, place) => {
        const cell = cells[place] ?? '';
        // A decimal comma becomes a point; what is no decimal stays as pasted and is named at its field.
        return cell === '' ? [] : [typed(row, decimalFrom(cell) ?? cell, 'pasted')];
      }),
    );
  };
  return (
    <Panel title={t('readings')} {...(readOnly ? {} : { subtitle: t('pasteHint') })}>
      <ul className="@container -my-2 flex flex-col">
        {rows.map((row, at) => {
          const place = content.readings.findIndex((one) => one.characteristic === row.number && !one.void);
          const reading = content.readings[place];
          return (
            <ReadingRow
              key={row.number}
              row={row}
              value={reading?.value ?? ''}
              unit={reading?.unit ?? row.unit}
              judged={judgement.evaluation?.readings.find(({ characteristic }) => characteristic === row.number)}
              fault={faultWords(judgement.faults, `readings.${String(place)}`, reading?.value ?? '')}
              uncertainty={uncertaintyOf(row.number)}
              readOnly={readOnly}
              onType={(text) => put([typed(row, text, 'typed')])}
              onPaste={(event) => paste(event, at)}
            />
          );
        })}
      </ul>
      {leftOver > 0 ? (
        <p role="status" className="mt-2 text-unsure">
          {t('leftOver', { count: leftOver })}
        </p>
      ) : null}
      {readOnly ? null : <ReadingsFileField rows={rows} onTake={put} onFile={onFile} />}
    </Panel>
  );
}

'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { mmText, umOfMm, type Corner } from './micrometres';

interface NumberProps {
  readonly label: string;
  readonly um: number;
  readonly readOnly: boolean;
  readonly onUm: (um: number) => void;
}

/** Millimetres as typed; a text that is no length stays, marked, until it is one. */
function Millimetres({ label, um, readOnly, onUm }: NumberProps) {
  const [typed, setTyped] = useState<string | null>(null);
  if (readOnly) return <span className="font-mono">{mmText(um)}</span>;
  return (
    <input
      aria-label={label}
      aria-invalid={typed !== null && umOfMm(typed) === undefined ? true : undefined}
      className="field text-right font-mono"
      inputMode="decimal"
      value={typed ?? mmText(um)}
      onBlur={() => setTyped(null)}
      onChange={(event) => {
        setTyped(event.target.value);
        const next = umOfMm(event.target.value);
        if (next !== undefined) onUm(next);
      }}
    />
  );
}

export interface CornersTableProps {
  readonly polygon: readonly Corner[];
  readonly readOnly: boolean;
  readonly onCorners: (polygon: Corner[]) => void;
}

/** The corners of a zone in numbers: millimetres on the view, y upwards, kept as whole micrometres. */
export function CornersTable({ polygon, readOnly, onCorners }: CornersTableProps) {
  const t = useMessages('plans');
  const put = (place: number, corner: Corner) => onCorners(polygon.map((one, at) => (at === place ? corner : one)));
  return (
    <div className="flex flex-col gap-2">
      <table className="w-full border-collapse">
        <caption className="sr-only">{t('corners')}</caption>
        <thead>
          <tr className="border-b border-line-strong text-left text-sm text-ink-soft">
            <th scope="col">{t('corner')}</th>
            <th scope="col">{t('xMm')}</th>
            <th scope="col">{t('yMm')}</th>
            {readOnly ? null : <th scope="col">{t('rows')}</th>}
          </tr>
        </thead>
        <tbody>
          {polygon.map(([x, y], place) => (
            <tr key={place} className="border-b border-line">
              <th scope="row" className="pr-2 text-left font-normal">
                {place + 1}
              </th>
              <td>
                <Millimetres
                  label={t('xOf', { number: place + 1 })}
                  um={x}
                  readOnly={readOnly}
                  onUm={(um) => put(place, [um, y])}
                />
              </td>
              <td>
                <Millimetres
                  label={t('yOf', { number: place + 1 })}
                  um={y}
                  readOnly={readOnly}
                  onUm={(um) => put(place, [x, um])}
                />
              </td>
              {readOnly ? null : (
                <td>
                  <Button
                    kind="bare"
                    aria-label={t('remove', { name: t('cornerNumber', { number: place + 1 }) })}
                    onClick={() => onCorners(polygon.filter((_, at) => at !== place))}
                  >
                    ×
                  </Button>
                </td>
              )}
            </tr>
          ))}
        </tbody>
      </table>
      {readOnly ? null : (
        <div>
          <Button onClick={() => onCorners([...polygon, polygon.at(-1) ?? [0, 0]])}>{t('addCorner')}</Button>
        </div>
      )}
    </div>
  );
}

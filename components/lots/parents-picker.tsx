'use client';

import { useState } from 'react';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import type { Lot } from '@/services/contracts/parts';

export type LotChoice = Pick<Lot, 'id' | 'kind' | 'number'>;

/** Finds lots by number and keeps those that were chosen. */
export function ParentsPicker({ chosen, onChange }: { chosen: readonly LotChoice[]; onChange: (lots: LotChoice[]) => void }) {
  const t = useMessages('lots');
  const [text, setText] = useState('');
  const asked = text.trim();
  const { answer } = useAnswer<{ items: LotChoice[] }>(
    asked.length < 2 ? null : `/api/lots?limit=8&number=${encodeURIComponent(asked)}`,
  );
  const found = (answer?.items ?? []).filter(({ id }) => chosen.every((one) => one.id !== id));
  const named = ({ kind, number }: LotChoice) => `${t(`kinds.${kind}`)} ${number}`;
  return (
    <fieldset className="flex flex-col gap-2">
      <legend className="font-semibold">{t('madeFrom')}</legend>
      {chosen.length === 0 ? <p className="text-ink-soft">{t('noParents')}</p> : null}
      <ul className="flex flex-wrap gap-2">
        {chosen.map((one) => (
          <li key={one.id}>
            <Button glyph="away" onClick={() => onChange(chosen.filter(({ id }) => id !== one.id))}>
              {t('remove', { lot: named(one) })}
            </Button>
          </li>
        ))}
      </ul>
      <label className="flex flex-col gap-1">
        <span>{t('fromSearch')}</span>
        <input className="field font-mono" value={text} onChange={(event) => setText(event.target.value)} autoComplete="off" />
      </label>
      <ul className="flex flex-wrap gap-2">
        {found.map((one) => (
          <li key={one.id}>
            <Button
              onClick={() => {
                onChange([...chosen, one]);
                setText('');
              }}
            >
              {t('add', { lot: named(one) })}
            </Button>
          </li>
        ))}
      </ul>
    </fieldset>
  );
}

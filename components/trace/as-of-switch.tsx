'use client';

import { useState } from 'react';
import { dayFrom } from '@/components/forms/day-text';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';

/** Chooses the day as of which the history is read. */
export function AsOfSwitch({ day, onChoose }: { day: string; onChoose: (day: string) => void }) {
  const t = useMessages('trace');
  const [text, setText] = useState(day);
  const [unclear, setUnclear] = useState(false);
  return (
    <form
      data-print="hide"
      className="flex flex-wrap items-end gap-3"
      onSubmit={(event) => {
        event.preventDefault();
        const chosen = text.trim() === '' ? '' : dayFrom(text);
        setUnclear(chosen === undefined);
        if (chosen !== undefined) onChoose(chosen);
      }}
    >
      <label className="flex flex-col gap-1">
        <span className="font-semibold">{t('asOf')}</span>
        <span className="text-sm text-ink-soft">{t('asOfHint')}</span>
        <input
          className="field max-w-44 font-mono"
          inputMode="numeric"
          placeholder="2026-03-09"
          aria-invalid={unclear || undefined}
          value={text}
          onChange={(event) => setText(event.target.value)}
        />
      </label>
      <Button type="submit">{t('show')}</Button>
      {day === '' ? null : (
        <Button
          kind="bare"
          onClick={() => {
            setText('');
            onChoose('');
          }}
        >
          {t('now')}
        </Button>
      )}
      {unclear ? (
        <p role="alert" className="font-semibold text-reject">
          {t('notADay')}
        </p>
      ) : null}
    </form>
  );
}

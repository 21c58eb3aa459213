'use client';

import { useState, type FormEvent } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { pitchOfWidth } from './picture-scale';

/** Before anything is marked on a picture of unknown scale, a person says how wide it is. */
export function ScaleField({ widthPx, onPitch }: { widthPx: number; onPitch: (pitchUm: number) => void }) {
  const t = useMessages('evidence');
  const [typed, setTyped] = useState('');
  const [wrong, setWrong] = useState(false);
  const take = (event: FormEvent) => {
    event.preventDefault();
    const pitch = pitchOfWidth(typed, widthPx);
    setWrong(pitch === null);
    if (pitch !== null) onPitch(pitch);
  };
  return (
    <form onSubmit={take} className="flex flex-wrap items-center gap-x-3 gap-y-1 border border-unsure bg-raised px-3 py-1">
      <p className="min-w-48 flex-1 text-sm">{t('noScale')}</p>
      <label className="flex items-center gap-2">
        <span>{t('across')}</span>
        <input
          className="field max-w-24 text-right font-mono"
          inputMode="decimal"
          autoComplete="off"
          aria-invalid={wrong || undefined}
          value={typed}
          onChange={(event) => setTyped(event.target.value)}
        />
      </label>
      <Button type="submit">{t('setScale')}</Button>
      {wrong ? (
        <p role="alert" className="w-full text-sm font-semibold text-reject">
          {t('scaleWrong')}
        </p>
      ) : null}
    </form>
  );
}

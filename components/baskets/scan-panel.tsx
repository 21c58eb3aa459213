'use client';

import { useState } from 'react';
import { usePageScanner } from '@/components/scanner/page-scanner';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Glyph, type GlyphName } from '@/components/ui/glyph';
import { toneText, toneWash, type Tone as Meaning } from '@/components/ui/tones';
import { usualPrefix } from '@/services/contracts/workstations';
import type { BasketAnswer } from '@/services/contracts/baskets';
import type { ScanQueue } from './use-scan-queue';
import type { LastScan } from './use-basket';

const looks: Readonly<Record<LastScan['tone'], { readonly meaning: Meaning; readonly glyph: GlyphName }>> = {
  added: { meaning: 'accept', glyph: 'accept' },
  again: { meaning: 'accent', glyph: 'information' },
  unknown: { meaning: 'unsure', glyph: 'indeterminate' },
  wrong: { meaning: 'reject', glyph: 'reject' },
};

const words = [
  'added',
  'again',
  'unknown',
  'wrong-part',
  'wrong-operation',
  'already-accepted',
  'undecided',
  'held',
  'elsewhere',
  'not-inspectable',
  'full',
  'not-yours',
  'ended',
  'broken',
] as const;

/** The word of the last scan, large enough to be read at arm's length: whoever cannot hear the tone sees it. */
export function LastScanBlock({ last }: { last: LastScan | null }) {
  const t = useMessages('baskets');
  const { scanPrefix } = { scanPrefix: usePageScanner().here?.scanPrefix ?? usualPrefix };
  if (!last)
    return (
      <div className="flex min-h-32 flex-col justify-center rounded border border-line-strong bg-raised px-4 py-3">
        <p className="text-xl font-semibold">{t('scanHere')}</p>
        <p className="text-ink-soft">{t('scanHint', { prefix: scanPrefix })}</p>
      </div>
    );
  const { meaning, glyph } = looks[last.tone];
  const known = words.find((word) => word === last.word);
  return (
    <div
      data-scan={last.word}
      className={`flex min-h-32 items-center gap-4 rounded border border-l-8 border-current px-4 py-3 ${toneText[meaning]} ${toneWash[meaning]}`}
    >
      <Glyph name={glyph} pixels={44} />
      <div className="min-w-0">
        <p className="text-xl font-bold">{t(`words.${known ?? 'refused'}`)}</p>
        {last.scan === '' ? null : <p className="font-mono text-2xl break-all">{last.scan}</p>}
        {last.detail === null ? null : <p className="text-ink">{last.detail}</p>}
      </div>
    </div>
  );
}

/** In, scanned, out, and how many are to go. */
export function Counts({ counts }: { counts: BasketAnswer['counts'] }) {
  const t = useMessages('baskets');
  const left = counts.in - counts.scanned - counts.out;
  const cell = (name: 'in' | 'scanned' | 'out', large: boolean) => (
    <div className="px-3 py-1 text-center">
      <dd data-count={name} className={`font-mono font-semibold tabular-nums ${large ? 'text-3xl' : 'text-2xl'}`}>
        {counts[name]}
      </dd>
      <dt className="text-sm text-ink-soft">{t(name)}</dt>
    </div>
  );
  return (
    <div className="rounded border border-line bg-raised">
      <dl className="grid grid-cols-3 items-end divide-x divide-line">
        {cell('in', false)}
        {cell('scanned', true)}
        {cell('out', false)}
      </dl>
      <p
        className={`border-t border-line px-3 py-1 text-center font-semibold ${left < 0 ? 'text-reject' : left === 0 ? 'text-accept' : ''}`}
      >
        {left < 0 ? t('over', { count: -left }) : t('left', { count: left })}
      </p>
    </div>
  );
}

/** What the server has not acknowledged yet, and why. */
export function Waiting({ queue }: { queue: ScanQueue }) {
  const t = useMessages('baskets');
  if (!queue.stuck && queue.waiting.length < 3 && !queue.unkept) return null;
  return (
    <div role="status" className="rounded border border-l-4 border-current bg-unsure-wash px-3 py-2 text-unsure">
      <p className="font-semibold">{t('waiting', { count: queue.waiting.length })}</p>
      <p className="text-ink">
        {queue.unkept ? t('unkept') : queue.stuck?.status === 401 ? t('waitingSignIn') : t('waitingKept')}
      </p>
    </div>
  );
}

/** For a mark that no scanner reads. */
export function TypedSerial({ onAdd }: { onAdd: (serial: string) => void }) {
  const t = useMessages('baskets');
  const [serial, setSerial] = useState('');
  return (
    <form
      className="flex items-end gap-2"
      onSubmit={(event) => {
        event.preventDefault();
        if (serial.trim() === '') return;
        onAdd(serial.trim());
        setSerial('');
      }}
    >
      <label className="flex min-w-0 flex-1 flex-col gap-0.5">
        <span>{t('serial')}</span>
        <input
          className="field font-mono"
          autoComplete="off"
          spellCheck={false}
          value={serial}
          onChange={(event) => setSerial(event.target.value)}
        />
      </label>
      <Button size="capture" type="submit" disabled={serial.trim() === ''}>
        {t('add')}
      </Button>
    </form>
  );
}

'use client';

import { useMessages } from '@/components/theme/use-messages';
import type { GlyphName } from '@/components/ui/glyph';
import { StateWord } from '@/components/ui/state-word';
import type { Tone } from '@/components/ui/tones';
import type { CheckStanding } from '@/services/contracts/checks';

const looks: Readonly<Record<CheckStanding['state'], { glyph: GlyphName; tone: Tone }>> = {
  failed: { glyph: 'cross-solid', tone: 'reject' },
  lapsed: { glyph: 'cross', tone: 'reject' },
  never: { glyph: 'dotted', tone: 'reject' },
  owed: { glyph: 'back', tone: 'unsure' },
  'due-soon': { glyph: 'half-disc', tone: 'unsure' },
  good: { glyph: 'closed', tone: 'accept' },
};

/** How a check stands, in words and shape. */
export function CheckState({ state }: { state: CheckStanding['state'] }) {
  const t = useMessages('checks');
  return <StateWord state={state} word={t(`states.${state}`)} {...looks[state]} />;
}

/** A window as people say it: from 1000 µW/cm². */
export function useWindowWords(): (window: NonNullable<CheckStanding['window']>) => string {
  const t = useMessages('checks');
  return ({ unit, lower, upper }) => {
    if (lower !== null && upper !== null) return t('between', { lower, upper, unit });
    return lower === null ? t('upTo', { value: upper ?? '', unit }) : t('from', { value: lower, unit });
  };
}

'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from './glyph';
import type { GlyphName } from './glyph';
import { isKnownState, knownStates } from './known-states';
import { toneText } from './tones';
import type { Tone } from './tones';

export interface StateWordProps {
  /** A known state ('in-process', 'approved' …); another name is shown as it is, with a plain dot. */
  state: string;
  /** Replaces the word, where a feature has a better one. */
  word?: string;
  glyph?: GlyphName;
  tone?: Tone;
}

/** A state as shape and word; colour only repeats what both say. */
export function StateWord({ state, word, glyph, tone }: StateWordProps) {
  const t = useMessages('ui');
  const known = isKnownState(state) ? knownStates[state] : undefined;
  const said = word ?? (isKnownState(state) ? t(`state.${state}`) : state);
  return (
    <span className={`inline-flex items-baseline gap-1.5 whitespace-nowrap ${toneText[tone ?? known?.tone ?? 'plain']}`}>
      <Glyph name={glyph ?? known?.glyph ?? 'dot'} pixels={14} />
      <span>{said}</span>
    </span>
  );
}

'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from './glyph';
import { toneText, toneWash } from './tones';
import type { Tone } from './tones';

export const verdicts = ['accept', 'reject', 'indeterminate', 'not-evaluable'] as const;
export type Verdict = (typeof verdicts)[number];

const tones: Record<Verdict, Tone> = { accept: 'accept', reject: 'reject', indeterminate: 'unsure', 'not-evaluable': 'soft' };

export interface VerdictMarkProps {
  verdict: Verdict;
  /** 'large' for the verdict of a whole inspection. */
  size?: 'small' | 'large';
  /** Why, in a sentence. */
  reason?: string;
}

/** A verdict: its own shape, its word, and in large its reason. */
export function VerdictMark({ verdict, size = 'small', reason }: VerdictMarkProps) {
  const t = useMessages('ui');
  const tone = tones[verdict];
  if (size === 'small') {
    return (
      <span className={`inline-flex items-center gap-1.5 whitespace-nowrap font-semibold ${toneText[tone]}`} title={reason}>
        <Glyph name={verdict} />
        {t(`verdict.${verdict}`)}
      </span>
    );
  }
  return (
    <span
      className={`inline-flex items-center gap-3 border-l-4 border-current py-2 pr-4 pl-3 ${toneText[tone]} ${toneWash[tone]}`}
    >
      <Glyph name={verdict} pixels={28} />
      <span>
        <span className="block text-lg leading-tight font-bold">{t(`verdict.${verdict}`)}</span>
        {reason && <span className="block text-sm text-ink">{reason}</span>}
      </span>
    </span>
  );
}

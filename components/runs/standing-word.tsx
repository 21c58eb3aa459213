'use client';

import { useMessages } from '@/components/theme/use-messages';
import { StateWord } from '@/components/ui/state-word';
import type { RunSummary } from '@/services/contracts/runs';

const looks = {
  incomplete: { glyph: 'dotted', tone: 'unsure' },
  good: { glyph: 'accept', tone: 'accept' },
  void: { glyph: 'not-evaluable', tone: 'reject' },
} as const;

/** How the values of a run stand, as shape and word. */
export function StandingWord({ standing }: Pick<RunSummary, 'standing'>) {
  const t = useMessages('runs');
  return <StateWord state={standing} word={t(`standings.${standing}`)} {...looks[standing]} />;
}

'use client';

import { useMessages } from '@/components/theme/use-messages';
import type { GlyphName } from '@/components/ui/glyph';
import { StateWord } from '@/components/ui/state-word';
import type { Tone } from '@/components/ui/tones';
import type { EquipmentHead } from '@/services/contracts/equipment';

const looks: Readonly<Record<EquipmentHead['state'], { glyph: GlyphName; tone: Tone }>> = {
  failed: { glyph: 'cross-solid', tone: 'reject' },
  uncalibrated: { glyph: 'dotted', tone: 'reject' },
  lapsed: { glyph: 'cross', tone: 'reject' },
  'due-soon': { glyph: 'half-disc', tone: 'unsure' },
  valid: { glyph: 'closed', tone: 'accept' },
  retired: { glyph: 'leaving', tone: 'soft' },
};

/** Whether equipment counts today, in words and shape. */
export function EquipmentState({ state }: { state: EquipmentHead['state'] }) {
  const t = useMessages('equipment');
  return <StateWord state={state} word={t(`states.${state}`)} {...looks[state]} />;
}

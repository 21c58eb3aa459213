'use client';

import { useMessages } from '@/components/theme/use-messages';
import { StateWord } from '@/components/ui/state-word';
import type { TechniqueHead } from '@/services/contracts/techniques';

/** Where a technique issue stands, in words and shape. */
export function TechniqueState({ state }: { state: TechniqueHead['state'] }) {
  const t = useMessages('techniques');
  return state === 'withdrawn-for-error' ? (
    <StateWord state="withdrawn" word={t('withdrawnForError')} />
  ) : (
    <StateWord state={state} />
  );
}

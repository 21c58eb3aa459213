'use client';

import { useWorkstation } from '@/components/theme/workstation';
import { renderSentence, type SentenceParameters } from '@/services/engine/sentences/sentence';

/** What the engine says, in the reader's language: codes and parameters are kept, words are made here. */
export function EngineSentence({ sentence }: { sentence: { readonly code: string; readonly parameters: SentenceParameters } }) {
  const { locale } = useWorkstation();
  return <>{renderSentence(sentence.code, sentence.parameters, locale)}</>;
}

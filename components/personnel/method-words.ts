'use client';

import { useSentences } from '@/components/theme/use-messages';
import { method } from '@/services/contracts/common';

/** What a method is called in the reader's language. */
export function useMethodWords(): (name: string) => string {
  const sentence = useSentences('personnel');
  return (name) => (method.safeParse(name).success ? sentence(`methods.${name}`) : name);
}

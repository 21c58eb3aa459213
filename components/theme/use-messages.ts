'use client';

import { useTranslations } from 'use-intl';
import type { Namespace } from './catalogue';

/** For client components: `const t = useMessages('parts'); t('title')`. Names are checked by the compiler. */
export function useMessages<N extends Namespace>(namespace: N) {
  return useTranslations(namespace);
}

type Parameters = Record<string, string | number | Date>;
interface LooseTranslator {
  (name: string, parameters?: Parameters): string;
  has(name: string): boolean;
}

/**
 * For sentences whose code comes with data (an engine reason, a gate, an event): `sentence('readings.over-limit', { value })`.
 * An unknown code is shown as it is, so that nothing is hidden.
 */
export function useSentences(namespace: Namespace): (code: string, parameters?: Parameters) => string {
  const translate = useTranslations(namespace) as unknown as LooseTranslator;
  return (code, parameters) => (translate.has(code) ? translate(code, parameters) : code);
}

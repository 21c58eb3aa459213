'use client';

import { useMessages } from '@/components/theme/use-messages';
import type { ProcessRow } from '@/services/contracts/baskets';

/** A window in words: '20 to 60 min', 'at most 71 °C'. */
export function useWindowWords(): (row: Pick<ProcessRow, 'lower' | 'upper' | 'unit'>) => string {
  const t = useMessages('baskets');
  return ({ lower, upper, unit }) => {
    if (lower !== null && upper !== null) return t('window.both', { lower, upper, unit });
    if (lower !== null) return t('window.least', { lower, unit });
    return upper !== null ? t('window.most', { upper, unit }) : t('window.none', { unit });
  };
}

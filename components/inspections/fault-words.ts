'use client';

import { decimalFrom } from '@/components/forms/decimal-text';
import { useMessages } from '@/components/theme/use-messages';
import type { EntryFault } from '@/services/contracts/live-judgement';

/** What is wrong with a typed value: that it is no number in the reader's words, anything else as the engine says it. */
export function useFaultWords(): (faults: readonly EntryFault[], row: string, value: string) => string | undefined {
  const t = useMessages('inspections');
  return (faults, row, value) => {
    const fault = faults.find(({ path }) => path.startsWith(`${row}.`));
    if (!fault) return undefined;
    return fault.path.endsWith('.value') && decimalFrom(value) === undefined ? t('notDecimal', { value }) : fault.message;
  };
}

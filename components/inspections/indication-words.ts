'use client';

import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';
import type { Verdict } from '@/components/ui/verdict-mark';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { InspectionContent } from '@/services/contracts/inspection-content';

export type Indication = InspectionContent['indications'][number];

/** Usual kinds of discontinuity of an investment casting, in the order an inspector meets them. */
export const usualTypes = ['gas-pore', 'shrinkage', 'inclusion', 'crack', 'cold-shut', 'misrun', 'residual-core'] as const;

/** How a size was taken where no picture gives it. */
export const sizeBases = ['as-bled-out', 'wiped-magnified', 'comparator', 'image'] as const;

const known: readonly string[] = usualTypes;

/** A type in the reader's language; one that only the plan knows is shown as the plan writes it. */
export function useTypeWords(): (type: string) => string {
  const t = useMessages('inspections');
  return (type) => (known.includes(type) ? t(`types.${type as (typeof usualTypes)[number]}`) : type);
}

/** Length and width as the rules took them, in the plan's unit: `0.38 × 0.3 mm`, with the reader's decimal sign. */
export function useSizeWords(unit: string): (row: EvaluationAnswer['indications'][number] | undefined) => string {
  const { locale } = useWorkstation();
  const local = (text: string) => (locale === 'fr' ? text.replace('.', ',') : text);
  return (row) => (row?.length ? `${local(row.length)} × ${local(row.width ?? '–')} ${unit}` : '–');
}

/** What the rules say of one indication: the worst row that names it; nothing while no rule judged it. */
export function verdictOf(evaluation: EvaluationAnswer | null, id: string): Verdict | undefined {
  const row = evaluation?.indications.find((one) => one.id === id);
  if (!evaluation || !row) return undefined;
  const named = evaluation.rules.filter(({ indications }) => indications.includes(id)).map(({ verdict }) => verdict);
  const worst = (['reject', 'indeterminate', 'not-evaluable'] as const).find((verdict) => named.includes(verdict));
  if (worst) return worst;
  if (evaluation.unjudged.includes(id)) return 'indeterminate';
  return row.judged ? 'accept' : undefined;
}

/** The next free number for an indication. */
export function nextId(indications: readonly Indication[]): string {
  return String(Math.max(0, ...indications.map(({ id }) => Number(id) || 0)) + 1);
}

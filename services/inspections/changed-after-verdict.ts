import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { InspectionContent } from '@/services/contracts/inspection-content';

/** A value that was changed or taken away after its verdict had been shown. */
export interface ChangedValue {
  readonly field: string;
  readonly before: unknown;
  readonly verdictShown: string;
}

interface Entry {
  readonly field: string;
  readonly value: unknown;
}

type Verdict = EvaluationAnswer['verdict'];

/** Several entries of one number are told apart by their order: `readings.12`, `readings.12#2`. */
function entries<T>(list: string, rows: readonly T[], key: (row: T) => string): Entry[] {
  const seen = new Map<string, number>();
  return rows.map((row) => {
    const count = (seen.get(key(row)) ?? 0) + 1;
    seen.set(key(row), count);
    return { field: `${list}.${key(row)}${count > 1 ? `#${String(count)}` : ''}`.slice(0, 120), value: row };
  });
}

function allEntries(content: InspectionContent): Entry[] {
  return [
    ...entries('readings', content.readings, ({ characteristic }) => characteristic),
    ...entries('attributes', content.attributes, ({ number }) => number),
    ...entries('process', content.process, ({ number }) => number),
    ...entries('indications', content.indications, ({ id }) => id),
  ];
}

/** The worst verdict among the rows that name an indication; accept when it was judged and none names it. */
export function verdictOfIndication(evaluation: EvaluationAnswer, id: string): Verdict | 'not-judged' {
  const named = evaluation.rules.filter(({ indications }) => indications.includes(id)).map(({ verdict }) => verdict);
  const worst = (['reject', 'indeterminate', 'not-evaluable'] as const).find((verdict) => named.includes(verdict));
  return worst ?? (evaluation.indications.some((row) => row.id === id && row.judged) ? 'accept' : 'not-judged');
}

/** The verdict shown for each field, in the form of `entries`. */
function verdicts(evaluation: EvaluationAnswer): Map<string, string> {
  const rows = [
    ...entries('readings', evaluation.readings, ({ characteristic }) => characteristic),
    ...entries('attributes', evaluation.attributes, ({ number }) => number),
    ...entries('process', evaluation.process, ({ number }) => number),
  ];
  const shown = new Map(rows.map(({ field, value }) => [field, (value as { verdict: Verdict }).verdict as string]));
  for (const { id } of evaluation.indications) shown.set(`indications.${id}`, verdictOfIndication(evaluation, id));
  return shown;
}

/** What a save changes or removes among values whose verdict the person had already seen. */
export function changedAfterVerdict(
  before: InspectionContent,
  after: InspectionContent,
  shown: EvaluationAnswer | null,
): ChangedValue[] {
  if (!shown) return [];
  const verdictOf = verdicts(shown);
  const now = new Map(allEntries(after).map(({ field, value }) => [field, JSON.stringify(value)]));
  return allEntries(before).flatMap(({ field, value }) => {
    const verdictShown = verdictOf.get(field);
    return verdictShown === undefined || now.get(field) === JSON.stringify(value) ? [] : [{ field, before: value, verdictShown }];
  });
}

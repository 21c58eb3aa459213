import type { InspectionContent } from '@/services/contracts/inspection-content';

/** One entry that two versions of a draft have differently; an absent one is null. */
export interface Difference {
  readonly list: 'readings' | 'attributes' | 'process' | 'indications' | 'acts' | 'examined' | 'notes';
  readonly name: string;
  readonly mine: string | null;
  readonly theirs: string | null;
}

type Texts = ReadonlyMap<string, string>;

function keyed<Row>(rows: readonly Row[], key: (row: Row) => string, text: (row: Row) => string): Texts {
  return new Map(rows.map((row) => [key(row), text(row)]));
}

function shapeText(shape: unknown): string {
  if (typeof shape !== 'object' || shape === null) return '';
  return Object.values(shape)
    .map((value) => (Array.isArray(value) ? value.flat().join(' ') : String(value)))
    .join(' ');
}

function textsOf(content: InspectionContent): Record<Difference['list'], Texts> {
  return {
    readings: keyed(
      content.readings.filter((one) => !one.void),
      (one) => one.characteristic,
      (one) => `${one.value} ${one.unit}`,
    ),
    attributes: keyed(
      content.attributes,
      (one) => one.number,
      (one) => [one.result, one.reason ?? ''].join(' ').trim(),
    ),
    process: keyed(
      content.process,
      (one) => one.number,
      (one) => `${one.value} ${one.unit}`,
    ),
    indications: keyed(
      content.indications,
      (one) => one.id,
      (one) => `${one.type} ${one.view} ${shapeText(one.shape)} ${shapeText(one.relevant)}`.trim(),
    ),
    acts: keyed(
      content.acts,
      (one) => one.kind,
      (one) =>
        [
          one.at ?? '',
          ...Object.entries(one.values).map(([name, value]) => `${name} ${value}`),
          `${String(one.equipment.length)} ×`,
        ]
          .join(', ')
          .trim(),
    ),
    examined: new Map([['', content.examined ? '✓' : '–']]),
    notes: new Map([['', content.notes]]),
  };
}

const lists = ['readings', 'attributes', 'process', 'indications', 'acts', 'examined', 'notes'] as const;

/** Every entry in which two versions differ, list by list, so that a person can choose knowingly. */
export function draftDifferences(mine: InspectionContent, theirs: InspectionContent): Difference[] {
  const [ours, others] = [textsOf(mine), textsOf(theirs)];
  return lists.flatMap((list) => {
    const names = new Set([...ours[list].keys(), ...others[list].keys()]);
    return [...names].flatMap((name): Difference[] => {
      const [a, b] = [ours[list].get(name) ?? null, others[list].get(name) ?? null];
      return a === b ? [] : [{ list, name, mine: a, theirs: b }];
    });
  });
}

import type { InspectionAnswer } from '@/services/contracts/inspections';

export interface CharacteristicRow {
  readonly number: string;
  readonly title?: string;
  readonly unit: string;
  readonly nominal?: string;
  readonly lower?: string;
  readonly upper?: string;
  readonly decision: { readonly rule: string; readonly g?: string };
}

export interface NumberedRow {
  readonly number: string;
  readonly title?: string;
}

export interface ProcessRow extends NumberedRow {
  readonly unit: string;
  readonly lower?: string;
  readonly upper?: string;
}

export interface ZoneRow {
  readonly id: string;
  readonly view: string;
  readonly polygon: readonly (readonly [number, number])[];
}

interface RuleSet {
  readonly types?: readonly string[];
  readonly rules?: readonly { readonly types?: readonly string[] }[];
}

/** What this operation asks, in drawing order. */
export interface Asked {
  readonly characteristics: readonly CharacteristicRow[];
  readonly attributes: readonly NumberedRow[];
  readonly process: readonly ProcessRow[];
  readonly zones: readonly ZoneRow[];
  readonly hasRules: boolean;
  /** Names of indication types that the plan's rules use, besides the usual ones. */
  readonly ruledTypes: readonly string[];
}

// Null stands for absent in criteria; the pages want one form of it.
function rows<Row>(criteria: InspectionAnswer['criteria'], key: string): Row[] {
  const list = criteria[key];
  if (!Array.isArray(list)) return [];
  return (list as Record<string, unknown>[]).map(
    (row) => Object.fromEntries(Object.entries(row).filter(([, value]) => value !== null)) as Row,
  );
}

/** The plan's criteria were judged for faults before it was approved, so that their rows have these forms. */
export function asked(answer: InspectionAnswer): Asked {
  const sets = rows<RuleSet>(answer.criteria, 'indicationRules');
  const named = sets.flatMap(({ types = [], rules = [] }) => [...types, ...rules.flatMap((rule) => rule.types ?? [])]);
  return {
    characteristics: rows(answer.criteria, 'characteristics'),
    attributes: rows(answer.criteria, 'attributes'),
    process: rows(answer.criteria, 'process'),
    zones: rows(answer.criteria, 'zones'),
    hasRules: sets.length > 0,
    ruledTypes: [...new Set(named)].filter((type) => type !== '*'),
  };
}

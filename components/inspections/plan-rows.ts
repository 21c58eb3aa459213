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

function rows<Row>(criteria: InspectionAnswer['criteria'], key: string): Row[] {
  const list = criteria[key];
  return Array.isArray(list) ? (list as Row[]) : [];
}

/** What this operation asks, in drawing order. The plan's criteria were judged for faults before it was approved. */
export function asked(answer: InspectionAnswer) {
  return {
    characteristics: rows<CharacteristicRow>(answer.criteria, 'characteristics'),
    attributes: rows<NumberedRow>(answer.criteria, 'attributes'),
    process: rows<ProcessRow>(answer.criteria, 'process'),
    zones: rows<ZoneRow>(answer.criteria, 'zones'),
    hasRules: rows(answer.criteria, 'indicationRules').length > 0,
  };
}

import { decimalFrom } from '@/components/forms/decimal-text';
import type { Technique, TechniqueContent } from '@/services/contracts/techniques';

export interface ParameterRow {
  name: string;
  value: string;
  unit: string;
  essential: boolean;
}
export interface WindowRow {
  title: string;
  unit: string;
  lower: string;
  upper: string;
}
export interface CheckRow extends WindowRow {
  scope: string;
  kind: string;
  validHours: string;
}

/** A technique as the form holds it: every field a text. */
export interface TechniqueValues {
  number: string;
  method: string;
  title: string;
  standard: string;
  customerApproval: string;
  content: {
    parameters: ParameterRow[];
    windows: WindowRow[];
    views: { name: string }[];
    checks: CheckRow[];
  };
  indicator: string;
}

export const emptyRows = {
  parameters: { name: '', value: '', unit: '', essential: false },
  windows: { title: '', unit: '', lower: '', upper: '' },
  views: { name: '' },
  checks: { scope: '', title: '', kind: 'opening', validHours: '24', unit: '', lower: '', upper: '' },
} as const;

/** What a technique holds, as texts; an empty form without one. */
export function valuesOf(technique: Technique | undefined): TechniqueValues {
  const content = technique?.content;
  return {
    number: technique?.number ?? '',
    method: technique?.method ?? '',
    title: technique?.title ?? '',
    standard: technique?.standard ?? '',
    customerApproval: technique?.customerApproval ?? '',
    content: {
      parameters: (content?.parameters ?? []).map(({ unit, ...row }) => ({ ...row, unit: unit ?? '' })),
      windows: (content?.windows ?? []).map(({ title, unit, lower, upper }) => ({
        ...{ title, unit, lower: lower ?? '', upper: upper ?? '' },
      })),
      views: (content?.views ?? []).map((name) => ({ name })),
      checks: (content?.checks ?? []).map(({ scope, title, kind, validHours, window }) => ({
        ...{ scope, title, kind, validHours: String(validHours) },
        ...{ unit: window?.unit ?? '', lower: window?.lower ?? '', upper: window?.upper ?? '' },
      })),
    },
    indicator: content?.indicator ?? '',
  };
}

const orNull = (text: string) => (text.trim() === '' ? null : text.trim());
const decimalOrNull = (text: string) => (text.trim() === '' ? null : (decimalFrom(text) ?? text.trim()));
const filled = <Row extends object>(rows: readonly Row[], ...names: readonly (keyof Row)[]) =>
  rows.filter((row) => names.some((name) => String(row[name]).trim() !== ''));

function contentOf({ content, indicator }: TechniqueValues): Omit<TechniqueContent, 'checks'> & { checks: object[] } {
  const limits = ({ unit, lower, upper }: WindowRow) => ({
    ...{ unit: unit.trim(), lower: decimalOrNull(lower), upper: decimalOrNull(upper) },
  });
  return {
    parameters: filled(content.parameters, 'name', 'value').map(({ unit, ...row }) => ({ ...row, unit: orNull(unit) })),
    windows: filled(content.windows, 'title', 'unit', 'lower', 'upper').map((row) => ({ title: row.title, ...limits(row) })),
    views: filled(content.views, 'name').map(({ name }) => name),
    checks: filled(content.checks, 'scope', 'title').map(({ scope, title, kind, validHours, ...row }) => ({
      ...{ scope, title, kind, validHours: Number(validHours) },
      window: row.unit.trim() === '' ? null : limits({ title, ...row }),
    })),
    indicator: orNull(indicator),
  };
}

/** What is sent of a draft; rows left wholly empty are left out. */
export function bodyOf(values: TechniqueValues): Record<string, unknown> {
  const { title, standard, customerApproval } = values;
  return {
    ...{ title, standard, content: contentOf(values) },
    ...(customerApproval.trim() === '' ? {} : { customerApproval: customerApproval.trim() }),
  };
}

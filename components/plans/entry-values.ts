export type EntryKind = 'text' | 'decimal' | 'whole' | 'choice' | 'words' | 'marks' | 'yes';

export interface Option {
  readonly value: string;
  readonly text: string;
}

const decimalWithComma = /^-?\d+,\d+$/;

/** What the text of a field means in the plan; an empty field is an absent entry. What is no number stays as typed, for the fault. */
export function valueOfText(kind: EntryKind, text: string): unknown {
  const trimmed = text.trim();
  if (trimmed === '') return undefined;
  if (kind === 'decimal') return decimalWithComma.test(trimmed) ? trimmed.replace(',', '.') : trimmed;
  if (kind === 'whole') return /^\d{1,9}$/.test(trimmed) ? Number(trimmed) : trimmed;
  if (kind === 'words') return trimmed.split(/[\s,;]+/).filter((word) => word !== '');
  return text;
}

/** An entry as the text of its field. */
export function textOfValue(value: unknown): string {
  if (Array.isArray(value)) return value.join(', ');
  return typeof value === 'string' || typeof value === 'number' ? String(value) : '';
}

/** An entry as it is read: choices by their words, nothing as a dash. */
export function readValue(value: unknown, options: readonly Option[]): string {
  const words = (one: unknown) => options.find((option) => option.value === one)?.text ?? textOfValue(one);
  const text = Array.isArray(value) ? value.map(words).join(', ') : words(value);
  return text === '' ? '–' : text;
}

import { Problem } from './problem';

/** An opaque `next`: the sort key of the last row, base64url of JSON. */
export function keyOf(...parts: readonly (string | number)[]): string {
  return Buffer.from(JSON.stringify(parts), 'utf8').toString('base64url');
}

/** The parts of an `after`; problem invalid-input when it is not one of ours. */
export function partsOfKey(after: string | undefined, count: number): (string | number)[] | null {
  if (after === undefined || after === '') return null;
  try {
    const parts: unknown = JSON.parse(Buffer.from(after, 'base64url').toString('utf8'));
    if (
      Array.isArray(parts) &&
      parts.length === count &&
      parts.every((part) => typeof part === 'string' || typeof part === 'number')
    )
      return parts as (string | number)[];
  } catch {
    // falls through to the one refusal
  }
  throw new Problem('invalid-input', 'after: is not the `next` of a page', [
    { path: 'after', message: 'is not the `next` of a page' },
  ]);
}

/** Cuts a page of `limit` from rows read with one more, and names the key of its last row. */
export function pageOf<Row, Item>(
  rows: readonly Row[],
  limit: number,
  keyParts: (row: Row) => readonly (string | number)[],
  item: (row: Row) => Item,
): { items: Item[]; next: string | null } {
  const shown = rows.slice(0, limit);
  const last = shown.at(-1);
  return { items: shown.map(item), next: rows.length > limit && last !== undefined ? keyOf(...keyParts(last)) : null };
}

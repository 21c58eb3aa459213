import type { PlanContent } from '@/services/contracts/plan-content';

export interface PlanDifference {
  /** Dotted path; rows are named by their number, id, name or key, not by their place. */
  readonly path: string;
  readonly before: string | null;
  readonly after: string | null;
}

const nameKeys = ['number', 'id', 'name', 'key', 'operation', 'kind', 'role', 'to', 'nominal'] as const;

function nameOf(row: unknown, place: number): string {
  if (typeof row !== 'object' || row === null) return String(place + 1);
  const named = nameKeys
    .map((key) => (row as Record<string, unknown>)[key])
    .find((value) => typeof value === 'string' && value !== '');
  return typeof named === 'string' ? named : String(place + 1);
}

/** Every leaf by its path. A list of plain values (a polygon, names) is one leaf. */
function leaves(value: unknown, path: string, found: Map<string, string>): void {
  if (Array.isArray(value) && value.some((one) => typeof one === 'object' && one !== null && !Array.isArray(one))) {
    value.forEach((row, place) => leaves(row, `${path}.${nameOf(row, place)}`, found));
  } else if (typeof value === 'object' && value !== null && !Array.isArray(value)) {
    for (const [key, one] of Object.entries(value)) leaves(one, path === '' ? key : `${path}.${key}`, found);
  } else if (value !== undefined && value !== null && !(Array.isArray(value) && value.length === 0)) {
    found.set(path, typeof value === 'string' ? value : JSON.stringify(value));
  }
}

/** What differs between two plan issues, in the order of the later one, what was taken away last. */
export function planDifferences(before: PlanContent, after: PlanContent): PlanDifference[] {
  const [old, now] = [new Map<string, string>(), new Map<string, string>()];
  leaves(before, '', old);
  leaves(after, '', now);
  const paths = [...new Set([...now.keys(), ...old.keys()])];
  return paths
    .filter((path) => old.get(path) !== now.get(path))
    .map((path) => ({ path, before: old.get(path) ?? null, after: now.get(path) ?? null }));
}

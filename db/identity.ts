import { v7 } from 'uuid';
import { execute, selectOne, type Work } from './work';

/** A new opaque id (UUIDv7). */
export function newId(): string {
  return v7();
}

/**
 * The next human number of a kind in the year of `work.now`, e.g. `F-2026-00042`.
 * The counter row is locked until commit, so numbers have no gaps but callers queue: take it late.
 */
export async function nextNumber(work: Work, prefix: string, digits = 5): Promise<string> {
  const year = Number(work.now.slice(0, 4));
  await execute(work, 'INSERT INTO counters (name, year, value) VALUES (?, ?, 1) ON DUPLICATE KEY UPDATE value = value + 1', [
    prefix,
    year,
  ]);
  const row = await selectOne<{ value: number }>(work, 'SELECT value FROM counters WHERE name = ? AND year = ?', [prefix, year]);
  return `${prefix}-${String(year)}-${String(row?.value ?? 0).padStart(digits, '0')}`;
}

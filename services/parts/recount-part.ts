import { partById, requirementsOfParts } from '@/db/repositories/parts';
import { execute, selectOne, type Work } from '@/db/work';
import type { RequirementState } from '@/services/contracts/common';

/** States in which a requirement asks nothing more of the part. */
export const metStates: readonly RequirementState[] = [
  'met',
  'met-by-sample',
  'met-by-ancestor',
  'met-by-outside-certificate',
  'waived',
];

/** Where a part's own state may move by counting; released, shipped and scrapped parts keep theirs. */
function countedState(state: string, met: number, required: number, touched: boolean): string {
  if (!['serialised', 'in-process', 'finished', 'returned'].includes(state)) return state;
  if (required > 0 && met === required) return state === 'returned' ? state : 'finished';
  return state === 'serialised' && !touched ? state : 'in-process';
}

/**
 * Brings a part's counters and state in line with its requirement rows and findings. Call in the transaction that
 * changed them, after `takeRows(work, 'parts', …)`.
 */
export async function recountPart(work: Work, partId: string): Promise<void> {
  const part = await partById(work, partId);
  if (!part) return;
  const rows = (await requirementsOfParts(work, [partId])).get(partId) ?? [];
  const met = rows.filter(({ state }) => metStates.includes(state)).length;
  const next = rows.find(({ state }) => !metStates.includes(state));
  const touched = rows.some(({ state }) => state !== 'open');
  const findings = await selectOne<{ open: number }>(
    work,
    `SELECT COUNT(*) AS open FROM findings WHERE part_id = ? AND state <> 'closed'`,
    [partId],
  );
  await execute(
    work,
    'UPDATE parts SET met_count = ?, requirement_count = ?, next_requirement = ?, open_findings = ?, state = ? WHERE id = ?',
    [met, rows.length, next?.title ?? null, findings?.open ?? 0, countedState(part.state, met, rows.length, touched), partId],
  );
}

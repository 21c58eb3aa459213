import { execute, type Work } from './work';

export type VersionedTable =
  | 'parts'
  | 'lots'
  | 'findings'
  | 'shipments'
  | 'certificates'
  | 'plan_issues'
  | 'order_lines'
  | 'accounts'
  | 'equipment'
  | 'inspection_drafts'
  | 'technique_issues'
  | 'baskets'
  | 'runs'
  | 'workstations';

/**
 * Takes the rows of `ids` by writing them, in id order, so that two who decide about the same rows queue instead of
 * both deciding on stale reads. Call before any decision is read. Answers how many rows exist.
 */
export async function takeRows(work: Work, name: VersionedTable, ids: readonly string[]): Promise<number> {
  let taken = 0;
  for (const rowId of [...new Set(ids)].sort()) {
    taken += await execute(work, `UPDATE ${name} SET version = version + 1 WHERE id = ?`, [rowId]);
  }
  return taken;
}

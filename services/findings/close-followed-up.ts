import { execute, sqlTimeOf, type Work } from '@/db/work';

/**
 * Closes the decided findings of a part whose requirement has been accepted since. Call in the transaction that signed
 * the repeated inspection, under the part's row.
 */
export async function closeFollowedUp(work: Work, partId: string): Promise<void> {
  await execute(
    work,
    `UPDATE findings f JOIN part_requirements r ON r.part_id = f.part_id AND r.requirement_id = f.requirement_id
     SET f.state = 'closed', f.closed_at = ? WHERE f.part_id = ? AND f.state = 'awaiting-follow-up' AND r.state = 'met'`,
    [sqlTimeOf(work.now), partId],
  );
}

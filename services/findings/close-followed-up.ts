import { appendEvent } from '@/db/repositories/events';
import { awaitingFollowUp, type Followed } from '@/db/repositories/findings';
import { execute, sqlTimeOf, type Work } from '@/db/work';
import { Problem } from '@/services/http/problem';

/** A re-interpretation asks for other eyes: whoever signed the first evaluation does not sign the second. */
function refuseSameEvaluator({ decision, firstSigner, laterSigner, number }: Followed): void {
  if (decision !== 're-interpretation' || laterSigner === null || laterSigner !== firstSigner) return;
  const message = `finding ${number} asks for a second evaluation by another person than the first`;
  throw new Problem('not-signable', `1 reason(s): ${message}`, [{ path: 'signer', message }]);
}

/**
 * Closes the decided findings of a part whose requirement has been accepted since, each with its event. Call in the
 * transaction that signed the repeated inspection, under the part's row. Problem not-signable when a re-interpretation
 * was evaluated by the same person again.
 */
export async function closeFollowedUp(work: Work, partId: string): Promise<void> {
  for (const finding of await awaitingFollowUp(work, partId)) {
    refuseSameEvaluator(finding);
    if (finding.requirementState !== 'met') continue;
    await execute(work, `UPDATE findings SET state = 'closed', closed_at = ?, version = version + 1 WHERE id = ?`, [
      sqlTimeOf(work.now),
      finding.id,
    ]);
    await appendEvent(work, {
      kind: 'finding-closed',
      subject: { kind: 'finding', id: finding.id },
      also: [{ kind: 'part', id: partId }],
      details: { finding: finding.number, serial: finding.serial, acceptedBy: finding.laterNumber },
    });
  }
}

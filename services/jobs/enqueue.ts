import { newId } from '@/db/identity';
import { execute, sqlTimeOf, type Work } from '@/db/work';

/** Kinds of work done after commit; each has a handler in services/jobs/handlers.ts. */
export interface JobPayloads {
  readonly 'issue-certificate': { readonly releaseId: string };
  readonly 'mail-certificate': { readonly certificateId: string };
}

export type JobKind = keyof JobPayloads;

/**
 * Puts work into the outbox in the transaction of the change that causes it. The same `uniqueKey` twice is one job.
 * Handlers run at least once and must be idempotent. Answers the job's id.
 */
export async function enqueue<K extends JobKind>(
  work: Work,
  kind: K,
  payload: JobPayloads[K],
  uniqueKey: string | null = null,
): Promise<string> {
  const jobId = newId();
  await execute(
    work,
    'INSERT IGNORE INTO jobs (id, kind, payload, run_after, asked_by, created_at, unique_key) VALUES (?, ?, ?, ?, ?, ?, ?)',
    [jobId, kind, JSON.stringify(payload), sqlTimeOf(work.now), work.actor?.id ?? null, sqlTimeOf(work.now), uniqueKey],
  );
  return jobId;
}

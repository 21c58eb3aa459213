import { isoOf, selectOne, type Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { Job } from '@/services/contracts/jobs';
import { notFound } from '@/services/http/problem';

type Stored = Omit<Job, 'result'> & { result: string | null; askedBy: string | null };

/** How far a job is. It is shown to who asked for it, to administrators and auditors; for others it is not there. */
export async function readJob(reading: Reading & { readonly actor: Actor }, jobId: string): Promise<Job> {
  const row = await selectOne<Stored>(
    reading,
    `SELECT id, kind, state, progress, attempts, result, last_error AS error, ${isoOf('created_at')} AS createdAt, ${isoOf('started_at')} AS startedAt,
       ${isoOf('finished_at')} AS finishedAt, asked_by AS askedBy FROM jobs WHERE id = ?`,
    [jobId],
  );
  const { id, role } = reading.actor;
  if (!row || !(row.askedBy === id || role === 'administrator' || role === 'auditor')) throw notFound('Job');
  const { askedBy: _, result, ...job } = row;
  return { ...job, result: result === null ? null : (JSON.parse(result) as unknown) };
}

import { execute, inTransaction, selectOne, sqlTimeOf } from '@/db/work';
import type { JobKind, JobPayloads } from './enqueue';

export type Handlers = { readonly [K in JobKind]: (payload: JobPayloads[K]) => Promise<unknown> };

interface Taken {
  readonly id: string;
  readonly kind: JobKind;
  readonly payload: string;
  readonly attempts: number;
}

const mostAttempts = 12;
// A worker that died leaves its job running; after this it is taken again.
const leaseMinutes = 10;

async function take(): Promise<Taken | undefined> {
  return inTransaction(null, async (work) => {
    const job = await selectOne<Taken>(
      work,
      `SELECT id, kind, payload, attempts FROM jobs
       WHERE (state = 'waiting' AND run_after <= ?) OR (state = 'running' AND run_after <= ? AND started_at < ? - INTERVAL ? MINUTE)
       ORDER BY run_after LIMIT 1 FOR UPDATE SKIP LOCKED`,
      [sqlTimeOf(work.now), sqlTimeOf(work.now), sqlTimeOf(work.now), leaseMinutes],
    );
    if (job)
      await execute(work, `UPDATE jobs SET state = 'running', attempts = attempts + 1, started_at = ? WHERE id = ?`, [
        sqlTimeOf(work.now),
        job.id,
      ]);
    return job;
  });
}

/** Takes one due job and runs it; false when none was due. A failure is kept and tried again later, slower each time. */
export async function runNext(handlers: Handlers): Promise<boolean> {
  const job = await take();
  if (!job) return false;
  try {
    const result = await handlers[job.kind](JSON.parse(job.payload) as never);
    await inTransaction(null, (work) =>
      execute(
        work,
        `UPDATE jobs SET state = 'done', progress = 100, result = ?, finished_at = ?, last_error = NULL WHERE id = ?`,
        [JSON.stringify(result ?? null), sqlTimeOf(work.now), job.id],
      ),
    );
  } catch (error) {
    const message = (error instanceof Error ? `${error.name}: ${error.message}` : String(error)).slice(0, 1000);
    console.error(`job ${job.kind} ${job.id} failed (try ${String(job.attempts + 1)}): ${message}`);
    const state = job.attempts + 1 >= mostAttempts ? 'failed' : 'waiting';
    const waitSeconds = Math.min(600, 2 ** (job.attempts + 1));
    await inTransaction(null, (work) =>
      execute(work, 'UPDATE jobs SET state = ?, last_error = ?, run_after = ? + INTERVAL ? SECOND WHERE id = ?', [
        state,
        message,
        sqlTimeOf(work.now),
        waitSeconds,
        job.id,
      ]),
    );
  }
  return true;
}

import { databaseFault } from '@/db/fault';
import { execute, inTransaction, selectOne, sqlTimeOf, type Work } from '@/db/work';
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

const columns = 'SELECT id, kind, payload, attempts FROM jobs';
const firstFree = 'ORDER BY run_after LIMIT 1 FOR UPDATE SKIP LOCKED';

/**
 * The next due job, or one that a dead worker left. Two queries, each along the index: one with OR would be sorted
 * first, and lock every due job against the other workers.
 */
async function dueJob(work: Work): Promise<Taken | undefined> {
  const now = sqlTimeOf(work.now);
  const waiting = await selectOne<Taken>(work, `${columns} WHERE state = 'waiting' AND run_after <= ? ${firstFree}`, [now]);
  return (
    waiting ??
    selectOne<Taken>(
      work,
      `${columns} WHERE state = 'running' AND run_after <= ? AND started_at < ? - INTERVAL ? MINUTE ${firstFree}`,
      [now, now, leaseMinutes],
    )
  );
}

async function take(): Promise<Taken | undefined> {
  return inTransaction(null, async (work) => {
    const job = await dueJob(work);
    if (job)
      await execute(work, `UPDATE jobs SET state = 'running', attempts = attempts + 1, started_at = ? WHERE id = ?`, [
        sqlTimeOf(work.now),
        job.id,
      ]);
    return job;
  });
}

/** What is kept and logged of a failure: of the database's only the code, since its messages hold parameters. */
function said(error: unknown): string {
  const fault = databaseFault(error);
  if (fault) return `database: ${fault.code}`;
  return (error instanceof Error ? `${error.name}: ${error.message}` : String(error)).slice(0, 1000);
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
    const message = said(error);
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

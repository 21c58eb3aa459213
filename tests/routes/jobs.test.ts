import { spawn } from 'node:child_process';
import path from 'node:path';
import { afterAll, describe, expect, test } from 'vitest';
import { closeDatabase } from '@/db/connection';
import { newId } from '@/db/identity';
import { execute, inTransaction, reading, selectOne, sqlTimeOf } from '@/db/work';
import { handlers } from '@/services/jobs/handlers';
import { runNext, type Handlers } from '@/services/jobs/run-next';
import { parseEnvironment } from '@/services/environment';
import '../support/stack';

const made: string[] = [];

afterAll(async () => {
  for (const id of made)
    await inTransaction(null, (work) =>
      execute(work, `UPDATE jobs SET state = 'cancelled' WHERE id = ? AND state IN ('waiting', 'running')`, [id]),
    );
  await closeDatabase();
});

/** Puts a job first in the line, so that the next turn takes it whatever else waits. */
async function first(kind = 'issue-certificate'): Promise<string> {
  const id = newId();
  made.push(id);
  await inTransaction(null, (work) =>
    execute(work, `INSERT INTO jobs (id, kind, payload, run_after, created_at) VALUES (?, ?, ?, '2000-01-01 00:00:00', ?)`, [
      id,
      kind,
      JSON.stringify({ releaseId: id, certificateId: id }),
      sqlTimeOf(work.now),
    ]),
  );
  return id;
}

const row = (id: string) =>
  selectOne<{ state: string; attempts: number; error: string | null; later: number }>(
    reading(),
    'SELECT state, attempts, last_error AS error, run_after > created_at AS later FROM jobs WHERE id = ?',
    [id],
  );
const drop = (id: string) =>
  inTransaction(null, (work) => execute(work, `UPDATE jobs SET state = 'cancelled' WHERE id = ?`, [id]));

/** Handlers that do as told for one job, and what is right for any other that is due meanwhile. */
function handlersFor(id: string, act: () => Promise<unknown>): Handlers {
  return {
    'issue-certificate': (payload) => (payload.releaseId === id ? act() : handlers['issue-certificate'](payload)),
    'mail-certificate': (payload) => (payload.certificateId === id ? act() : handlers['mail-certificate'](payload)),
  };
}

describe('a job', () => {
  test('that fails is kept, tried again later, and says why without the values of the database', async () => {
    const id = await first();
    await runNext(handlersFor(id, () => Promise.reject(new Error('the paper jammed'))));
    expect(await row(id)).toEqual({ state: 'waiting', attempts: 1, error: 'Error: the paper jammed', later: 1 });
    await drop(id);
    const other = await first();
    await runNext(
      handlersFor(other, () =>
        inTransaction(null, (work) => execute(work, 'SELECT secret FROM nowhere WHERE a = ?', ['top-secret'])),
      ),
    );
    const failed = await row(other);
    expect(failed?.error).toMatch(/^database: ER_/);
    expect(failed?.error).not.toContain('top-secret');
    await drop(other);
  });

  test('is given up after twelve tries, and is then seen as failed', async () => {
    const id = await first();
    await inTransaction(null, (work) => execute(work, 'UPDATE jobs SET attempts = 11 WHERE id = ?', [id]));
    await runNext(handlersFor(id, () => Promise.reject(new Error('never'))));
    expect(await row(id)).toMatchObject({ state: 'failed', attempts: 12 });
  });

  test('is run by one of many workers: the others skip its locked row', async () => {
    const ids = [await first(), await first(), await first()];
    const ran: string[] = [];
    const act = (payload: { releaseId: string }) => {
      ran.push(payload.releaseId);
      return new Promise((done) => setTimeout(done, 50));
    };
    const noted: Handlers = { 'issue-certificate': act, 'mail-certificate': () => Promise.resolve() };
    await Promise.all([runNext(noted), runNext(noted), runNext(noted)]);
    expect(ran.filter((id) => ids.includes(id)).sort()).toEqual([...ids].sort());
    for (const id of ids) expect((await row(id))?.state).toBe('done');
  });

  test('left by a worker that died is taken again after its lease', async () => {
    const id = await first();
    const left = (minutes: number) =>
      inTransaction(null, (work) =>
        execute(work, `UPDATE jobs SET state = 'running', started_at = ? - INTERVAL ? MINUTE WHERE id = ?`, [
          sqlTimeOf(work.now),
          minutes,
          id,
        ]),
      );
    let ran = 0;
    const counting = handlersFor(id, () => Promise.resolve((ran += 1)));
    await left(9);
    while (await runNext(counting));
    expect(ran).toBe(0);
    await left(11);
    while (await runNext(counting));
    expect([ran, (await row(id))?.state]).toEqual([1, 'done']);
  });
});

/** Starts the worker as a process of its own; answers what it prints and its end. */
function startWorker(more: Record<string, string> = {}) {
  const root = path.resolve(import.meta.dirname, '../..');
  const child = spawn(process.execPath, ['--import', 'tsx', 'services/jobs/worker.ts'], {
    cwd: root,
    env: { ...process.env, ...more },
    stdio: ['ignore', 'pipe', 'pipe'],
  });
  let said = '';
  for (const stream of [child.stdout, child.stderr]) stream.on('data', (chunk: Buffer) => (said += chunk.toString()));
  const ended = new Promise<number | null>((done) => child.on('exit', done));
  const until = async (words: string) => {
    for (let turn = 0; turn < 200 && !said.includes(words); turn += 1) await new Promise((done) => setTimeout(done, 100));
    return said;
  };
  return { child, ended, until, said: () => said };
}

describe('the worker', () => {
  test('says that it is ready, and ends in good order when told to', async () => {
    const { child, ended, until, said } = startWorker();
    expect(await until('worker: ready')).toContain('worker: ready');
    child.kill('SIGTERM');
    expect([await ended, said().includes('worker: ended')]).toEqual([0, true]);
  });

  test('waits for a store that does not answer, and still ends when told to', async () => {
    const { child, ended, until, said } = startWorker({ RINGTRUE_STORE_ENDPOINT: 'http://127.0.0.1:9' });
    expect(await until('does not answer')).toContain('the file store does not answer');
    expect(said()).not.toContain('worker: ready');
    child.kill('SIGTERM');
    expect(await ended).toBe(0);
  });

  test('names every wrong setting at once and does not start', async () => {
    expect(() => parseEnvironment({})).toThrow();
    const { ended, said } = startWorker({ RINGTRUE_BASE_URL: 'nowhere', RINGTRUE_SMTP_URL: 'post' });
    expect(await ended).toBe(1);
    expect(said()).toContain('RINGTRUE_BASE_URL');
    expect(said()).toContain('RINGTRUE_SMTP_URL');
  });
});

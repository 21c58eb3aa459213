import { setTimeout } from 'node:timers/promises';
import { databaseNow } from '@/db/work';
import { Raw } from '@/services/http/route';
import { objectStore } from '@/services/storage/object-store';

/** Who asks after health asks often; a server that is up but frozen is as silent as one that is gone. */
const patienceMs = 4000;

async function answers(ask: () => Promise<unknown>): Promise<'answers' | 'silent'> {
  const waited = new AbortController();
  try {
    const patience = setTimeout(patienceMs, 'silent' as const, { signal: waited.signal });
    return await Promise.race([ask().then(() => 'answers' as const), patience]);
  } catch {
    return 'silent';
  } finally {
    waited.abort();
  }
}

/** Does the database, and does the file store, answer? 200 only when both do, else 503. */
export async function lookAtHealth(): Promise<Raw> {
  const [database, store] = await Promise.all([answers(() => databaseNow()), answers(() => objectStore().prepare())]);
  const good = database === 'answers' && store === 'answers';
  return new Raw(Response.json({ database, store }, { status: good ? 200 : 503, headers: { 'cache-control': 'no-store' } }));
}

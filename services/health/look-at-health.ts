import { databaseNow } from '@/db/work';
import { Raw } from '@/services/http/route';
import { objectStore } from '@/services/storage/object-store';

async function answers(ask: () => Promise<unknown>): Promise<'answers' | 'silent'> {
  try {
    await ask();
    return 'answers';
  } catch {
    return 'silent';
  }
}

/** Does the database, and does the file store, answer? 200 only when both do, else 503. */
export async function lookAtHealth(): Promise<Raw> {
  const database = await answers(() => databaseNow());
  const store = await answers(() => objectStore().prepare());
  const good = database === 'answers' && store === 'answers';
  return new Raw(Response.json({ database, store }, { status: good ? 200 : 503, headers: { 'cache-control': 'no-store' } }));
}

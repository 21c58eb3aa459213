import { closeDatabase } from '@/db/connection';
import { EnvironmentError, environment } from '@/services/environment';
import { objectStore } from '@/services/storage/object-store';
import { handlers } from './handlers';
import { runNext } from './run-next';

const pauseMs = 400;
let ending = false;

// The job at hand is finished; what waits is kept in its table.
for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => (ending = true));

const pause = () => new Promise((done) => setTimeout(done, pauseMs));

/** The store may come up after the worker, or be down for a while: that is no reason to end. */
async function awaitStore(): Promise<void> {
  for (let said = false; !ending; said = true) {
    try {
      return await objectStore().prepare();
    } catch (error) {
      if (!said)
        console.error(`worker: the file store does not answer (${error instanceof Error ? error.name : 'fault'}), waiting`);
      await pause();
    }
  }
}

async function work(): Promise<void> {
  await awaitStore();
  if (!ending) console.log('worker: ready');
  while (!ending) {
    const found = await runNext(handlers).catch((error: unknown) => {
      console.error(`worker: ${error instanceof Error ? error.name : 'fault'}, trying again`);
      return false;
    });
    if (!found) await pause();
  }
  await closeDatabase();
  console.log('worker: ended');
}

try {
  environment();
  await work();
} catch (error) {
  console.error(error instanceof EnvironmentError ? error.message : error);
  process.exitCode = 1;
}

import { closeDatabase } from '@/db/connection';
import { EnvironmentError, environment } from '@/services/environment';
import { objectStore } from '@/services/storage/object-store';
import { handlers } from './handlers';
import { runNext } from './run-next';

const pauseMs = 400;
let ending = false;

for (const signal of ['SIGTERM', 'SIGINT'] as const) process.on(signal, () => (ending = true));

async function work(): Promise<void> {
  await objectStore().prepare();
  console.log('worker: ready');
  while (!ending) {
    const found = await runNext(handlers).catch((error: unknown) => {
      console.error(`worker: ${error instanceof Error ? error.name : 'fault'}, trying again`);
      return false;
    });
    if (!found) await new Promise((done) => setTimeout(done, pauseMs));
  }
  await closeDatabase();
}

try {
  environment();
  await work();
} catch (error) {
  console.error(error instanceof EnvironmentError ? error.message : error);
  process.exitCode = 1;
}

import { rmSync } from 'node:fs';
import { ownerEnvironment } from './environment.mjs';
import { settlePorts } from './ports.mjs';
import { stopAll } from './processes.mjs';
import { say, step } from './progress.mjs';
import { startDatabase } from './database.mjs';
import { startMail, startStore } from './store.mjs';
import { runTypeScript } from './run-script.mjs';

/** Clears what an earlier start of this profile left running, so that ports and data are free. */
export async function clearLeftovers(profile) {
  const left = await stopAll(profile);
  if (left.length > 0) say(`  cleared what an earlier start left running: ${left.join(', ')}`);
}

/**
 * Starts database, store and mail catcher, and brings the schema up to date; with `fresh`, on empty data.
 * Expects that nothing of the profile is running. Answers the database's process. `servers` names every port that must be free.
 */
export async function startServices(profile, { fresh = false, servers = ['database', 'store', 'mail'] } = {}) {
  await settlePorts(profile, servers);
  if (fresh)
    for (const folder of [profile.storeFolder, profile.mailFolder, profile.keysFolder])
      rmSync(folder, { recursive: true, force: true });
  const [database] = await Promise.all([
    step('database', () => startDatabase(profile, { fresh })),
    step('file store', () => startStore(profile)),
    step('mail catcher', () => startMail(profile)),
  ]);
  await step('schema', () => runTypeScript('db/migrate.ts', ownerEnvironment(profile)));
  return { database };
}

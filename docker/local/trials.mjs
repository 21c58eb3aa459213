import { existsSync } from 'node:fs';
import path from 'node:path';
import { ownerEnvironment } from './environment.mjs';
import { installPackages } from './install-packages.mjs';
import { installDebian } from './install-debian.mjs';
import { lives, records } from './processes.mjs';
import { Fault, say } from './progress.mjs';
import { profile as profileOf, root } from './profiles.mjs';
import { run } from './run-script.mjs';
import { onlyStarter } from './single-start.mjs';
import { clearLeftovers, startServices } from './stack.mjs';
import { end, endOnSignals } from './stopping.mjs';

/**
 * Runs longer or measuring trials of a folder under tests/ on a fresh stack of its own, shows what they print, and stops it.
 * `vitestArguments` choose the mode. Throws a Fault when there are none.
 */
export async function runTrials(folder, vitestArguments) {
  if (!existsSync(path.join(root, 'tests', folder))) throw new Fault(`There is nothing in tests/${folder} yet.`);
  const profile = profileOf('trial');
  await onlyStarter(profile);
  endOnSignals(profile);
  await installDebian(['running', 'testing']);
  await installPackages();
  if (records(profile).some(lives)) await clearLeftovers(profile);
  let code = 1;
  try {
    await startServices(profile, { fresh: true, servers: ['web', 'database', 'store', 'mail'] });
    const vitest = path.join('node_modules', '.bin', 'vitest');
    ({ code } = await run(vitest, vitestArguments, { environment: ownerEnvironment(profile), show: true }));
  } catch (error) {
    say(error instanceof Fault ? error.message : error.stack);
  }
  await end(profile, code);
}

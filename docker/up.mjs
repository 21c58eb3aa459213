// Starts database, store and mail of a profile and leaves them running: `node docker/up.mjs [test] [--fresh] [--seed]`.
// Addresses and passwords are written to .local/<profile>/env.json. `node docker/down.mjs [test]` stops them.
import { writeFileSync } from 'node:fs';
import path from 'node:path';
import { ownerEnvironment } from './local/environment.mjs';
import { installDebian } from './local/install-debian.mjs';
import { installPackages } from './local/install-packages.mjs';
import { lives, records } from './local/processes.mjs';
import { giveUp, say, step } from './local/progress.mjs';
import { profile as profileOf, root } from './local/profiles.mjs';
import { runTypeScript } from './local/run-script.mjs';
import { onlyStarter } from './local/single-start.mjs';
import { clearLeftovers, startServices } from './local/stack.mjs';

const flags = process.argv.slice(2).filter((word) => word.startsWith('--'));
const name = process.argv.slice(2).find((word) => !word.startsWith('--')) ?? 'test';

async function up() {
  const profile = profileOf(name);
  await onlyStarter(profile);
  await installDebian(['running', 'testing']);
  await installPackages();
  const running = records(profile).filter(lives);
  if (running.length >= 3 && !flags.includes('--fresh')) {
    await step('schema', () => runTypeScript('db/migrate.ts', ownerEnvironment(profile)));
  } else {
    await clearLeftovers(profile);
    await startServices(profile, { fresh: flags.includes('--fresh') });
  }
  if (flags.includes('--seed')) await step('demo data', () => runTypeScript('db/seed.ts', ownerEnvironment(profile)));
  const file = path.join(profile.folder, 'env.json');
  writeFileSync(file, `${JSON.stringify(ownerEnvironment(profile), null, 2)}\n`, { mode: 0o600 });
  say(`The ${name} stack is up; its settings are in ${path.relative(root, file)}. Stop it with: node docker/down.mjs ${name}`);
  process.exit(0);
}

up().catch(giveUp);

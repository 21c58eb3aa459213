// `npm run demo`: everything needed to try the product, from a clean checkout, on loopback.
import { ownerEnvironment } from './local/environment.mjs';
import { buildSite } from './local/build.mjs';
import { installDebian } from './local/install-debian.mjs';
import { installPackages } from './local/install-packages.mjs';
import { addressOf, launchWeb, launchWorker, waitUntilHealthy } from './local/product.mjs';
import { elapsed, Fault, giveUp, say, step } from './local/progress.mjs';
import { profile as profileOf } from './local/profiles.mjs';
import { runTypeScript } from './local/run-script.mjs';
import { onlyStarter } from './local/single-start.mjs';
import { clearLeftovers, startServices } from './local/stack.mjs';
import { startDatabase } from './local/database.mjs';
import { end, endOnSignals, isEnding } from './local/stopping.mjs';
import { supervise } from './local/supervise.mjs';

const signIns = [
  ['inspector@aldermoor.example', 'records and signs inspections'],
  ['inspector2@aldermoor.example', 'a second inspector'],
  ['reviewer@aldermoor.example', 'decides findings, level 3'],
  ['signatory@aldermoor.example', 'signs releases'],
  ['administrator@aldermoor.example', 'people, gauges, plans'],
  ['quality@tarnside.example', 'customer Tarnside Turbines'],
  ['quality@corvane.example', 'customer Corvane Rotorcraft'],
  ['auditor@fennick.example', 'auditor of the registrar, reads only'],
];

async function startProduct(profile, database) {
  const site = await buildSite(profile);
  const web = await step('web', async () => {
    const server = launchWeb(profile, site);
    await waitUntilHealthy(profile, server);
    return server;
  });
  const worker = launchWorker(profile);
  supervise(profile, database, () => startDatabase(profile));
  supervise(profile, web, () => Promise.resolve(launchWeb(profile, site)));
  supervise(profile, worker, () => Promise.resolve(launchWorker(profile)));
}

function printWelcome(profile) {
  say(`\nRingtrue is ready after ${elapsed()}:  ${addressOf(profile)}\n`);
  say('Sign in as (demo data only):');
  for (const [name, does] of signIns) say(`  ${name.padEnd(34)} ${does}`);
  say('  password for all: sound-castings-ring-true     PIN: 221031\n');
  say(`Mail is kept in ${profile.mailFolder}. Ctrl-C stops everything.`);
}

async function demo(profile) {
  say('Starting the Ringtrue demo');
  await installDebian(['running']);
  await installPackages();
  await clearLeftovers(profile);
  const { database } = await startServices(profile, { servers: ['web', 'database', 'store', 'mail'] });
  await step('demo data', () => runTypeScript('db/seed.ts', ownerEnvironment(profile)));
  await startProduct(profile, database);
  printWelcome(profile);
  setInterval(() => undefined, 60_000);
}

try {
  const profile = profileOf('demo');
  await onlyStarter(profile);
  endOnSignals(profile);
  await demo(profile).catch(async (error) => {
    if (isEnding()) return;
    process.stderr.write(`\n${error instanceof Fault ? error.message : error.stack}\n`);
    await end(profile, 1);
  });
} catch (error) {
  giveUp(error);
}

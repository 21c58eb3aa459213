// `npm test`: every check, cheap ones first, on data of its own. `node docker/test.mjs --only routes,browser` runs a part.
import { mkdirSync } from 'node:fs';
import path from 'node:path';
import { buildSite } from './local/build.mjs';
import { ownerEnvironment } from './local/environment.mjs';
import { installDebian } from './local/install-debian.mjs';
import { installPackages } from './local/install-packages.mjs';
import { addressOf, launchWeb, launchWorker, waitUntilHealthy } from './local/product.mjs';
import { stopAll } from './local/processes.mjs';
import { elapsed, Fault, giveUp, say, step } from './local/progress.mjs';
import { profile as profileOf } from './local/profiles.mjs';
import { run, runTypeScript } from './local/run-script.mjs';
import { onlyStarter } from './local/single-start.mjs';
import { clearLeftovers, startServices } from './local/stack.mjs';
import { end, endOnSignals, isEnding } from './local/stopping.mjs';
import { closeTally, count, countReport } from './local/tally.mjs';

/** Each is a script of package.json, so that a person can run the same by itself. */
const checks = ['format:check', 'lint', 'types', 'types:engine', 'graph', 'unused'];
const projects = ['engine', 'house', 'services', 'routes', 'browser'];

function wanted() {
  const at = process.argv.indexOf('--only');
  if (at < 0) return [...checks, ...projects];
  const names = (process.argv[at + 1] ?? '').split(',');
  const unknown = names.filter((name) => !checks.includes(name) && !projects.includes(name));
  if (unknown.length > 0) throw new Fault(`--only knows: ${[...checks, ...projects].join(', ')}`);
  return names;
}

const tool = (name) => path.join('node_modules', '.bin', name);

async function runCheck(name) {
  const { code, output } = await step(name, () => run('npm', ['run', '--silent', name]));
  if (code === 0) return count('passed');
  say(output.trimEnd().split('\n').slice(-80).join('\n'));
  return count('failed', 1, `check: npm run ${name}`);
}

async function runProject(profile, name, environment) {
  const report = path.join(profile.folder, `${name}.json`);
  const args = [
    'run',
    '--project',
    name,
    '--reporter=dot',
    '--reporter=json',
    `--outputFile.json=${report}`,
    '--passWithNoTests',
  ];
  const { code, output } = await step(`${name} tests`, () => run(tool('vitest'), args, { environment }));
  if (code !== 0) say(output.slice(-20_000));
  countReport(name, report, code);
}

/** Runs a part; when its ground cannot be laid, that is one failed item and the tests on it are skipped. */
async function onGround(names, title, lay, work) {
  if (names.length === 0) return;
  try {
    await lay();
  } catch (error) {
    if (isEnding()) return;
    say(error instanceof Fault ? error.message : error.stack);
    count('failed', 1, title);
    for (const name of names) count('skipped', 1, `${name} tests: ${title} failed`);
    return;
  }
  for (const name of names) await work(name);
}

const freshServices = async (profile) => {
  await stopAll(profile);
  await startServices(profile, { fresh: true, servers: ['web', 'database', 'store', 'mail'] });
};

async function layBrowserGround(profile) {
  await freshServices(profile);
  await step('demo data', () => runTypeScript('db/seed.ts', ownerEnvironment(profile)));
  const site = await buildSite(profile);
  await step('web', () => waitUntilHealthy(profile, launchWeb(profile, site)));
  launchWorker(profile);
}

async function test(profile) {
  const names = wanted();
  say('Setting up');
  await installDebian(['running', 'testing']);
  await installPackages();
  await clearLeftovers(profile);
  mkdirSync(profile.folder, { recursive: true });
  if (names.includes('types') || names.includes('lint')) await step('route types', () => run(tool('next'), ['typegen']));
  for (const name of checks.filter((check) => names.includes(check))) await runCheck(name);
  for (const name of ['engine', 'house'].filter((project) => names.includes(project))) await runProject(profile, name, {});
  const onServices = ['services', 'routes'].filter((project) => names.includes(project));
  await onGround(
    onServices,
    'starting database, store and mail',
    () => freshServices(profile),
    (name) => runProject(profile, name, ownerEnvironment(profile)),
  );
  const onProduct = names.includes('browser') ? ['browser'] : [];
  await onGround(
    onProduct,
    'starting the built product',
    () => layBrowserGround(profile),
    (name) => runProject(profile, name, { ...ownerEnvironment(profile), RINGTRUE_TEST_ADDRESS: addressOf(profile) }),
  );
}

/** The closing line is the very last thing said, so the servers are stopped before it. */
async function testAndTell() {
  const profile = profileOf('trial');
  await onlyStarter(profile);
  endOnSignals(profile);
  try {
    await test(profile);
  } catch (error) {
    if (isEnding()) return;
    say(error instanceof Fault ? error.message : error.stack);
    count('failed', 1, 'set-up');
  }
  if (isEnding()) return;
  await stopAll(profile);
  say(`\nAll of it took ${elapsed()}`);
  await end(profile, closeTally() ? 0 : 1);
}

testAndTell().catch(giveUp);

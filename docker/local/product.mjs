import path from 'node:path';
import { applicationEnvironment } from './environment.mjs';
import { Fault } from './progress.mjs';
import { lastLines, launch } from './processes.mjs';

const production = (profile) => ({ ...applicationEnvironment(profile), NODE_ENV: 'production', HOSTNAME: '127.0.0.1' });

/** The address of a profile's pages. */
export const addressOf = (profile) => `http://127.0.0.1:${profile.ports.web}`;

/** Starts the built server from its folder. */
export const launchWeb = (profile, site) =>
  launch(profile, 'web', process.execPath, [path.join(site, 'server.js')], production(profile));

/** Starts the process that does what waits in the outbox. */
export const launchWorker = (profile) =>
  launch(profile, 'worker', process.execPath, ['--import', 'tsx', 'services/jobs/worker.ts'], production(profile));

/** Waits until the health address answers 200. Throws a Fault with the last answer and the server's last words. */
export async function waitUntilHealthy(profile, web, seconds = 60) {
  const until = performance.now() + seconds * 1000;
  let last = 'no answer';
  while (performance.now() < until && !web.ended) {
    try {
      const response = await fetch(`${addressOf(profile)}/api/health`, { signal: AbortSignal.timeout(5000) });
      if (response.status === 200) return;
      last = `${response.status} ${(await response.text()).slice(0, 400)}`;
    } catch (error) {
      last = error.cause?.message ?? error.message;
    }
    await new Promise((resolve) => setTimeout(resolve, 150));
  }
  throw new Fault(`The web server did not become healthy (${last}):\n${lastLines(web.logFile)}`);
}

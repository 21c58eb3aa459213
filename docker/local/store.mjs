import path from 'node:path';
import { mkdirSync } from 'node:fs';
import { Fault } from './progress.mjs';
import { lastLines, launch } from './processes.mjs';
import { waitForPort } from './ports.mjs';

async function startServer(profile, name, script, args, port) {
  const server = launch(profile, name, process.execPath, [path.join(import.meta.dirname, script), ...args]);
  if (await waitForPort(port, { seconds: 30, alive: () => !server.ended })) return server;
  throw new Fault(`The ${name} server did not start:\n${lastLines(server.logFile)}`);
}

/** Starts the local object store with the bucket `ringtrue`, kept alive by its keeper. */
export function startStore(profile) {
  mkdirSync(profile.storeFolder, { recursive: true, mode: 0o700 });
  return startServer(profile, 'store', 'keep-store.mjs', [profile.storeFolder, String(profile.ports.store)], profile.ports.store);
}

/** Starts the catcher of outgoing mail. */
export function startMail(profile) {
  mkdirSync(profile.mailFolder, { recursive: true, mode: 0o700 });
  return startServer(profile, 'mail', 'catch-mail.mjs', [profile.mailFolder, String(profile.ports.mail)], profile.ports.mail);
}

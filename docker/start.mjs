// `npm start`: serves the built product. Settings come from the environment; see services/environment.ts.
import { existsSync } from 'node:fs';
import path from 'node:path';
import { tsImport } from 'tsx/esm/api';
import { completeStandalone } from './local/build.mjs';
import { Fault, giveUp } from './local/progress.mjs';
import { root } from './local/profiles.mjs';

async function start() {
  const server = path.join(root, '.next', 'standalone', 'server.js');
  if (!existsSync(server)) throw new Fault('There is no build to serve: run `npm run build` first.');
  const { parseEnvironment, EnvironmentError } = await tsImport('../services/environment.ts', import.meta.url);
  try {
    parseEnvironment(process.env);
  } catch (error) {
    throw error instanceof EnvironmentError ? new Fault(error.message) : error;
  }
  process.env.NODE_ENV = 'production';
  // Containers set HOSTNAME to their own name, which the server would take for the address to listen at.
  process.env.HOSTNAME = process.env.RINGTRUE_LISTEN_ADDRESS ?? '0.0.0.0';
  completeStandalone();
  await import(server);
}

start().catch(giveUp);

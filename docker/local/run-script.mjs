import { spawn } from 'node:child_process';
import { note, strikeOut } from './processes.mjs';
import { Fault } from './progress.mjs';
import { root } from './profiles.mjs';

/** Commands under way, so that an interrupted start can end them first. */
const underWay = new Set();

let recordedIn;

/** From now on commands are recorded with the servers of the profile, so that they end with them even after a `kill -9`. */
export function recordScriptsIn(profile) {
  recordedIn = profile;
}

/** Ends commands that are still under way. */
export function stopScripts() {
  for (const child of underWay) {
    try {
      process.kill(-child.pid, 'SIGTERM');
    } catch (error) {
      if (error.code !== 'ESRCH') throw error;
    }
  }
}

/**
 * Runs a command to its end. Answers its exit code and what it wrote; with `show`, it is also shown as it comes.
 */
export function run(command, args, { environment = {}, show = false } = {}) {
  return new Promise((resolve) => {
    const child = spawn(command, args, {
      cwd: root,
      detached: true,
      stdio: ['ignore', 'pipe', 'pipe'],
      env: { ...process.env, ...environment },
    });
    underWay.add(child);
    if (recordedIn && child.pid !== undefined) note(recordedIn, `command-${child.pid}`, child.pid);
    let output = '';
    const take = (bytes) => {
      output += bytes.toString();
      if (show) process.stdout.write(bytes);
    };
    child.stdout.on('data', take);
    child.stderr.on('data', take);
    const end = (code) => {
      underWay.delete(child);
      if (recordedIn && child.pid !== undefined) strikeOut(recordedIn, `command-${child.pid}`);
      resolve({ code, output });
    };
    child.once('error', (error) => {
      output += error.message;
      end(127);
    });
    child.once('close', (code, signal) => end(code ?? (signal ? 128 : 1)));
  });
}

/** Runs one of the product's TypeScript scripts. Throws a Fault with its output when it fails. */
export async function runTypeScript(file, environment) {
  const { code, output } = await run(process.execPath, ['--import', 'tsx', file], { environment });
  if (code !== 0) throw new Fault(`${file} failed:\n${output}`);
  return output.trim();
}

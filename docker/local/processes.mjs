import { spawn } from 'node:child_process';
import { mkdirSync, openSync, closeSync, readdirSync, readFileSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { root } from './profiles.mjs';
import { Fault } from './progress.mjs';

/** When a process began, in clock ticks since boot: with its number this names one process for ever, since numbers come again. */
export function startTicks(pid) {
  try {
    const stat = readFileSync(`/proc/${pid}/stat`, 'utf8');
    const afterName = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
    return afterName[0] === 'Z' ? undefined : afterName[19];
  } catch {
    return undefined;
  }
}

const boot = () => readFileSync('/proc/sys/kernel/random/boot_id', 'utf8').trim();
const recordFile = (profile, name) => path.join(profile.runFolder, `${name}.json`);

/** Is the recorded process still that very process? */
export const lives = (record) => record.boot === boot() && startTicks(record.pid) === record.ticks;

/** Records of everything this profile has started and not yet stopped. */
export function records(profile) {
  try {
    return readdirSync(profile.runFolder)
      .filter((file) => file.endsWith('.json'))
      .map((file) => JSON.parse(readFileSync(path.join(profile.runFolder, file), 'utf8')));
  } catch (error) {
    if (error.code === 'ENOENT') return [];
    throw error;
  }
}

/** Writes down that a process of this profile runs, so that any later start can end it. */
export function note(profile, name, pid) {
  mkdirSync(profile.runFolder, { recursive: true });
  const file = recordFile(profile, name);
  writeFileSync(`${file}.new`, JSON.stringify({ name, pid, ticks: startTicks(pid), boot: boot() }));
  renameSync(`${file}.new`, file);
}

/** Strikes out a process that ended by itself. */
export const strikeOut = (profile, name) => rmSync(recordFile(profile, name), { force: true });

let refusing = false;

/** From now on nothing is started any more: what would start after the list of things to stop was read would stay. */
export function refuseLaunches() {
  refusing = true;
}

/**
 * Starts a server in a process group of its own, so that Ctrl-C reaches only the starter, which then stops things in order.
 * Its output goes to a log file; its number and start time are recorded for a start after a `kill -9`.
 */
export function launch(profile, name, command, args, environment) {
  if (refusing) throw new Fault(`${name} was not started: stopping`);
  mkdirSync(profile.logFolder, { recursive: true });
  const logFile = path.join(profile.logFolder, `${name}.log`);
  const log = openSync(logFile, 'w');
  const child = spawn(command, args, {
    cwd: root,
    detached: true,
    stdio: ['ignore', log, log],
    env: { ...process.env, ...environment },
  });
  closeSync(log);
  const launched = { name, child, logFile, ended: false };
  child.once('error', (error) => {
    writeFileSync(logFile, `${command}: ${error.message}\n`);
    launched.ended = true;
  });
  child.once('exit', () => {
    launched.ended = true;
  });
  if (child.pid !== undefined) note(profile, name, child.pid);
  return launched;
}

/** The last lines a server wrote, to show why it ended. */
export function lastLines(logFile, count = 15) {
  try {
    return readFileSync(logFile, 'utf8').trimEnd().split('\n').slice(-count).join('\n');
  } catch {
    return '(it wrote nothing)';
  }
}

function signal(pid, name) {
  try {
    process.kill(-pid, name);
  } catch (error) {
    if (error.code !== 'ESRCH') throw error;
  }
}

async function stopRecorded(profile, record, patienceSeconds) {
  if (lives(record)) {
    signal(record.pid, 'SIGTERM');
    const until = performance.now() + patienceSeconds * 1000;
    while (lives(record) && performance.now() < until) await new Promise((resolve) => setTimeout(resolve, 40));
  }
  // Whatever of the group outlived its leader.
  if (record.boot === boot() && record.ticks !== undefined && groupRemains(record)) signal(record.pid, 'SIGKILL');
  strikeOut(profile, record.name);
}

/** Members of a group whose leader began when the record says, or (leader gone) that began later than it. */
function groupRemains(record) {
  return readdirSync('/proc').some((entry) => {
    if (!/^\d+$/.test(entry)) return false;
    try {
      const stat = readFileSync(`/proc/${entry}/stat`, 'utf8');
      const fields = stat.slice(stat.lastIndexOf(')') + 2).split(' ');
      return Number(fields[2]) === record.pid && fields[0] !== 'Z' && Number(fields[19]) >= Number(record.ticks);
    } catch {
      return false;
    }
  });
}

/** Writers before what they write to; commands under way, which are not in this list, come first. */
const stopOrder = ['web', 'worker', 'store', 'mail', 'database'];

/** Stops what the profile has running, in order. Answers the names that were still alive. */
export async function stopAll(profile) {
  const alive = [];
  const found = records(profile).sort((a, b) => stopOrder.indexOf(a.name) - stopOrder.indexOf(b.name));
  for (const record of found) {
    if (lives(record)) alive.push(record.name);
    await stopRecorded(profile, record, record.name === 'database' ? 60 : 10);
  }
  rmSync(profile.socketFolder, { recursive: true, force: true });
  return alive;
}

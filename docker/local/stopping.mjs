import { refuseLaunches, stopAll } from './processes.mjs';
import { say } from './progress.mjs';
import { recordScriptsIn, stopScripts } from './run-script.mjs';

let ending;

/** True once the end has begun: a server that ends now ended because it was asked to. */
export const isEnding = () => ending !== undefined;

/** Stops everything the profile runs, in order, once; then ends the program with the code. */
export function end(profile, code) {
  ending ??= (async () => {
    refuseLaunches();
    stopScripts();
    const stopped = await stopAll(profile);
    if (stopped.length > 0) say(`stopped ${stopped.map((name) => name.replace(/^command-/, 'command ')).join(', ')}`);
    process.exit(code);
  })();
  return ending;
}

/** Makes Ctrl-C, a closed terminal and a polite kill end the program in order. */
export function endOnSignals(profile) {
  recordScriptsIn(profile);
  for (const [name, code] of Object.entries({ SIGINT: 130, SIGTERM: 143, SIGHUP: 129 })) {
    process.on(name, () => {
      if (!isEnding()) say('\nstopping …');
      void end(profile, code);
    });
  }
}

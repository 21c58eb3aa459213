import path from 'node:path';
import { lastLines } from './processes.mjs';
import { say } from './progress.mjs';
import { root } from './profiles.mjs';
import { end, isEnding } from './stopping.mjs';

const mostDeathsInARow = 5;
const settledMs = 20_000;

/** Starts a server again when it ends by itself; gives the whole stack up when it keeps dying. */
export function supervise(profile, launched, again) {
  let deaths = 0;
  const watch = (server) => {
    const from = performance.now();
    const onEnd = () => {
      if (isEnding()) return;
      deaths = performance.now() - from > settledMs ? 1 : deaths + 1;
      say(`${server.name} ended; its last words (${path.relative(root, server.logFile)}):\n${lastLines(server.logFile, 8)}`);
      if (deaths >= mostDeathsInARow) {
        say(`${server.name} ended ${deaths} times in a row; stopping everything`);
        void end(profile, 1);
        return;
      }
      setTimeout(() => {
        if (isEnding()) return;
        say(`starting ${server.name} again`);
        again().then(watch, (error) => {
          say(error.message);
          void end(profile, 1);
        });
      }, 500 * deaths);
    };
    if (server.ended) onEnd();
    else server.child.once('exit', onEnd);
  };
  watch(launched);
}

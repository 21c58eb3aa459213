// `npm run soak`: the trials that take too long for `npm test`, tests/soak/*.test.ts.
import { giveUp } from './local/progress.mjs';
import { runTrials } from './local/trials.mjs';

runTrials('soak', ['run', '--project', 'soak', ...process.argv.slice(2)]).catch(giveUp);

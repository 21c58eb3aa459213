// `npm run bench`: measures tests/bench/*.bench.ts and prints ratios. Nothing fails for being slow: machines differ.
import { giveUp } from './local/progress.mjs';
import { runTrials } from './local/trials.mjs';

runTrials('bench', ['bench', '--run', '--project', 'bench', ...process.argv.slice(2)]).catch(giveUp);

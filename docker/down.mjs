// Stops what `docker/up.mjs` left running: `node docker/down.mjs [test]`.
import { stopAll } from './local/processes.mjs';
import { giveUp, say } from './local/progress.mjs';
import { profile as profileOf } from './local/profiles.mjs';
import { onlyStarter } from './local/single-start.mjs';

async function down() {
  const profile = profileOf(process.argv[2] ?? 'test');
  await onlyStarter(profile);
  const stopped = await stopAll(profile);
  say(stopped.length > 0 ? `stopped ${stopped.join(', ')}` : 'nothing was running');
  process.exit(0);
}

down().catch(giveUp);

import { createHash } from 'node:crypto';
import { existsSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { Fault, step } from './progress.mjs';
import { root } from './profiles.mjs';
import { run } from './run-script.mjs';
import { takeTurn } from './single-start.mjs';

const stampFile = path.join(root, 'node_modules', '.ringtrue-lock');

/** Debts of an unfinished or older install are visible: the stamp is written last and names the lock file it came from. */
function isCurrent(lock) {
  if (existsSync(stampFile)) return readFileSync(stampFile, 'utf8') === lock;
  // Installed by hand with `npm ci` or `npm install`: npm notes what it put there, and is newer than the lock file's change.
  const note = path.join(root, 'node_modules', '.package-lock.json');
  if (!existsSync(note)) return false;
  const wanted = JSON.parse(readFileSync(path.join(root, 'package-lock.json'), 'utf8')).packages;
  const found = JSON.parse(readFileSync(note, 'utf8')).packages;
  return Object.entries(wanted).every(
    ([place, { version, optional }]) => place === '' || optional === true || found[place]?.version === version,
  );
}

/** Runs `npm ci` when node_modules is absent or was made from another package-lock.json. Throws a Fault when npm fails. */
export async function installPackages() {
  const release = await takeTurn(`ringtrue-install-${createHash('sha256').update(root).digest('hex').slice(0, 10)}`);
  try {
    const lock = createHash('sha256')
      .update(readFileSync(path.join(root, 'package-lock.json')))
      .digest('hex');
    if (!isCurrent(lock)) {
      const { code, output } = await step('npm ci', () => run('npm', ['ci', '--no-audit', '--no-fund'], { show: false }));
      if (code !== 0) throw new Fault(`npm ci failed:\n${output.slice(-3000)}`);
    }
    writeFileSync(stampFile, lock);
  } finally {
    release();
  }
}

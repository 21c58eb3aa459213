// Runs the local object store as a child and starts it again when it dies, which some requests make it do.
import { fork } from 'node:child_process';
import path from 'node:path';

const [folder, port] = process.argv.slice(2);
const fastestAgainMs = 300;
let child;
let stopping = false;

function begin() {
  child = fork(path.join(import.meta.dirname, 'serve-store.mjs'), [folder, port], { execArgv: ['--openssl-legacy-provider'] });
  child.once('exit', (code, signal) => {
    if (stopping) process.exit(0);
    console.error(`the store ended (${signal ?? code}); starting it again`);
    setTimeout(begin, fastestAgainMs);
  });
}

process.on('SIGTERM', () => {
  stopping = true;
  if (child.exitCode !== null || child.signalCode !== null) process.exit(0);
  child.kill('SIGTERM');
});

begin();

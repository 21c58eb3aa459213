import net from 'node:net';
import { Fault } from './progress.mjs';

/**
 * Lets one starter per name work at a time. The mark is a socket in the kernel's abstract namespace: it vanishes with its
 * process however that ends, so it can never be stale. Answers a function that gives the place free; undefined when it is taken.
 */
function claim(name, notice) {
  return new Promise((resolve, reject) => {
    const server = net.createServer((socket) => socket.end(notice()));
    server.once('error', (error) => (error.code === 'EADDRINUSE' ? resolve(undefined) : reject(error)));
    server.listen(`\0${name}`, () => {
      server.unref();
      resolve(() => server.close());
    });
  });
}

function noticeOf(name) {
  return new Promise((resolve) => {
    let text = '';
    const socket = net.connect(`\0${name}`);
    socket.setTimeout(1500, () => socket.destroy());
    socket.on('data', (bytes) => (text += bytes.toString()));
    socket.once('error', () => resolve(text));
    socket.once('close', () => resolve(text));
  });
}

/** Takes the place of the only starter of a profile. Throws a Fault when another has it. */
export async function onlyStarter(profile) {
  const release = await claim(profile.key, () => `process ${process.pid}`);
  if (release) return release;
  throw new Fault(
    `The ${profile.name} stack of this folder is already being run by another start (${(await noticeOf(profile.key)) || 'unknown process'}).\nStop that one with Ctrl-C first.`,
  );
}

/** Waits for its turn to do something that two profiles share, such as building. Answers a function that ends the turn. */
export async function takeTurn(name, seconds = 600) {
  const until = performance.now() + seconds * 1000;
  while (performance.now() < until) {
    const release = await claim(name, () => `process ${process.pid}`);
    if (release) return release;
    await new Promise((resolve) => setTimeout(resolve, 200));
  }
  throw new Fault(`Another process held "${name}" for ${seconds} s.`);
}

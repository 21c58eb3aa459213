import net from 'node:net';
import { Fault } from './progress.mjs';
import { portVariable } from './profiles.mjs';

/** Binds and frees a port on loopback. Answers the port, or undefined when someone else has it. */
function tryPort(port) {
  return new Promise((resolve, reject) => {
    const server = net.createServer();
    server.once('error', (error) =>
      error.code === 'EADDRINUSE' || error.code === 'EACCES' ? resolve(undefined) : reject(error),
    );
    server.listen({ port, host: '127.0.0.1', exclusive: true }, () => {
      const bound = server.address().port;
      server.close(() => resolve(bound));
    });
  });
}

/** Makes sure that the profile's ports are free and fills in those that may be any. Throws a Fault naming the taken port. */
export async function settlePorts(profile, servers) {
  for (const server of servers) {
    const wanted = profile.ports[server];
    const got = await tryPort(wanted);
    if (got === undefined) {
      throw new Fault(
        `Port ${wanted}, meant for the ${server} server, is in use (or needs more rights).\nChoose another: ${portVariable(server)}=${wanted < 65000 ? wanted + 1 : 3001} and start again.`,
      );
    }
    profile.ports[server] = got;
  }
}

/** Waits until something accepts connections and, when `greets`, speaks first as a database does. */
export async function waitForPort(port, { greets = false, seconds = 30, alive = () => true } = {}) {
  const until = performance.now() + seconds * 1000;
  while (performance.now() < until) {
    if (!alive()) return false;
    if (await answers(port, greets)) return true;
    await new Promise((resolve) => setTimeout(resolve, 60));
  }
  return false;
}

function answers(port, greets) {
  return new Promise((resolve) => {
    const socket = net.connect({ port, host: '127.0.0.1' });
    const end = (verdict) => {
      socket.destroy();
      resolve(verdict);
    };
    socket.setTimeout(2000, () => end(false));
    socket.once('error', () => end(false));
    socket.once('close', () => resolve(false));
    if (greets) socket.once('data', (bytes) => end(bytes.length > 5 && bytes[4] !== 0xff));
    else socket.once('connect', () => end(true));
  });
}

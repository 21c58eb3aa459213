import { createHash } from 'node:crypto';
import { tmpdir } from 'node:os';
import path from 'node:path';

/** The folder of the checkout. */
export const root = path.resolve(import.meta.dirname, '..', '..');

/**
 * Which data a local stack works on. `demo` is for people, `test` is left running for someone who writes tests,
 * `trial` belongs to `npm test`, which starts empty every time and takes whichever ports are free.
 */
const kinds = {
  demo: { web: 3000, database: 33306, store: 33900, mail: 33025 },
  test: { web: 3200, database: 34306, store: 34900, mail: 34025 },
  trial: { web: 0, database: 0, store: 0, mail: 0 },
};

const portVariables = {
  web: 'PORT',
  database: 'RINGTRUE_DATABASE_PORT',
  store: 'RINGTRUE_STORE_PORT',
  mail: 'RINGTRUE_MAIL_PORT',
};

/** The variable with which a person chooses another port for one of the four servers. */
export const portVariable = (server) => portVariables[server];

function chosenPort(server, standard) {
  const text = process.env[portVariables[server]];
  if (text === undefined || text === '') return standard;
  const port = Number(text);
  if (Number.isInteger(port) && port >= 1 && port <= 65535) return port;
  throw new Error(`${portVariables[server]} is "${text}"; it must be a whole number from 1 to 65535`);
}

/** Folders and ports of a profile. Port 0 means: any free one. Throws on an unknown profile or a port that is no port. */
export function profile(name) {
  const standard = kinds[name];
  if (!standard) throw new Error(`There is no profile "${name}"; known: ${Object.keys(kinds).join(', ')}`);
  const folder = path.join(root, '.local', name);
  const short = createHash('sha256').update(folder).digest('hex').slice(0, 10);
  const ports = {};
  for (const [server, port] of Object.entries(standard)) ports[server] = chosenPort(server, port);
  return {
    name,
    folder,
    key: `ringtrue-${short}`,
    runFolder: path.join(folder, 'run'),
    databaseFolder: path.join(folder, 'db'),
    storeFolder: path.join(folder, 'store'),
    mailFolder: path.join(folder, 'mail'),
    keysFolder: path.join(folder, 'keys'),
    logFolder: path.join(folder, 'log'),
    // A socket's path may have 107 bytes; checkouts lie deeper than that.
    socketFolder: path.join(tmpdir(), `ringtrue-${short}`),
    ports,
  };
}

import { spawnSync } from 'node:child_process';
import { existsSync, mkdirSync, renameSync, rmSync, writeFileSync } from 'node:fs';
import path from 'node:path';
import { userInfo } from 'node:os';
import { Fault } from './progress.mjs';
import { lastLines, launch } from './processes.mjs';
import { waitForPort } from './ports.mjs';
import { root } from './profiles.mjs';
import { secretsOf } from './secrets.mjs';

const asRoot = () => (process.getuid() === 0 ? ['--user=root'] : []);

function makeDataFolder(profile) {
  if (existsSync(profile.databaseFolder)) return;
  // Made beside and renamed: a first start that is killed leaves no half-made database.
  const making = `${profile.databaseFolder}.making`;
  rmSync(making, { recursive: true, force: true });
  mkdirSync(making, { recursive: true, mode: 0o700 });
  const made = spawnSync(
    'mariadb-install-db',
    [
      '--no-defaults',
      `--datadir=${making}`,
      ...asRoot(),
      '--auth-root-authentication-method=socket',
      `--auth-root-socket-user=${userInfo().username}`,
      '--skip-test-db',
    ],
    { encoding: 'utf8' },
  );
  if (made.status !== 0)
    throw new Fault(`The database could not be made:\n${made.error?.message ?? ''}${made.stdout}${made.stderr}`);
  renameSync(making, profile.databaseFolder);
}

/** Statements run at every start, one a line: the schema and its two users. Table rights of `app` come with the migrations. */
function initStatements(profile, fresh) {
  const secrets = secretsOf(profile);
  return [
    ...(fresh ? ['DROP DATABASE IF EXISTS ringtrue;', "DROP USER IF EXISTS 'app'@'127.0.0.1';"] : []),
    'CREATE DATABASE IF NOT EXISTS ringtrue CHARACTER SET utf8mb4 COLLATE utf8mb4_unicode_ci;',
    ...['owner', 'app'].flatMap((user) => {
      const password = user === 'owner' ? secrets.databaseOwner : secrets.databaseApp;
      return [
        `CREATE USER IF NOT EXISTS '${user}'@'127.0.0.1' IDENTIFIED BY '${password}';`,
        `ALTER USER '${user}'@'127.0.0.1' IDENTIFIED BY '${password}';`,
      ];
    }),
    "GRANT ALL PRIVILEGES ON ringtrue.* TO 'owner'@'127.0.0.1' WITH GRANT OPTION;",
    '',
  ].join('\n');
}

/** Starts the profile's own MariaDB and waits until it answers. Throws a Fault with its last words when it does not. */
export async function startDatabase(profile, { fresh = false } = {}) {
  makeDataFolder(profile);
  mkdirSync(profile.socketFolder, { recursive: true, mode: 0o700 });
  const initFile = path.join(profile.folder, 'database-start.sql');
  rmSync(initFile, { force: true });
  writeFileSync(initFile, initStatements(profile, fresh), { mode: 0o600 });
  const database = launch(profile, 'database', 'mariadbd', [
    '--no-defaults',
    `--datadir=${profile.databaseFolder}`,
    `--socket=${path.join(profile.socketFolder, 'db.sock')}`,
    `--pid-file=${path.join(profile.socketFolder, 'db.pid')}`,
    `--port=${profile.ports.database}`,
    '--bind-address=127.0.0.1',
    '--skip-name-resolve',
    ...asRoot(),
    `--init-file=${initFile}`,
    '--innodb-flush-log-at-trx-commit=1',
    '--innodb-buffer-pool-size=256M',
    '--max-connections=300',
    '--character-set-server=utf8mb4',
    '--default-time-zone=+00:00',
    '--max-allowed-packet=64M',
  ]);
  const ready = await waitForPort(profile.ports.database, { greets: true, seconds: 60, alive: () => !database.ended });
  if (!ready)
    throw new Fault(`MariaDB did not start (${path.relative(root, database.logFile)}):\n${lastLines(database.logFile)}`);
  return database;
}

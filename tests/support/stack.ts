import { existsSync, readFileSync } from 'node:fs';
import path from 'node:path';

const file = path.resolve(import.meta.dirname, '..', '..', '.local', 'test', 'env.json');

/**
 * Puts the settings of the running local stack into `process.env` unless the runner already did:
 * `npm test` passes its own; otherwise those of `node docker/up.mjs test` are read.
 * Throws when no stack was ever started.
 */
export function takeLocalStack(): void {
  if (process.env.RINGTRUE_DATABASE_URL) return;
  if (!existsSync(file))
    throw new Error('No database for the tests: run `node docker/up.mjs test` first, or the whole `npm test`.');
  const settings = JSON.parse(readFileSync(file, 'utf8')) as Record<string, string>;
  for (const [name, value] of Object.entries(settings)) process.env[name] ??= value;
}

/** The folder in which the local mail catcher keeps mails as .eml files. */
export function mailFolder(): string {
  takeLocalStack();
  const folder = process.env.RINGTRUE_MAIL_FOLDER;
  if (!folder) throw new Error('RINGTRUE_MAIL_FOLDER is not set');
  return folder;
}

/** The address of the built product on the test stack, for browser tests. */
export function testAddress(): string {
  const address = process.env.RINGTRUE_TEST_ADDRESS;
  if (!address) throw new Error('RINGTRUE_TEST_ADDRESS is not set: browser tests run by `node docker/test.mjs --only browser`');
  return address;
}

// As a set-up file of the test runner: give the settings before any module of the product reads them.
if (existsSync(file)) takeLocalStack();

import { randomBytes } from 'node:crypto';
import { mkdirSync, readFileSync, writeFileSync } from 'node:fs';
import path from 'node:path';

const word = () => randomBytes(18).toString('base64url');

/** Passwords of this profile, made at its first start and readable by its owner alone. */
export function secretsOf(profile) {
  mkdirSync(profile.folder, { recursive: true, mode: 0o700 });
  const file = path.join(profile.folder, 'secrets.json');
  try {
    return JSON.parse(readFileSync(file, 'utf8'));
  } catch (error) {
    if (error.code !== 'ENOENT') throw error;
  }
  const secrets = { databaseOwner: word(), databaseApp: word(), keysPassphrase: word() };
  writeFileSync(file, JSON.stringify(secrets, null, 2), { mode: 0o600 });
  return secrets;
}

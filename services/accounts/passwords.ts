import { hash, verify } from '@node-rs/argon2';

// OWASP's second recommendation for argon2id (19 MiB, 2 passes, 1 lane), from memory.
const cost = { memoryCost: 19456, timeCost: 2, parallelism: 1 } as const;

/** argon2id hash of a password or PIN. */
export function hashPassword(password: string): Promise<string> {
  return hash(password, cost);
}

/** A hash nobody's password matches: unknown accounts cost the same time as known ones. */
let nobody: Promise<string> | undefined;

/** True when the password matches; with no hash the same work is done and the answer is false. */
export async function passwordMatches(stored: string | null, password: string): Promise<boolean> {
  nobody ??= hashPassword('no account has this password: ring, crack, core, shell');
  const matches = await verify(stored ?? (await nobody), password);
  return stored !== null && matches;
}

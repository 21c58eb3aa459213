import { accountById } from '@/db/repositories/accounts';
import { proveSitting, sittingOf, touchSitting } from '@/db/repositories/sittings';
import { execute, inTransaction, reading, selectOne } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { Problem } from '@/services/http/problem';
import { passwordMatches } from './passwords';
import { rememberAttempt, secondsToWait } from './rate-limit';

/** Wrong PINs after which only the password counts. */
export const pinTries = 5;

/**
 * The person's own password (or, for bench work, PIN) at the moment of signing. A PIN counts within a sitting: one that
 * began with password or badge and has not stood idle. Five wrong PINs lock the PIN until the password is used. Problems: signature-refused, too-many-attempts. Call before the signing transaction opens.
 */
export async function confirmSignature(
  actor: Actor,
  proof: { readonly password?: string | undefined; readonly pin?: string | undefined },
): Promise<void> {
  const account = await accountById(reading(), actor.id);
  if (!account || account.disabledAt !== null) throw new Problem('not-signed-in', 'This account is closed.');
  if (proof.password !== undefined) {
    await confirmPassword(account.id, account.email, account.passwordHash, proof.password);
    const { sessionId } = actor;
    if (sessionId !== null) await inTransaction(null, (work) => proveSitting(work, sessionId));
    return;
  }
  if (proof.pin !== undefined) {
    await refuseEndedSitting(actor.sessionId);
    await confirmPin(account.id, account.pinHash, proof.pin);
    if (actor.sessionId !== null) await touchSitting(actor.sessionId);
    return;
  }
  throw new Problem('invalid-input', 'password: is needed to sign', [{ path: 'password', message: 'is needed to sign' }]);
}

/** A sitting that stood idle is no longer the person who opened it: the password brings it back. */
async function refuseEndedSitting(sessionId: string | null): Promise<void> {
  const { state } = await sittingOf(reading(), sessionId);
  if (state === 'open') return;
  throw new Problem(
    'signature-refused',
    `Five minutes without work ended this sitting. Sign with the password once; after that the PIN counts again.`,
    [{ path: 'pin', message: 'does not count after five idle minutes; use the password' }],
    { why: 'sitting-ended' },
  );
}

async function confirmPassword(accountId: string, email: string, stored: string, password: string): Promise<void> {
  const address = `signature:${accountId}`;
  const wait = await inTransaction(null, (work) => secondsToWait(work, email, address));
  if (wait > 0)
    throw new Problem('too-many-attempts', `Too many wrong passwords. Try again in ${String(wait / 60)} minutes.`, [], {
      retryAfterS: wait,
    });
  if (await passwordMatches(stored, password)) {
    await inTransaction(null, (work) =>
      execute(work, 'UPDATE accounts SET pin_failures = 0 WHERE id = ? AND pin_failures > 0', [accountId]),
    );
    return;
  }
  await inTransaction(null, (work) => rememberAttempt(work, { email, accountId, address, outcome: 'refused' }));
  throw new Problem('signature-refused', 'The password is wrong. Nothing was signed; what you entered is kept.', [
    { path: 'password', message: 'is wrong' },
  ]);
}

async function confirmPin(accountId: string, stored: string | null, pin: string): Promise<void> {
  if (stored === null)
    throw new Problem('signature-refused', 'No PIN is set for this account. Sign with the password.', [
      { path: 'pin', message: 'no PIN is set; use the password' },
    ]);
  const outcome = await judgePin(accountId, stored, pin);
  if (outcome === 'right') return;
  if (outcome === 'locked')
    throw new Problem('signature-refused', 'The PIN is locked after five wrong tries. Sign with the password.', [
      { path: 'pin', message: 'is locked; use the password' },
    ]);
  throw new Problem('signature-refused', 'The PIN is wrong. Nothing was signed; what you entered is kept.', [
    { path: 'pin', message: 'is wrong' },
  ]);
}

/**
 * Judges a PIN under the account's row: many guesses at once are judged one after another, and right PINs lock nobody
 * out. Without an account or PIN the same work is done and the answer is wrong.
 */
export async function judgePin(
  accountId: string | null,
  stored: string | null,
  pin: string,
): Promise<'right' | 'wrong' | 'locked'> {
  return inTransaction(null, async (work) => {
    const row =
      accountId === null
        ? undefined
        : await selectOne<{ failures: number }>(work, 'SELECT pin_failures AS failures FROM accounts WHERE id = ? FOR UPDATE', [
            accountId,
          ]);
    const right = await passwordMatches(stored, pin);
    if (!row) return 'wrong';
    if (row.failures >= pinTries) return 'locked';
    await execute(work, 'UPDATE accounts SET pin_failures = ? WHERE id = ?', [right ? 0 : row.failures + 1, accountId]);
    return right ? 'right' : 'wrong';
  });
}

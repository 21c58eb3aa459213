import { accountByEmail, type Account } from '@/db/repositories/accounts';
import { endSession } from '@/db/repositories/sessions';
import { endSittingsAt } from '@/db/repositories/sittings';
import { inTransaction, reading, type Work } from '@/db/work';
import { Problem } from '@/services/http/problem';
import { passwordMatches } from './passwords';
import { rememberAttempt, secondsToWait } from './rate-limit';
import { openSession } from './sessions';

interface Attempt {
  readonly email: string;
  readonly password: string;
  readonly address: string;
}

/**
 * Checks e-mail and password. The refusal is kept in a transaction of its own, since the sign-in's own rolls back.
 * Problems: sign-in-refused (the same whoever you are not), too-many-attempts.
 */
export async function checkSignIn(attempt: Attempt): Promise<Account> {
  const wait = await inTransaction(null, async (work) => {
    const seconds = await secondsToWait(work, attempt.email, attempt.address);
    if (seconds > 0) await rememberAttempt(work, { ...attempt, accountId: null, outcome: 'limited' });
    return seconds;
  });
  if (wait > 0)
    throw new Problem('too-many-attempts', `Too many attempts. Try again in ${String(wait / 60)} minutes.`, [], {
      retryAfterS: wait,
    });
  const account = await accountByEmail(reading(), attempt.email);
  const matches = await passwordMatches(account?.passwordHash ?? null, attempt.password);
  const open = await inTransaction(null, async (work) => {
    const usable =
      account !== undefined &&
      matches &&
      account.disabledAt === null &&
      (account.accessUntil === null || account.accessUntil > work.now);
    if (!usable) await rememberAttempt(work, { ...attempt, accountId: account?.id ?? null, outcome: 'refused' });
    return usable;
  });
  if (!open || !account) throw new Problem('sign-in-refused', 'E-mail or password is wrong.');
  return account;
}

/**
 * Opens the session of a checked account under a new id, ends the one the browser came with (nobody may have put it
 * there), and keeps the sign-in; answers the Set-Cookie value.
 */
export async function enter(
  work: Work,
  account: Account,
  place: {
    readonly address: string;
    readonly agent: string;
    readonly earlier: string | null;
    readonly workstationId?: string | null;
  },
): Promise<string> {
  if (place.earlier !== null) await endSession(work, place.earlier);
  await rememberAttempt(work, { email: account.email, accountId: account.id, address: place.address, outcome: 'signed-in' });
  const workstationId = place.workstationId ?? null;
  if (workstationId !== null) await endSittingsAt(work, workstationId);
  return openSession(account.id, work.now, place.address, place.agent, work, { workstationId, provenBy: 'password' });
}

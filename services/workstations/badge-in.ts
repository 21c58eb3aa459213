import { accountByEmail, accountById, type Account } from '@/db/repositories/accounts';
import { endSession } from '@/db/repositories/sessions';
import { endSittingsAt } from '@/db/repositories/sittings';
import { accountOfBadge } from '@/db/repositories/workstations';
import { inTransaction, reading, type Work } from '@/db/work';
import { judgePin } from '@/services/accounts/confirm-signature';
import { rememberAttempt, secondsToWait } from '@/services/accounts/rate-limit';
import { openSession } from '@/services/accounts/sessions';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import type { badgeIn as contract } from '@/services/contracts/workstations';
import { Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { badgeDigestOf } from './keep-workstations';
import { workstationOfRequest } from './workstation-of-request';

interface Badged {
  readonly account: Account;
  readonly workstation: { readonly id: string; readonly name: string };
}

async function accountFor(body: BodyOf<typeof contract>): Promise<Account | undefined> {
  if (body.email !== undefined) return accountByEmail(reading(), body.email);
  const id = await accountOfBadge(reading(), badgeDigestOf(body.badge ?? ''));
  return id === undefined ? undefined : accountById(reading(), id);
}

/**
 * Checks badge (or e-mail) and PIN at a registered workstation. Wrong badge, wrong PIN, a locked PIN and a closed account
 * answer the same. Problems: not-permitted away from a workstation, sign-in-refused, too-many-attempts.
 */
export async function checkBadge(body: BodyOf<typeof contract>, request: Request, address: string): Promise<Badged> {
  const workstation = await workstationOfRequest(request);
  if (!workstation)
    throw new Problem('not-permitted', 'This browser is not a registered workstation. Sign in with e-mail and password.');
  const account = await accountFor(body);
  const tried = account?.email ?? body.email ?? badgeDigestOf(body.badge ?? '');
  const wait = await inTransaction(null, (work) => secondsToWait(work, tried, address));
  if (wait > 0)
    throw new Problem('too-many-attempts', `Too many attempts. Try again in ${String(wait / 60)} minutes.`, [], {
      retryAfterS: wait,
    });
  const outcome = await judgePin(account?.id ?? null, account?.pinHash ?? null, body.pin);
  const open = await inTransaction(null, async (work) => {
    const usable =
      account?.disabledAt === null && outcome === 'right' && (account.accessUntil === null || account.accessUntil > work.now);
    if (!usable) await rememberAttempt(work, { email: tried, accountId: account?.id ?? null, address, outcome: 'refused' });
    return usable;
  });
  if (!open || !account)
    throw new Problem(
      'sign-in-refused',
      'Badge or PIN is wrong, or the PIN is locked. Five wrong PINs lock it; sign in with the password then.',
    );
  return { account, workstation };
}

/** Ends who sat here and opens this person's session and sitting; the answer sets the session's cookie. */
export async function badgeIn(
  work: Work,
  { account, workstation }: Badged,
  place: { readonly address: string; readonly agent: string; readonly earlier: string | null },
): Promise<Recorded<AnswerOf<typeof contract>>> {
  const ended = await endSittingsAt(work, workstation.id);
  if (place.earlier !== null) await endSession(work, place.earlier);
  await rememberAttempt(work, { email: account.email, accountId: account.id, address: place.address, outcome: 'signed-in' });
  const cookie = await openSession(account.id, work.now, place.address, place.agent, work, {
    workstationId: workstation.id,
    provenBy: 'badge',
  });
  return {
    answer: { user: { id: account.id, name: account.name }, workstation: workstation.name },
    headers: { 'set-cookie': cookie },
    events: [
      {
        subject: { kind: 'account', id: account.id },
        also: [{ kind: 'workstation', id: workstation.id }],
        details: { workstation: workstation.name, ended: ended.filter((id) => id !== account.id) },
      },
    ],
  };
}

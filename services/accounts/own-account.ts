import { accountById, accounts, actorOf, type Account } from '@/db/repositories/accounts';
import { endSessionsOf, lastSignIns, sessionsOf } from '@/db/repositories/sessions';
import { update } from '@/db/models/table';
import type { Reading, Work } from '@/db/work';
import { passwordFault, type changePassword as passwordContract, type OwnAccount } from '@/services/contracts/accounts';
import type { Actor } from '@/services/contracts/actor';
import type { BodyOf } from '@/services/contracts/operation';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { confirmSignature, pinTries } from './confirm-signature';
import { hashPassword } from './passwords';
import { emailDigest } from './rate-limit';
import { openSession } from './sessions';

type By = Work & { readonly actor: Actor };

async function own(reading: Reading, actor: Actor): Promise<Account> {
  const account = await accountById(reading, actor.id);
  if (!account) throw notFound('Account');
  return account;
}

function pinOf({ pinHash, pinFailures }: Account): OwnAccount['pin'] {
  if (pinHash === null) return 'none';
  return pinFailures >= pinTries ? 'locked' : 'set';
}

/** Who I am, how this account was last signed in to, and where it is signed in now. */
export async function readAccount(reading: Reading, actor: Actor): Promise<OwnAccount> {
  const account = await own(reading, actor);
  const { id, name, email, role, releaseAuthority, customerName, accessUntil, locale } = actorOf(account, null);
  const signIns = await lastSignIns(reading, emailDigest(email), 20);
  return {
    ...{ id, name, email, role, releaseAuthority, customer: customerName, accessUntil, locale, pin: pinOf(account) },
    // A wrong password at a signature is kept as a try from no address.
    signIns: signIns.map((row) =>
      row.address.startsWith('signature:') ? { at: row.at, address: '', outcome: 'signature-refused' as const } : row,
    ),
    sessions: await sessionsOf(reading, id, actor.sessionId),
  };
}

/** The language of the account, for mails and the next workstation. */
export async function changeLocale(work: By, locale: 'en' | 'fr'): Promise<Recorded<OwnAccount>> {
  await update(work, accounts, { locale }, { id: work.actor.id });
  return {
    answer: await readAccount(work, work.actor),
    events: [{ subject: { kind: 'account', id: work.actor.id }, details: { locale } }],
  };
}

/** Confirms the present password and answers the new one's hash. Problems: signature-refused, too-many-attempts, invalid-input. */
export async function prepareNewPassword(actor: Actor, body: BodyOf<typeof passwordContract>): Promise<string> {
  await confirmSignature(actor, { password: body.password });
  const fault =
    passwordFault(body.newPassword, actor.email) ??
    (body.newPassword === body.password ? 'must differ from the present one' : null);
  if (fault !== null) throw new Problem('invalid-input', `newPassword: ${fault}`, [{ path: 'newPassword', message: fault }]);
  return hashPassword(body.newPassword);
}

/** Puts the new password in place; every session ends, and this browser goes on under a new one. */
export async function changePassword(
  work: By,
  passwordHash: string,
  place: { readonly address: string; readonly agent: string },
): Promise<Recorded<undefined>> {
  await update(work, accounts, { passwordHash }, { id: work.actor.id });
  const ended = await endSessionsOf(work, work.actor.id);
  return {
    answer: undefined,
    headers: { 'set-cookie': await openSession(work.actor.id, work.now, place.address, place.agent, work) },
    events: [{ subject: { kind: 'account', id: work.actor.id }, details: { sessionsEnded: ended } }],
  };
}

/** Confirms the password and answers the PIN's hash. */
export async function preparePin(actor: Actor, body: { readonly password: string; readonly pin: string }): Promise<string> {
  await confirmSignature(actor, { password: body.password });
  if (new Set(body.pin).size === 1)
    throw new Problem('invalid-input', 'pin: must not be one digit repeated', [
      { path: 'pin', message: 'must not be one digit repeated' },
    ]);
  return hashPassword(body.pin);
}

/** Puts a PIN in place and unlocks it. */
export async function setPin(work: By, pinHash: string): Promise<Recorded<undefined>> {
  await update(work, accounts, { pinHash, pinFailures: 0 }, { id: work.actor.id });
  return { answer: undefined, events: [{ subject: { kind: 'account', id: work.actor.id }, details: {} }] };
}

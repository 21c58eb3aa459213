import { newId } from '@/db/identity';
import {
  accountByEmail,
  accountById,
  accounts,
  accountsAfter,
  customersByName,
  isCustomer,
  lockAccounts,
  type Account,
  type AccountRow,
} from '@/db/repositories/accounts';
import { insert, update } from '@/db/models/table';
import { thePlant } from '@/db/repositories/plants';
import { endSessionsOf } from '@/db/repositories/sessions';
import { reading, type Reading, type Work } from '@/db/work';
import {
  passwordFault,
  type AccountAnswer,
  type changePerson as changeContract,
  type createPerson as createContract,
  type listPeople as listContract,
} from '@/services/contracts/accounts';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf, QueryOf } from '@/services/contracts/operation';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound, Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { dayEnd } from './day-end';
import { hashPassword } from './passwords';

type By = Work & { readonly actor: Actor };
type Change = BodyOf<typeof changeContract>;

function answerOf(account: Account & { readonly lastSignInAt?: string | null }): AccountAnswer {
  const { id, email, name, role, releaseAuthority, customerId, customerName, accessUntil, disabledAt, version, createdAt } =
    account;
  const customer = customerId === null ? null : { id: customerId, name: customerName ?? '' };
  const lastSignInAt = account.lastSignInAt ?? null;
  return { id, email, name, role, releaseAuthority, customer, accessUntil, disabledAt, lastSignInAt, version, createdAt };
}

/** Accounts by name, keyset-paged. */
export async function listPeople(reading: Reading, query: QueryOf<typeof listContract>): Promise<AnswerOf<typeof listContract>> {
  const after = partsOfKey(query.after, 2);
  const rows = await accountsAfter(reading, after && [String(after[0]), String(after[1])], query.limit + 1);
  return pageOf(rows, query.limit, ({ name, id }) => [name, id], answerOf);
}

/** Customers to choose from, for the page that makes accounts. */
export function customersToChoose(): Promise<{ id: string; name: string }[]> {
  return customersByName(reading());
}

function refuse(faults: readonly FieldError[]): void {
  if (faults.length > 0)
    throw new Problem('invalid-input', faults.map(({ path, message }) => `${path}: ${message}`).join('; '), faults);
}

const fault = (path: string, message: string): FieldError => ({ path, message });

interface Shape {
  readonly role: AccountRow['role'];
  readonly releaseAuthority: boolean;
  readonly customer: string | undefined;
  readonly accessUntil: string | null;
}

function shapeFaults({ role, releaseAuthority, customer, accessUntil }: Shape): FieldError[] {
  return [
    ...(releaseAuthority && role !== 'reviewer' ? [fault('releaseAuthority', 'is for reviewers')] : []),
    ...(role === 'customer-quality' && customer === undefined ? [fault('customer', 'is needed for customer quality')] : []),
    ...(role !== 'customer-quality' && customer !== undefined ? [fault('customer', 'is for customer quality')] : []),
    ...(role === 'auditor' && accessUntil === null ? [fault('accessUntil', 'is needed for an auditor')] : []),
  ];
}

async function instantOf(work: Work, until: string | undefined): Promise<string | null> {
  if (until === undefined) return null;
  if (until.length === 10) return dayEnd(until, (await thePlant(work)).zone);
  return new Date(until).toISOString().replace('Z', '000Z');
}

/** Refuses an initial password that breaks the rule and answers its hash. */
export async function prepareInitialPassword(password: string, email: string): Promise<string> {
  const wrong = passwordFault(password, email);
  refuse(wrong === null ? [] : [fault('initialPassword', wrong)]);
  return hashPassword(password);
}

/** Makes an account. Problems: invalid-input, already-exists. */
export async function createPerson(
  work: By,
  body: BodyOf<typeof createContract>,
  passwordHash: string,
): Promise<Recorded<AccountAnswer>> {
  const email = body.email.trim().toLowerCase();
  const accessUntil = await instantOf(work, body.accessUntil);
  const releaseAuthority = body.releaseAuthority === true;
  refuse(shapeFaults({ role: body.role, releaseAuthority, customer: body.customer, accessUntil }));
  if (body.customer !== undefined && !(await isCustomer(work, body.customer))) refuse([fault('customer', 'is not a customer')]);
  if (await accountByEmail(work, email))
    throw new Problem('already-exists', 'There is an account with this e-mail.', [fault('email', 'has an account already')]);
  const id = newId();
  const { name, role, locale = 'en' } = body;
  await insert(work, accounts, {
    ...{ id, email, name, role, releaseAuthority, accessUntil, passwordHash, locale },
    ...{ customerId: body.customer ?? null, pinHash: null, pinFailures: 0, disabledAt: null, version: 0, createdAt: work.now },
  });
  return {
    answer: answerOf(await known(work, id)),
    events: [
      { subject: { kind: 'account', id }, details: { role, releaseAuthority, accessUntil, customer: body.customer ?? null } },
    ],
  };
}

async function known(reading: Reading, id: string): Promise<Account> {
  const account = await accountById(reading, id);
  if (!account) throw notFound('Account');
  return account;
}

/** The hash of a new initial password, when one is given. */
export async function prepareChange(id: string, body: Change): Promise<string | null> {
  if (body.initialPassword === undefined) return null;
  return prepareInitialPassword(body.initialPassword, (await known(reading(), id)).email);
}

function refuseOnOneself(actor: Actor, id: string, body: Change): void {
  if (actor.id !== id) return;
  if (body.disabled === true) throw new Problem('not-permitted', 'Nobody disables their own account; another administrator can.');
  if (body.initialPassword !== undefined)
    throw new Problem('not-permitted', 'Change your own password on your account page, with the present one.');
}

/**
 * Changes an account; disabling it or setting a new password ends its sessions in the same transaction.
 * Problems: version-needed, changed-meanwhile, not-permitted, invalid-input, not-found.
 */
export async function changePerson(
  work: By,
  id: string,
  body: Change,
  ifMatch: number | null,
  passwordHash: string | null,
): Promise<Recorded<AccountAnswer>> {
  if (ifMatch === null) throw new Problem('version-needed', 'Send If-Match with the version you read.');
  await lockAccounts(work, [work.actor.id, id]);
  // Two administrators who disable each other at once: the second no longer may.
  if ((await known(work, work.actor.id)).disabledAt !== null) throw new Problem('not-signed-in', 'This account is closed.');
  const before = await known(work, id);
  refuseOnOneself(work.actor, id, body);
  if (before.version !== ifMatch)
    throw new Problem('changed-meanwhile', 'Somebody changed this account since you read it.', [], {
      present: answerOf(before),
      version: before.version,
    });
  const accessUntil = body.accessUntil === undefined ? before.accessUntil : await instantOf(work, body.accessUntil);
  const releaseAuthority = body.releaseAuthority ?? before.releaseAuthority;
  refuse(shapeFaults({ role: before.role, releaseAuthority, customer: before.customerId ?? undefined, accessUntil }));
  const disabledAt = body.disabled === undefined ? before.disabledAt : body.disabled ? (before.disabledAt ?? work.now) : null;
  await update(
    work,
    accounts,
    {
      ...{ name: body.name ?? before.name, releaseAuthority, accessUntil, disabledAt, version: before.version + 1 },
      // Whoever knew the old password may know the PIN.
      ...(passwordHash === null ? {} : { passwordHash, pinHash: null, pinFailures: 0 }),
    },
    { id },
  );
  const ends = passwordHash !== null || body.disabled === true;
  const sessionsEnded = ends ? await endSessionsOf(work, id) : 0;
  const { initialPassword, ...told } = body;
  const answer = answerOf(await known(work, id));
  return {
    answer,
    headers: { etag: `"${String(answer.version)}"` },
    events: [
      {
        subject: { kind: 'account', id },
        details: { ...told, ...(initialPassword === undefined ? {} : { initialPassword: 'set' }), sessionsEnded },
      },
    ],
  };
}

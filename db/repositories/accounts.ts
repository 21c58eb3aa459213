import type { Actor } from '../../services/contracts/actor';
import type { Role } from '../../services/contracts/common';
import { table } from '../models/table';
import { isoOf, select, selectOne, type Reading, type Work } from '../work';

export interface AccountRow {
  id: string;
  email: string;
  name: string;
  role: Role;
  releaseAuthority: boolean;
  customerId: string | null;
  accessUntil: string | null;
  passwordHash: string;
  pinHash: string | null;
  pinFailures: number;
  locale: 'en' | 'fr';
  disabledAt: string | null;
  version: number;
  createdAt: string;
}

export const accounts = table<AccountRow>('accounts', {
  id: 'uuid',
  email: 'text',
  name: 'text',
  role: 'text',
  releaseAuthority: 'flag',
  customerId: 'uuid',
  accessUntil: 'time',
  passwordHash: 'text',
  pinHash: 'text',
  pinFailures: 'int',
  locale: 'text',
  disabledAt: 'time',
  version: 'int',
  createdAt: 'time',
});

const columns = `a.id, a.email, a.name, a.role, a.release_authority AS releaseAuthority, a.customer_id AS customerId, c.name AS customerName,
  ${isoOf('a.access_until')} AS accessUntil, a.password_hash AS passwordHash, a.pin_hash AS pinHash, a.pin_failures AS pinFailures, a.locale,
  ${isoOf('a.disabled_at')} AS disabledAt, a.version, ${isoOf('a.created_at')} AS createdAt`;

export type Account = AccountRow & { readonly customerName: string | null };

type Stored = Omit<Account, 'releaseAuthority'> & { releaseAuthority: number };

function toAccount(row: Stored): Account {
  return { ...row, releaseAuthority: row.releaseAuthority === 1 };
}

const from = 'FROM accounts a LEFT JOIN customers c ON c.id = a.customer_id';

/** The account with this e-mail (case does not matter), or undefined. */
export async function accountByEmail(reading: Reading, email: string): Promise<Account | undefined> {
  const row = await selectOne<Stored>(reading, `SELECT ${columns} ${from} WHERE a.email = ?`, [email.trim().toLowerCase()]);
  return row && toAccount(row);
}

export async function accountById(reading: Reading, accountId: string): Promise<Account | undefined> {
  const row = await selectOne<Stored>(reading, `SELECT ${columns} ${from} WHERE a.id = ?`, [accountId]);
  return row && toAccount(row);
}

/** Accounts by name after a key, with the last sign-in. */
export async function accountsAfter(
  reading: Reading,
  after: readonly [string, string] | null,
  limit: number,
): Promise<(Account & { readonly lastSignInAt: string | null })[]> {
  const [name, id] = after ?? ['', '00000000-0000-0000-0000-000000000000'];
  const rows = await select<Stored & { lastSignInAt: string | null }>(
    reading,
    `SELECT ${columns}, (SELECT ${isoOf('MAX(s.at)')} FROM sign_ins s WHERE s.account_id = a.id AND s.outcome = 'signed-in') AS lastSignInAt
     ${from} WHERE a.name >= ? AND (a.name > ? OR a.id > ?) ORDER BY a.name, a.id LIMIT ?`,
    [name, name, id, limit],
  );
  return rows.map((row) => ({ ...toAccount(row), lastSignInAt: row.lastSignInAt }));
}

/** Locks accounts until commit, in id order, so that two who decide about the same people queue. */
export async function lockAccounts(work: Work, ids: readonly string[]): Promise<void> {
  await select(work, 'SELECT id FROM accounts WHERE id IN (?) ORDER BY id FOR UPDATE', [[...new Set(ids)].sort()]);
}

/** Customers an account can belong to. */
export function customersByName(reading: Reading): Promise<{ id: string; name: string }[]> {
  return select(reading, 'SELECT id, name FROM customers ORDER BY name, id LIMIT 500');
}

export async function isCustomer(reading: Reading, customerId: string): Promise<boolean> {
  return (await selectOne(reading, 'SELECT id FROM customers WHERE id = ?', [customerId])) !== undefined;
}

/** Is this an inspector or reviewer with an open account? */
export async function inspects(reading: Reading, accountId: string): Promise<boolean> {
  const account = await accountById(reading, accountId);
  return account?.disabledAt === null && (account.role === 'inspector' || account.role === 'reviewer');
}

/** Staff whose work needs an authorisation, by name; disabled ones left out. */
export function peopleWhoInspect(reading: Reading): Promise<{ id: string; name: string }[]> {
  return select(
    reading,
    `SELECT id, name FROM accounts WHERE role IN ('inspector', 'reviewer') AND disabled_at IS NULL ORDER BY name, id LIMIT 500`,
  );
}

/** What the rest of the product knows of a signed-in person. */
export function actorOf(account: Account, sessionId: string | null): Actor {
  const { id, name, email, role, releaseAuthority, customerId, customerName, accessUntil, locale } = account;
  return { id, name, email, role, releaseAuthority, customerId, customerName, accessUntil, locale, sessionId };
}

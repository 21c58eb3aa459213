import type { Actor } from '../../services/contracts/actor';
import type { Role } from '../../services/contracts/common';
import { table } from '../models/table';
import { isoOf, selectOne, type Reading } from '../work';

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

/** What the rest of the product knows of a signed-in person. */
export function actorOf(account: Account, sessionId: string | null): Actor {
  const { id, name, email, role, releaseAuthority, customerId, customerName, accessUntil, locale } = account;
  return { id, name, email, role, releaseAuthority, customerId, customerName, accessUntil, locale, sessionId };
}

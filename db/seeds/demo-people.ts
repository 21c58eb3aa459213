import { hashPassword } from '@/services/accounts/passwords';
import type { Actor } from '@/services/contracts/actor';
import type { Role } from '@/services/contracts/common';
import { newId } from '../identity';
import { insert } from '../models/table';
import { accounts, actorOf, accountById } from '../repositories/accounts';
import { execute, inTransaction, sqlTimeOf, type Work } from '../work';

export const demoPassword = 'sound-castings-ring-true';
export const demoPin = '221031';

interface CastMember {
  readonly email: string;
  readonly name: string;
  readonly role: Role;
  readonly releaseAuthority?: boolean;
  readonly customer?: 'TARN' | 'CORV';
  readonly level?: '2' | '3';
  /** Days since the last near-vision test. */
  readonly visionDaysAgo?: number;
}

/** Invented people of the invented foundry. */
export const cast: readonly CastMember[] = [
  { email: 'inspector@aldermoor.example', name: 'Maren Oakhurst', role: 'inspector', level: '2' },
  { email: 'inspector2@aldermoor.example', name: 'Tobiah Fenwright', role: 'inspector', level: '2' },
  { email: 'inspector3@aldermoor.example', name: 'Isolde Garrow', role: 'inspector', level: '2', visionDaysAgo: 401 },
  { email: 'reviewer@aldermoor.example', name: 'Corin Hallestad', role: 'reviewer', level: '3' },
  { email: 'reviewer2@aldermoor.example', name: 'Wilhelmina Thorne', role: 'reviewer', level: '3' },
  { email: 'signatory@aldermoor.example', name: 'Ansel Brightwater', role: 'reviewer', releaseAuthority: true, level: '3' },
  { email: 'administrator@aldermoor.example', name: 'Petra Lindqvale', role: 'administrator' },
  { email: 'quality@tarnside.example', name: 'Odile Marchbanks', role: 'customer-quality', customer: 'TARN' },
  { email: 'quality@corvane.example', name: 'Rufus Ellingham', role: 'customer-quality', customer: 'CORV' },
  { email: 'auditor@fennick.example', name: 'Sunniva Crake', role: 'auditor' },
];

const methods = [
  'radiography',
  'penetrant',
  'ultrasonic-thickness',
  'dimensional',
  'visual',
  'marking',
  'mass',
  'grain',
  'airflow',
];

export type Cast = Readonly<Record<string, Actor>>;

async function qualify(work: Work, accountId: string, grantedBy: string, level: string, visionDaysAgo: number): Promise<void> {
  const at = sqlTimeOf(work.now);
  for (const method of methods) {
    await execute(
      work,
      `INSERT INTO authorisations (id, account_id, method, technique, level, valid_from, valid_to, granted_by, granted_at, created_at)
       VALUES (?, ?, ?, NULL, ?, DATE(?) - INTERVAL 600 DAY, DATE(?) + INTERVAL ? DAY, ?, ?, ?)`,
      [newId(), accountId, method, level, at, at, method === 'grain' ? 24 : 700, grantedBy, at, at],
    );
  }
  for (const [test, daysAgo] of [
    ['near-vision', visionDaysAgo],
    ['colour-perception', 500],
  ] as const) {
    await execute(
      work,
      `INSERT INTO vision_tests (id, account_id, test, result, corrected, tested_on, created_at) VALUES (?, ?, ?, 'pass', 0, DATE(?) - INTERVAL ? DAY, ?)`,
      [newId(), accountId, test, at, daysAgo, at],
    );
  }
}

/** Accounts, authorisations and vision tests; answers the people by the part of the e-mail before the @ (customers by code). */
export async function seedPeople(customerIds: Readonly<Record<'TARN' | 'CORV', string>>): Promise<Cast> {
  const passwordHash = await hashPassword(demoPassword);
  const pinHash = await hashPassword(demoPin);
  const ids = new Map(cast.map(({ email }) => [email, newId()]));
  await inTransaction(null, async (work) => {
    for (const member of cast) {
      const id = ids.get(member.email) ?? '';
      await insert(work, accounts, {
        id,
        email: member.email,
        name: member.name,
        role: member.role,
        releaseAuthority: member.releaseAuthority === true,
        customerId: member.customer ? customerIds[member.customer] : null,
        accessUntil:
          member.role === 'auditor'
            ? `${String(Number(work.now.slice(0, 4)) + 1)}${work.now.slice(4, 8)}28T00:00:00.000000Z`
            : null,
        passwordHash,
        pinHash,
        pinFailures: 0,
        locale: 'en',
        disabledAt: null,
        version: 0,
        createdAt: work.now,
      });
      if (member.level) {
        const granter =
          ids.get(member.email.startsWith('reviewer@') ? 'reviewer2@aldermoor.example' : 'reviewer@aldermoor.example') ?? id;
        await qualify(work, id, granter, member.level, member.visionDaysAgo ?? 90);
      }
    }
  });
  return inTransaction(null, async (work) => {
    const found: Record<string, Actor> = {};
    for (const member of cast) {
      const account = await accountById(work, ids.get(member.email) ?? '');
      if (account) found[member.customer ?? member.email.split('@')[0] ?? ''] = actorOf(account, null);
    }
    return found;
  });
}

/** One of the cast by name; a missing one is a fault of the seed. */
export function castMember(people: Cast, key: string): Actor {
  const actor = people[key];
  if (!actor) throw new Error(`the demo has no ${key}`);
  return actor;
}

import { z } from 'zod';
import { id, instant, page, pageQuery, password, role, words } from './common';
import { operation } from './operation';

const locale = z.enum(['en', 'fr']);

/** A password as it is chosen; what else it must not be is `passwordFault`. */
const newPassword = z.string().min(1, 'is needed').max(200, 'must have at most 200 characters');

/** Digits only, so that it can be typed with gloves on a number pad. */
const pin = z.string().regex(/^[0-9]{6,12}$/, 'must be 6 to 12 digits');

/** Why this may not be the password of the account, or null: at least 12 characters, not the e-mail, not one character repeated. */
export function passwordFault(chosen: string, email: string): string | null {
  const plain = chosen.trim().toLowerCase();
  const own = email.trim().toLowerCase();
  if ([...chosen].length < 12) return 'must have at least 12 characters';
  if (own !== '' && (plain === own || plain.replaceAll(own, '').length < 6)) return 'must not be the e-mail';
  if (new Set(plain).size < 5) return 'must have at least 5 different characters';
  return null;
}

const ownAccount = z.object({
  id,
  name: z.string(),
  email: z.string(),
  role,
  releaseAuthority: z.boolean(),
  customer: z.string().nullable(),
  accessUntil: instant.nullable(),
  locale,
  pin: z.enum(['none', 'set', 'locked']),
  /** Newest first, at most 20; refused tries with this e-mail included. */
  signIns: z.array(
    z.object({ at: instant, address: z.string(), outcome: z.enum(['signed-in', 'refused', 'limited', 'signature-refused']) }),
  ),
  sessions: z.array(
    z.object({ openedAt: instant, endsAt: instant, address: z.string(), agent: z.string(), current: z.boolean() }),
  ),
});
export type OwnAccount = z.output<typeof ownAccount>;

export const readAccount = operation({
  name: 'read-account',
  method: 'GET',
  path: '/api/account',
  summary: 'The own account: who I am, last sign-ins, open sessions.',
  changes: false,
  response: ownAccount,
  status: 200,
});

export const changeAccount = operation({
  name: 'change-account',
  method: 'PATCH',
  path: '/api/account',
  summary: 'The language of the own account.',
  changes: true,
  body: z.strictObject({ locale }),
  response: ownAccount,
  status: 200,
});

export const changePassword = operation({
  name: 'change-password',
  method: 'POST',
  path: '/api/account/password',
  summary: 'A new own password; every session of the account ends and this one goes on under a new cookie.',
  changes: true,
  body: z.strictObject({ password, newPassword }),
  status: 204,
});

export const setPin = operation({
  name: 'set-pin',
  method: 'PUT',
  path: '/api/account/pin',
  summary: 'Sets the PIN for signing at the bench; needs the password and unlocks a locked PIN.',
  changes: true,
  body: z.strictObject({ password, pin }),
  status: 204,
});

const account = z.object({
  id,
  email: z.string(),
  name: z.string(),
  role,
  releaseAuthority: z.boolean(),
  customer: z.object({ id, name: z.string() }).nullable(),
  accessUntil: instant.nullable(),
  disabledAt: instant.nullable(),
  lastSignInAt: instant.nullable(),
  version: z.number().int(),
  createdAt: instant,
});
export type AccountAnswer = z.output<typeof account>;

/** An instant, or a day: then access ends with that day at the plant. */
const accessUntil = z.union([z.iso.date(), z.iso.datetime()], 'must be a day such as 2026-03-09');

export const listPeople = operation({
  name: 'list-people',
  method: 'GET',
  path: '/api/people',
  summary: 'Accounts by name.',
  changes: false,
  query: pageQuery,
  response: page(account),
  status: 200,
});

export const createPerson = operation({
  name: 'create-person',
  method: 'POST',
  path: '/api/people',
  summary: 'A new account with an initial password; a customer for customer quality, an end of access for auditors.',
  changes: true,
  body: z.strictObject({
    email: z.email('must be an e-mail address').max(200),
    name: words(120),
    role,
    releaseAuthority: z.boolean().optional(),
    customer: id.optional(),
    accessUntil: accessUntil.optional(),
    initialPassword: newPassword,
    locale: locale.optional(),
  }),
  response: account,
  status: 201,
});

export const changePerson = operation({
  name: 'change-person',
  method: 'PATCH',
  path: '/api/people/{id}',
  summary:
    'Disables or enables an account, gives or takes release authority, moves the end of access, sets a new initial password (If-Match).',
  changes: true,
  params: z.object({ id }),
  body: z.strictObject({
    name: words(120).optional(),
    releaseAuthority: z.boolean().optional(),
    accessUntil: accessUntil.optional(),
    disabled: z.boolean().optional(),
    initialPassword: newPassword.optional(),
  }),
  response: account,
  status: 200,
});

const machineToken = z.object({
  id,
  name: z.string(),
  calls: z.array(z.string()),
  madeBy: z.string(),
  createdAt: instant,
  revokedAt: instant.nullable(),
});
export type MachineToken = z.output<typeof machineToken>;

export const listMachineTokens = operation({
  name: 'list-machine-tokens',
  method: 'GET',
  path: '/api/machine-tokens',
  summary: 'Machine tokens, newest first, and the calls a token may name; the tokens themselves are kept nowhere.',
  changes: false,
  response: z.object({ items: z.array(machineToken), next: z.null(), mayName: z.array(z.string()) }),
  status: 200,
});

export const createMachineToken = operation({
  name: 'create-machine-token',
  method: 'POST',
  path: '/api/machine-tokens',
  summary: 'A token for a machine, limited to the calls it names; the answer shows it this once.',
  changes: true,
  body: z.strictObject({ name: words(120), calls: z.array(z.string().max(60)).min(1, 'must name at least one call').max(60) }),
  response: machineToken.extend({ token: z.string() }),
  status: 201,
});

export const revokeMachineToken = operation({
  name: 'revoke-machine-token',
  method: 'DELETE',
  path: '/api/machine-tokens/{id}',
  summary: 'Revokes a token at once.',
  changes: true,
  params: z.object({ id }),
  status: 204,
});

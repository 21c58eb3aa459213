import { z } from 'zod';
import { id, instant, words } from './common';
import { operation } from './operation';

/**
 * The key a scanner sends before a code, named by its place on the keyboard so that no layout changes it: a function
 * key, or one of the keys that no serial needs.
 */
export const scanPrefix = z.enum(['F7', 'F8', 'F9', 'F10', 'Backquote', 'Backslash', 'ScrollLock']);
export type ScanPrefix = z.output<typeof scanPrefix>;

/** What a place without registration listens to. */
export const usualPrefix: ScanPrefix = 'F9';

const workstation = z.object({
  id,
  name: z.string(),
  place: z.string().nullable(),
  scanPrefix,
  registeredBy: z.string(),
  registeredAt: instant,
  retiredAt: instant.nullable(),
  /** Who sits there now. */
  sitting: z.object({ name: z.string(), since: instant }).nullable(),
});
export type Workstation = z.output<typeof workstation>;

export const listWorkstations = operation({
  name: 'list-workstations',
  method: 'GET',
  path: '/api/workstations',
  summary: 'Registered workstations, by name.',
  changes: false,
  response: z.object({ items: z.array(workstation), next: z.null() }),
  status: 200,
});

export const readHere = operation({
  name: 'read-workstation-here',
  method: 'GET',
  path: '/api/workstations/here',
  summary: 'The workstation of this browser, its scanner prefix, and how this person’s sitting stands.',
  changes: false,
  response: z.object({
    workstation: z.object({ id, name: z.string() }).nullable(),
    scanPrefix,
    person: id,
    sitting: z.object({ state: z.enum(['open', 'idle', 'ended', 'none']), endsAt: instant.nullable() }),
  }),
  status: 200,
});
export type Here = z.output<(typeof readHere)['response']>;

export const registerWorkstation = operation({
  name: 'register-workstation',
  method: 'POST',
  path: '/api/workstations',
  summary: 'Registers this browser as a workstation; the answer sets its cookie.',
  changes: true,
  body: z.strictObject({ name: words(60), place: words(80).nullish(), scanPrefix: scanPrefix.default(usualPrefix) }),
  response: workstation,
  status: 201,
});

export const retireWorkstation = operation({
  name: 'retire-workstation',
  method: 'POST',
  path: '/api/workstations/{id}/retirement',
  summary: 'Ends a workstation; its browser is a stranger from then on.',
  changes: true,
  params: z.object({ id }),
  body: z.strictObject({}),
  response: workstation,
  status: 200,
});

/** A badge as its scanner reads it. */
const badgeText = z
  .string()
  .trim()
  .regex(/^[\x21-\x7e]{6,80}$/, 'must be 6 to 80 visible characters');

export const issueBadge = operation({
  name: 'issue-badge',
  method: 'PUT',
  path: '/api/people/{id}/badge',
  summary: 'Gives a person a badge; the one before counts no longer.',
  changes: true,
  params: z.object({ id }),
  body: z.strictObject({ badge: badgeText }),
  status: 204,
});

export const badgeIn = operation({
  name: 'badge-in',
  method: 'POST',
  path: '/api/sittings',
  summary:
    'At a registered workstation: badge or e-mail, and PIN. Opens this person’s session and sitting and ends the one that was open there. The same 401 for anything wrong.',
  changes: true,
  body: z
    .strictObject({
      badge: z.string().min(1).max(80).optional(),
      email: z.string().min(1).max(200).optional(),
      pin: z.string().min(1).max(20),
    })
    .refine(({ badge, email }) => (badge === undefined) !== (email === undefined), {
      path: ['badge'],
      message: 'either a badge or an e-mail is needed',
    }),
  response: z.object({ user: z.object({ id, name: z.string() }), workstation: z.string() }),
  status: 201,
});

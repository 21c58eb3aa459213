import { createHash, randomBytes } from 'node:crypto';
import { newId } from '@/db/identity';
import { accountById } from '@/db/repositories/accounts';
import { endSittingsAt, sittingOf } from '@/db/repositories/sittings';
import {
  accountOfBadge,
  allWorkstations,
  endWorkstation,
  giveBadge,
  keepWorkstation,
  workstationById,
  workstationNamed,
} from '@/db/repositories/workstations';
import type { Reading, Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import {
  usualPrefix,
  type Here,
  type listWorkstations as listContract,
  type registerWorkstation as registerContract,
  type Workstation,
} from '@/services/contracts/workstations';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { tokenDigestOf, workstationCookie, workstationOfRequest } from './workstation-of-request';

type By = Work & { readonly actor: Actor };

const tenYearsS = 315_360_000;
const secure = (process.env.RINGTRUE_BASE_URL ?? '').startsWith('https://') ? '; Secure' : '';

export async function listWorkstations(reading: Reading): Promise<AnswerOf<typeof listContract>> {
  return { items: await allWorkstations(reading), next: null };
}

/** What the browser needs to know of its place. */
export async function readHere(reading: Reading & { readonly actor: Actor }, request: Request): Promise<Here> {
  const here = await workstationOfRequest(request);
  return {
    workstation: here && { id: here.id, name: here.name },
    scanPrefix: here?.scanPrefix ?? usualPrefix,
    person: reading.actor.id,
    sitting: await sittingOf(reading, reading.actor.sessionId),
  };
}

async function found(work: Work, id: string): Promise<Workstation> {
  const station = await workstationById(work, id);
  if (!station) throw notFound('Workstation');
  return station;
}

/** Registers the browser that asks; its token goes out once, in the cookie. Problem already-exists. */
export async function registerWorkstation(work: By, body: BodyOf<typeof registerContract>): Promise<Recorded<Workstation>> {
  if (await workstationNamed(work, body.name))
    throw new Problem('already-exists', `A workstation is called ${body.name} already.`, [
      { path: 'name', message: 'is taken already' },
    ]);
  const id = newId();
  // 192 random bits.
  const token = randomBytes(24).toString('base64url');
  await keepWorkstation(work, {
    id,
    name: body.name,
    place: body.place ?? null,
    scanPrefix: body.scanPrefix,
    tokenDigest: tokenDigestOf(token),
    by: work.actor.id,
  });
  return {
    answer: await found(work, id),
    headers: {
      'set-cookie': `${workstationCookie}=${token}; Path=/; Max-Age=${String(tenYearsS)}; HttpOnly; SameSite=Lax${secure}`,
    },
    events: [{ subject: { kind: 'workstation', id }, details: { name: body.name, place: body.place ?? null } }],
  };
}

/** Ends a workstation and whatever sits there. Problems: not-found, state-refused. */
export async function retireWorkstation(work: By, id: string): Promise<Recorded<Workstation>> {
  const station = await found(work, id);
  if (!(await endWorkstation(work, id, work.actor.id)))
    throw new Problem('state-refused', `Workstation ${station.name} was retired already.`);
  await endSittingsAt(work, id);
  return {
    answer: await found(work, id),
    events: [{ subject: { kind: 'workstation', id }, details: { name: station.name } }],
  };
}

export function badgeDigestOf(badge: string): string {
  return createHash('sha256').update(badge.trim()).digest('hex');
}

/** Gives a person a badge. Problems: not-found, already-exists. */
export async function issueBadge(work: By, accountId: string, badge: string): Promise<Recorded<undefined>> {
  const account = await accountById(work, accountId);
  if (!account) throw notFound('Person');
  const digest = badgeDigestOf(badge);
  const holder = await accountOfBadge(work, digest);
  if (holder !== undefined && holder !== accountId)
    throw new Problem('already-exists', 'Somebody else carries this badge.', [{ path: 'badge', message: 'is somebody else’s' }]);
  await giveBadge(work, digest, accountId, work.actor.id);
  return { answer: undefined, events: [{ subject: { kind: 'account', id: accountId }, details: { name: account.name } }] };
}

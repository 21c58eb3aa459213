import { cookies, headers } from 'next/headers';
import { notFound, redirect } from 'next/navigation';
import type { Actor } from '@/services/contracts/actor';
import { may, type PermissionName } from './permissions';
import { actorBySession, lucia } from './sessions';

/** The signed-in person of a page, or null. */
export async function currentActor(): Promise<Actor | null> {
  const jar = await cookies();
  return actorBySession(jar.get(lucia.sessionCookieName)?.value ?? null);
}

/** Sends a stranger to sign-in, and back to the page that was asked for afterwards. */
export async function askToSignIn(): Promise<never> {
  const wanted = (await headers()).get('x-ringtrue-path');
  redirect(wanted === null || wanted === '/' ? '/sign-in' : `/sign-in?next=${encodeURIComponent(wanted)}`);
}

/** The signed-in person, who must have the permission: strangers go to sign-in, others see 'not found'. */
export async function pageActor(permission: PermissionName): Promise<Actor> {
  const actor = await currentActor();
  if (!actor) return askToSignIn();
  if (!may(actor, permission)) notFound();
  return actor;
}

import { createHash } from 'node:crypto';
import { accountById, actorOf } from '@/db/repositories/accounts';
import { reading, selectOne } from '@/db/work';
import { actorBySession, sessionIdOf } from '@/services/accounts/sessions';
import type { Actor } from '@/services/contracts/actor';

/** The person or machine behind a request: machine token first, then session cookie; null when neither is valid. */
export async function actorOfRequest(request: Request, call: string): Promise<Actor | null> {
  const bearer = /^Bearer ([A-Za-z0-9_-]{20,200})$/.exec(request.headers.get('authorization') ?? '')?.[1];
  if (bearer) return machineActor(bearer, call);
  return actorBySession(sessionIdOf(request));
}

/** A machine token acts for the administrator who made it, limited to the calls it names. */
async function machineActor(token: string, call: string): Promise<Actor | null> {
  const digest = createHash('sha256').update(token).digest('hex');
  const row = await selectOne<{ calls: string; madeBy: string }>(
    reading(),
    'SELECT calls, made_by AS madeBy FROM machine_tokens WHERE token_digest = ? AND revoked_at IS NULL',
    [digest],
  );
  if (!row || !(JSON.parse(row.calls) as string[]).includes(call)) return null;
  const account = await accountById(reading(), row.madeBy);
  return account && account.disabledAt === null ? actorOf(account, null) : null;
}

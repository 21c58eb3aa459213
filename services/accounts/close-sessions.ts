import { endSession, endSessionsOf } from '@/db/repositories/sessions';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { Recorded } from '@/services/http/route';
import { lucia } from './sessions';

/** Ends this session, or every session of the account. */
export async function closeSessions(work: Work & { readonly actor: Actor }, everywhere: boolean): Promise<Recorded<undefined>> {
  if (everywhere) await endSessionsOf(work, work.actor.id);
  else if (work.actor.sessionId) await endSession(work, work.actor.sessionId);
  return {
    answer: undefined,
    headers: { 'set-cookie': lucia.createBlankSessionCookie().serialize() },
    events: [
      {
        ...(everywhere ? { kind: 'signed-out-everywhere' as const } : {}),
        subject: { kind: 'account', id: work.actor.id },
        details: {},
      },
    ],
  };
}

import type { Actor } from '@/services/contracts/actor';
import type { EventKind } from '@/services/http/event-kinds';
import type { Recorded } from '@/services/http/route';
import { appendEvent } from '../repositories/events';
import { inTransaction, type Work } from '../work';

/** Runs a use-case as its person would through the web: one transaction, its events with it. */
export async function perform<Answer>(
  actor: Actor,
  kind: EventKind,
  act: (work: Work & { readonly actor: Actor }) => Promise<Recorded<Answer>>,
): Promise<Answer> {
  return inTransaction(actor, async (work) => {
    const recorded = await act({ ...work, actor });
    for (const event of recorded.events) await appendEvent(work, { ...event, kind: event.kind ?? kind });
    return recorded.answer;
  });
}

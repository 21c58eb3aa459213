import { eventsOf } from '@/db/repositories/events';
import { tracedInspections } from '@/db/repositories/trace';
import type { Reading } from '@/db/work';
import type { Trace } from '@/services/contracts/trace';
import { readPart } from '@/services/parts/read-part';

/** The part, its inspections with people, equipment and files, and the journal of everything that touched it. Problem not-found. */
export async function readTrace(reading: Reading, partId: string, recordedBy: string | undefined): Promise<Trace> {
  const part = await readPart(reading, partId);
  const inspections = await tracedInspections(reading, partId);
  const events = await eventsOf(reading, { kind: 'part', id: partId }, 2000);
  const until = recordedBy ?? null;
  const seen = <Row extends { readonly at: string }>(row: Row) => until === null || row.at <= until;
  return {
    part,
    inspections: inspections.filter(({ signedAt }) => seen({ at: signedAt })),
    events: events.filter(seen),
    recordedBy: until,
  };
}

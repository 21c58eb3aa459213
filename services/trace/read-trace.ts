import { eventsOf, type StoredEvent, type Subject } from '@/db/repositories/events';
import { partById } from '@/db/repositories/parts';
import { genealogyOf, tracedFindings, tracedHolds, tracedInspections } from '@/db/repositories/trace';
import { tracedCertificates } from '@/db/repositories/trace-certificates';
import type { Reading } from '@/db/work';
import type { Trace } from '@/services/contracts/trace';
import { notFound } from '@/services/http/problem';
import { readPart } from '@/services/parts/read-part';
import { asRecordedBy } from './as-recorded-by';

const mostEvents = 2000;

/** Events of several subjects, each once, in the order of the journal. */
async function eventsAbout(reading: Reading, subjects: readonly Subject[]): Promise<StoredEvent[]> {
  const found = new Map<number, StoredEvent>();
  for (const subject of subjects)
    for (const event of await eventsOf(reading, subject, mostEvents)) {
      // A cluster also lists the serials of its other castings; of a lot only its own story belongs here.
      if (subject.kind !== 'lot' || event.subject.kind === 'lot') found.set(event.seq, event);
    }
  return [...found.values()].sort((a, b) => a.seq - b.seq);
}

/**
 * Everything on record about a part: inspections with people, equipment and files, findings and decisions, holds, lots
 * back to the heat, certificates with downloads, and the journal. Problem not-found.
 */
export async function readTrace(reading: Reading, partId: string, recordedBy: string | undefined): Promise<Trace> {
  const row = await partById(reading, partId);
  if (!row) throw notFound('Part');
  const genealogy = await genealogyOf(reading, row.clusterId);
  const lotIds = genealogy.map(({ id }) => id);
  const certificates = await tracedCertificates(reading, partId);
  const subjects = [
    { kind: 'part', id: partId },
    ...certificates.map(({ id }) => ({ kind: 'certificate', id })),
    ...lotIds.map((id) => ({ kind: 'lot', id })),
  ];
  const history = {
    part: await readPart(reading, partId),
    inspections: await tracedInspections(reading, partId),
    findings: await tracedFindings(reading, partId),
    holds: await tracedHolds(reading, partId, lotIds),
    certificates: certificates.map(({ id: _, ...certificate }) => certificate),
    genealogy,
    events: await eventsAbout(reading, subjects),
  };
  return { ...(recordedBy === undefined ? history : asRecordedBy(history, recordedBy)), recordedBy: recordedBy ?? null };
}

import { createHash, randomBytes } from 'node:crypto';
import { canonicalJson } from '../../services/engine/record/canonical';
import { newId } from '../identity';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

export interface Subject {
  readonly kind: string;
  readonly id: string;
}

export interface NewEvent {
  readonly kind: string;
  readonly subject: Subject;
  /** Other things whose history should show the event (a disposition belongs to its finding and its part). */
  readonly also?: readonly Subject[];
  readonly details: Readonly<Record<string, unknown>>;
}

export interface StoredEvent {
  readonly id: string;
  readonly seq: number;
  readonly at: string;
  readonly kind: string;
  readonly actor: { readonly id: string; readonly name: string } | null;
  readonly subject: Subject;
  readonly details: Record<string, unknown>;
  readonly digest: string;
}

/** Appends one event to the journal in the transaction of the change it tells of. */
export async function appendEvent(work: Work, event: NewEvent): Promise<string> {
  const eventId = newId();
  const body = {
    id: eventId,
    at: work.now,
    actor: work.actor?.id ?? null,
    kind: event.kind,
    subject: { kind: event.subject.kind, id: event.subject.id },
    details: JSON.parse(JSON.stringify(event.details)) as unknown,
    // 128 bits, so that a neighbour's digest in a proof cannot be guessed.
    nonce: randomBytes(16).toString('hex'),
    schema: 1,
  };
  const bytes = Buffer.from(canonicalJson(body), 'utf8');
  const digest = createHash('sha256').update(bytes).digest('hex');
  await execute(
    work,
    'INSERT INTO events (id, at, actor_id, kind, subject_kind, subject_id, body, digest) VALUES (?, ?, ?, ?, ?, ?, ?, ?)',
    [eventId, sqlTimeOf(work.now), work.actor?.id ?? null, event.kind, event.subject.kind, event.subject.id, bytes, digest],
  );
  const row = await selectOne<{ seq: number }>(work, 'SELECT seq FROM events WHERE id = ?', [eventId]);
  for (const subject of [event.subject, ...(event.also ?? [])]) {
    await execute(work, 'INSERT IGNORE INTO event_subjects (subject_kind, subject_id, event_seq) VALUES (?, ?, ?)', [
      subject.kind,
      subject.id,
      row?.seq ?? 0,
    ]);
  }
  return eventId;
}

interface EventRow {
  id: string;
  seq: number;
  at: string;
  kind: string;
  actorId: string | null;
  actorName: string | null;
  subjectKind: string;
  subjectId: string;
  body: Buffer;
  digest: string;
}

function toEvent(row: EventRow): StoredEvent {
  const body = JSON.parse(row.body.toString('utf8')) as { details: Record<string, unknown> };
  return {
    id: row.id,
    seq: row.seq,
    at: row.at,
    kind: row.kind,
    actor: row.actorId ? { id: row.actorId, name: row.actorName ?? '' } : null,
    subject: { kind: row.subjectKind, id: row.subjectId },
    details: body.details,
    digest: row.digest,
  };
}

const columns = `e.id, e.seq, ${isoOf('e.at')} AS at, e.kind, e.actor_id AS actorId, a.name AS actorName, e.subject_kind AS subjectKind, e.subject_id AS subjectId, e.body, e.digest`;

/** The events whose history a subject shows, oldest first, at most `limit`, after a journal position. */
export async function eventsOf(reading: Reading, subject: Subject, limit = 500, afterSeq = 0): Promise<StoredEvent[]> {
  const rows = await select<EventRow>(
    reading,
    `SELECT ${columns} FROM event_subjects s JOIN events e ON e.seq = s.event_seq LEFT JOIN accounts a ON a.id = e.actor_id
     WHERE s.subject_kind = ? AND s.subject_id = ? AND s.event_seq > ? ORDER BY s.event_seq LIMIT ?`,
    [subject.kind, subject.id, afterSeq, limit],
  );
  return rows.map(toEvent);
}

import type { JournalEvent } from '../../services/contracts/trace';
import { isoOf, select, type Reading } from '../work';

interface Row {
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

/** Newest events of the whole journal before a position (null = from the newest). */
export async function newestEvents(reading: Reading, limit: number, beforeSeq: number | null): Promise<JournalEvent[]> {
  const rows = await select<Row>(
    reading,
    `SELECT e.id, e.seq, ${isoOf('e.at')} AS at, e.kind, e.actor_id AS actorId, a.name AS actorName, e.subject_kind AS subjectKind, e.subject_id AS subjectId, e.body, e.digest
     FROM events e LEFT JOIN accounts a ON a.id = e.actor_id ${beforeSeq === null ? '' : 'WHERE e.seq < ?'} ORDER BY e.seq DESC LIMIT ?`,
    beforeSeq === null ? [limit] : [beforeSeq, limit],
  );
  return rows.map(({ actorId, actorName, subjectKind, subjectId, body, ...row }) => ({
    ...row,
    actor: actorId === null ? null : { id: actorId, name: actorName ?? '' },
    subject: { kind: subjectKind, id: subjectId },
    details: (JSON.parse(body.toString('utf8')) as { details: Record<string, unknown> }).details,
  }));
}

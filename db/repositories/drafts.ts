import { inspectionContent, type InspectionContent } from '../../services/contracts/inspection-content';
import { table } from '../models/table';
import { execute, isoOf, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

export interface DraftRow {
  id: string;
  partId: string;
  requirementId: string;
  cycle: number;
  state: 'draft' | 'signed' | 'abandoned';
  live: number | null;
  content: InspectionContent;
  shownReject: boolean;
  repeatReason: string | null;
  supersedes: string | null;
  openedBy: string;
  openedAt: string;
  changedBy: string;
  changedAt: string;
  version: number;
}

export const drafts = table<DraftRow>('inspection_drafts', {
  id: 'uuid',
  partId: 'uuid',
  requirementId: 'uuid',
  cycle: 'int',
  state: 'text',
  live: 'int',
  content: 'json',
  shownReject: 'flag',
  repeatReason: 'text',
  supersedes: 'uuid',
  openedBy: 'uuid',
  openedAt: 'time',
  changedBy: 'uuid',
  changedAt: 'time',
  version: 'int',
});

interface DraftChangeRow {
  draftId: string;
  field: string;
  beforeValue: unknown;
  verdictShown: string;
  changedBy: string;
  changedAt: string;
}

export const draftChanges = table<DraftChangeRow>(
  'draft_changes',
  { draftId: 'uuid', field: 'text', beforeValue: 'json', verdictShown: 'text', changedBy: 'uuid', changedAt: 'time' },
  ['draftId', 'field'],
);

/** A draft with the names of who opened and last changed it. */
export type Draft = DraftRow & { readonly openedName: string; readonly changedName: string };

type Stored = Omit<Draft, 'content' | 'shownReject'> & { content: string; shownReject: number };

const query = `SELECT d.id, d.part_id AS partId, d.requirement_id AS requirementId, d.cycle, d.state, d.live, d.content, d.shown_reject AS shownReject,
  d.repeat_reason AS repeatReason, d.supersedes, d.opened_by AS openedBy, ${isoOf('d.opened_at')} AS openedAt, d.changed_by AS changedBy, ${isoOf('d.changed_at')} AS changedAt,
  d.version, o.name AS openedName, c.name AS changedName
  FROM inspection_drafts d JOIN accounts o ON o.id = d.opened_by JOIN accounts c ON c.id = d.changed_by`;

function toDraft(row: Stored): Draft {
  return { ...row, content: inspectionContent.parse(JSON.parse(row.content)), shownReject: row.shownReject === 1 };
}

export async function draftById(reading: Reading, draftId: string): Promise<Draft | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE d.id = ?`, [draftId]);
  return row && toDraft(row);
}

/** The one live draft of a part's requirement. */
export async function liveDraft(reading: Reading, partId: string, requirementId: string): Promise<Draft | undefined> {
  const row = await selectOne<Stored>(reading, `${query} WHERE d.part_id = ? AND d.requirement_id = ? AND d.live = 1`, [
    partId,
    requirementId,
  ]);
  return row && toDraft(row);
}

/** Saves content over the version that was read; false when somebody was faster or the draft is no longer live. */
export async function saveDraft(
  work: Work,
  draftId: string,
  version: number,
  change: { content: InspectionContent; shownReject: boolean; by: string },
): Promise<boolean> {
  const saved = await execute(
    work,
    'UPDATE inspection_drafts SET content = ?, shown_reject = ?, changed_by = ?, changed_at = ?, version = version + 1 WHERE id = ? AND version = ? AND live = 1',
    [JSON.stringify(change.content), change.shownReject ? 1 : 0, change.by, sqlTimeOf(work.now), draftId, version],
  );
  return saved === 1;
}

/** Ends a live draft; its content stays. */
export async function endDraft(work: Work, draftId: string, state: 'signed' | 'abandoned'): Promise<boolean> {
  const ended = await execute(
    work,
    'UPDATE inspection_drafts SET state = ?, live = NULL, version = version + 1 WHERE id = ? AND live = 1',
    [state, draftId],
  );
  return ended === 1;
}

import type { EvaluationAnswer } from '../../services/contracts/evaluate';
import type { InspectionContent } from '../../services/contracts/inspection-content';
import { table } from '../models/table';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';

type Process = InspectionContent['process'];
type Acts = InspectionContent['acts'];

export interface BasketRow {
  id: string;
  number: string;
  drawingId: string;
  requirementKey: string;
  operation: string;
  title: string;
  method: string;
  technique: string | null;
  line: string | null;
  runId: string | null;
  process: Process;
  acts: Acts;
  countIn: number;
  state: 'open' | 'signed' | 'closed';
  evaluatorId: string;
  splitFrom: string | null;
  openedBy: string;
  openedAt: string;
  endedAt: string | null;
  version: number;
}

export const baskets = table<BasketRow>('baskets', {
  id: 'uuid',
  number: 'text',
  drawingId: 'uuid',
  requirementKey: 'text',
  operation: 'text',
  title: 'text',
  method: 'text',
  technique: 'text',
  line: 'text',
  runId: 'uuid',
  process: 'json',
  acts: 'json',
  countIn: 'int',
  state: 'text',
  evaluatorId: 'uuid',
  splitFrom: 'uuid',
  openedBy: 'uuid',
  openedAt: 'time',
  endedAt: 'time',
  version: 'int',
});

export interface BasketPartRow {
  basketId: string;
  partId: string;
  draftId: string;
  draftVersion: number;
  live: number | null;
  scan: string;
  scannedAt: string;
  outReason: string | null;
  outBy: string | null;
  outAt: string | null;
}

export const basketParts = table<BasketPartRow>(
  'basket_parts',
  {
    basketId: 'uuid',
    partId: 'uuid',
    draftId: 'uuid',
    draftVersion: 'int',
    live: 'int',
    scan: 'text',
    scannedAt: 'time',
    outReason: 'text',
    outBy: 'uuid',
    outAt: 'time',
  },
  ['basketId', 'draftId'],
);

export const basketSignatures = table<{
  basketId: string;
  count: number;
  sentence: string;
  record: Buffer;
  recordDigest: string;
  signedBy: string;
  signedAt: string;
}>(
  'basket_signatures',
  {
    basketId: 'uuid',
    count: 'int',
    sentence: 'text',
    record: 'bytes',
    recordDigest: 'text',
    signedBy: 'uuid',
    signedAt: 'time',
  },
  ['basketId'],
);

/** A basket with the names around it and its counts. */
export interface Basket extends BasketRow {
  readonly partNumber: string;
  readonly partTitle: string;
  readonly evaluator: string;
  readonly splitNumber: string | null;
  readonly runNumber: string | null;
  readonly runStanding: 'incomplete' | 'good' | 'void' | null;
  readonly scanned: number;
  readonly out: number;
}

type Stored = Omit<Basket, 'process' | 'acts'> & { process: string; acts: string };

// In the basket is what still has its draft, or was signed with it; what ended at the bench or was taken out has left.
const query = `SELECT b.id, b.number, b.drawing_id AS drawingId, b.requirement_key AS requirementKey, b.operation, b.title, b.method, b.technique, b.line, b.run_id AS runId,
  b.process, b.acts, b.count_in AS countIn, b.state, b.evaluator_id AS evaluatorId, b.split_from AS splitFrom, b.opened_by AS openedBy, ${isoOf('b.opened_at')} AS openedAt,
  ${isoOf('b.ended_at')} AS endedAt, b.version, d.number AS partNumber, d.title AS partTitle, a.name AS evaluator, s.number AS splitNumber, r.number AS runNumber, r.standing AS runStanding,
  (SELECT COUNT(*) FROM basket_parts p JOIN inspection_drafts t ON t.id = p.draft_id WHERE p.basket_id = b.id AND p.live = 1 AND (t.state = 'draft' OR p.draft_version = 0)) AS scanned,
  (SELECT COUNT(*) FROM basket_parts p JOIN inspection_drafts t ON t.id = p.draft_id WHERE p.basket_id = b.id AND p.live = 1 AND t.state <> 'draft' AND p.draft_version > 0) AS ended,
  (SELECT COUNT(DISTINCT p.part_id) FROM basket_parts p WHERE p.basket_id = b.id AND p.live IS NULL
     AND NOT EXISTS (SELECT 1 FROM basket_parts n WHERE n.basket_id = b.id AND n.part_id = p.part_id AND n.live = 1)) AS takenOut
  FROM baskets b JOIN drawings d ON d.id = b.drawing_id JOIN accounts a ON a.id = b.evaluator_id LEFT JOIN baskets s ON s.id = b.split_from LEFT JOIN runs r ON r.id = b.run_id`;

function toBasket({ ended, takenOut, ...row }: Stored & { ended: number; takenOut: number }): Basket {
  return {
    ...row,
    process: JSON.parse(row.process) as Process,
    acts: JSON.parse(row.acts) as Acts,
    out: ended + takenOut,
  };
}

type Counted = Stored & { ended: number; takenOut: number };

export async function basketById(reading: Reading, basketId: string): Promise<Basket | undefined> {
  const row = await selectOne<Counted>(reading, `${query} WHERE b.id = ?`, [basketId]);
  return row && toBasket(row);
}

/** Baskets, newest first, before a key. */
export async function basketsBefore(
  reading: Reading,
  filter: { readonly state?: string | undefined; readonly evaluatorId?: string | undefined },
  before: readonly [string, string] | null,
  limit: number,
): Promise<Basket[]> {
  const where: string[] = [];
  const values: unknown[] = [];
  if (filter.state !== undefined) {
    where.push('b.state = ?');
    values.push(filter.state);
  }
  if (filter.evaluatorId !== undefined) {
    where.push('b.evaluator_id = ?');
    values.push(filter.evaluatorId);
  }
  if (before) {
    const at = sqlTimeOf(before[0]);
    where.push('b.opened_at <= ? AND (b.opened_at < ? OR b.id < ?)');
    values.push(at, at, before[1]);
  }
  const rows = await select<Counted>(
    reading,
    `${query} ${where.length > 0 ? `WHERE ${where.join(' AND ')}` : ''} ORDER BY b.opened_at DESC, b.id DESC LIMIT ?`,
    [...values, limit],
  );
  return rows.map(toBasket);
}

/** Baskets split off this one. */
export function basketsSplitFrom(
  reading: Reading,
  basketId: string,
): Promise<{ id: string; number: string; evaluator: string }[]> {
  return select(
    reading,
    `SELECT b.id, b.number, a.name AS evaluator FROM baskets b JOIN accounts a ON a.id = b.evaluator_id WHERE b.split_from = ? ORDER BY b.opened_at, b.id LIMIT 50`,
    [basketId],
  );
}

/** A part as its basket knows it, with how its draft and its part stand. */
export interface BasketMember {
  readonly partId: string;
  readonly draftId: string;
  readonly draftVersion: number;
  readonly live: boolean;
  readonly scannedAt: string;
  readonly outReason: string | null;
  readonly serial: string;
  readonly revision: string;
  readonly planIssue: number;
  readonly held: boolean;
  readonly draftState: 'draft' | 'signed' | 'abandoned';
  readonly presentVersion: number;
  readonly number: string | null;
  readonly verdict: EvaluationAnswer['verdict'] | null;
}

const memberQuery = `SELECT b.part_id AS partId, b.draft_id AS draftId, b.draft_version AS draftVersion, IF(b.live = 1, 1, 0) AS live, ${isoOf('b.scanned_at')} AS scannedAt, b.out_reason AS outReason,
  p.serial, r.revision, pi.issue AS planIssue, p.held, t.state AS draftState, t.version AS presentVersion, i.number, i.verdict
  FROM basket_parts b JOIN parts p ON p.id = b.part_id JOIN inspection_drafts t ON t.id = b.draft_id JOIN requirements q ON q.id = t.requirement_id
  JOIN plan_issues pi ON pi.id = q.plan_issue_id JOIN drawing_revisions r ON r.id = pi.drawing_revision_id LEFT JOIN inspections i ON i.id = b.draft_id`;

type StoredMember = Omit<BasketMember, 'live' | 'held'> & { live: number; held: number };

function toMember(row: StoredMember): BasketMember {
  return { ...row, live: row.live === 1, held: row.held === 1 };
}

/** Every part that was ever in a basket, in the order of their scans; bounded by what a basket takes. */
export async function membersOf(reading: Reading, basketId: string): Promise<BasketMember[]> {
  const rows = await select<StoredMember>(
    reading,
    `${memberQuery} WHERE b.basket_id = ? ORDER BY b.scanned_at, b.draft_id LIMIT 2000`,
    [basketId],
  );
  return rows.map(toMember);
}

/** The live row of a part in a basket. */
export async function memberOf(reading: Reading, basketId: string, partId: string): Promise<BasketMember | undefined> {
  const row = await selectOne<StoredMember>(reading, `${memberQuery} WHERE b.basket_id = ? AND b.part_id = ? AND b.live = 1`, [
    basketId,
    partId,
  ]);
  return row && toMember(row);
}

/** The open basket in which a draft lies, if any. */
export function basketOfDraft(reading: Reading, draftId: string): Promise<{ id: string; number: string } | undefined> {
  return selectOne(
    reading,
    `SELECT b.id, b.number FROM basket_parts p JOIN baskets b ON b.id = p.basket_id WHERE p.draft_id = ? AND p.live = 1`,
    [draftId],
  );
}

/** Takes a part out: its row stays, and it may come back. */
export async function leaveBasket(work: Work, basketId: string, draftId: string, by: string, reason: string): Promise<boolean> {
  const left = await execute(
    work,
    'UPDATE basket_parts SET live = NULL, out_reason = ?, out_by = ?, out_at = ? WHERE basket_id = ? AND draft_id = ? AND live = 1',
    [reason, by, sqlTimeOf(work.now), basketId, draftId],
  );
  return left === 1;
}

/** Ends an open basket. */
export async function endBasket(work: Work, basketId: string, state: 'signed' | 'closed'): Promise<boolean> {
  const ended = await execute(work, `UPDATE baskets SET state = ?, ended_at = ? WHERE id = ? AND state = 'open'`, [
    state,
    sqlTimeOf(work.now),
    basketId,
  ]);
  return ended === 1;
}

export interface SignedBasketRow {
  readonly count: number;
  readonly sentence: string;
  readonly recordDigest: string;
  readonly at: string;
  readonly by: string;
}

export function signatureOf(reading: Reading, basketId: string): Promise<SignedBasketRow | undefined> {
  return selectOne(
    reading,
    `SELECT s.count, s.sentence, s.record_digest AS recordDigest, ${isoOf('s.signed_at')} AS at, a.name AS \`by\`
     FROM basket_signatures s JOIN accounts a ON a.id = s.signed_by WHERE s.basket_id = ?`,
    [basketId],
  );
}

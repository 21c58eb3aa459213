import { isoOf, select, type Reading } from '../work';
import { aboveLot } from './lots';

/** Ids of every lot that parts came from, clusters first in no order; empty for no parts. */
export async function lotsOverParts(reading: Reading, partIds: readonly string[]): Promise<string[]> {
  if (partIds.length === 0) return [];
  const clusters = await select<{ id: string }>(reading, 'SELECT DISTINCT cluster_id AS id FROM parts WHERE id IN (?)', [
    partIds,
  ]);
  const found = new Set<string>();
  for (const { id } of clusters) {
    const above = await select<{ id: string }>(reading, `${aboveLot} SELECT DISTINCT id FROM above`, [id]);
    for (const lot of above) found.add(lot.id);
  }
  return [...found];
}

/** One act as the signed record copied it. */
export interface RecordedAct {
  readonly kind: string;
  readonly at: string | null;
  readonly person: { readonly name: string } | null;
  readonly authorisation: { readonly level: string } | null;
  readonly vision: { readonly near: { readonly result: string } | null } | null;
  readonly equipment: readonly { readonly number: string; readonly asLeft: string | null; readonly dueOn: string | null }[];
  readonly checks: readonly {
    readonly scope: string;
    readonly state: string;
    readonly check: { readonly title: string } | null;
  }[];
}

/** A met requirement of a part with the inspection that it rests on, as signed. */
export interface StandingInspection {
  readonly partId: string;
  readonly operation: string;
  readonly title: string;
  readonly number: string | null;
  readonly verdict: string | null;
  readonly ended: 'superseded' | 'voided' | null;
  /** Set when the record was made under another plan issue than the part's. */
  readonly otherPlan: number | null;
  readonly planState: string | null;
  readonly planIssue: number | null;
  readonly techniqueState: string | null;
  readonly technique: string | null;
  /** The record's bytes still have the digest they were stored with. */
  readonly whole: boolean;
  readonly actedAt: string | null;
  readonly acts: readonly RecordedAct[];
}

type Stored = Omit<StandingInspection, 'whole' | 'acts'> & { whole: number | null; acts: string | null };

/** What the met requirements of these parts rest on; the database reads the acts out of the records, which may be large. */
export async function standingInspections(reading: Reading, partIds: readonly string[]): Promise<StandingInspection[]> {
  if (partIds.length === 0) return [];
  const rows = await select<Stored>(
    reading,
    `SELECT r.part_id AS partId, q.operation, q.title, i.number, i.verdict, e.kind AS ended, i.plan_issue_id <> x.plan_issue_id AS otherPlan, p.state AS planState, p.issue AS planIssue, t.state AS techniqueState,
       i.technique, CONVERT(SHA2(i.record, 256) USING ascii) = i.record_digest AS whole, ${isoOf('i.acted_at')} AS actedAt, JSON_EXTRACT(CONVERT(i.record USING utf8mb4), '$.acts') AS acts
     FROM part_requirements r JOIN parts x ON x.id = r.part_id JOIN requirements q ON q.id = r.requirement_id LEFT JOIN inspections i ON i.id = r.inspection_id LEFT JOIN inspection_ends e ON e.inspection_id = i.id
     LEFT JOIN plan_issues p ON p.id = i.plan_issue_id LEFT JOIN technique_issues t ON t.id = CAST(JSON_VALUE(CONVERT(i.record USING utf8mb4), '$.technique.id') AS UUID)
     WHERE r.part_id IN (?) AND r.state = 'met' ORDER BY r.part_id, r.position`,
    [partIds],
  );
  return rows.map(({ whole, acts, ...row }) => ({
    ...row,
    whole: whole === 1,
    acts: acts === null ? [] : (JSON.parse(acts) as RecordedAct[]),
  }));
}

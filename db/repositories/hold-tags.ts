import { isoOf, select, type Reading } from '../work';

interface TagRow {
  readonly serial: string;
  readonly revision: string;
  readonly inspection: string;
  readonly verdict: 'reject' | 'indeterminate' | 'not-evaluable';
  readonly findings: string | null;
  readonly at: string;
  readonly by: string;
}

/** Parts of a basket that leave it with a hold tag: signed, in the basket or apart, as anything but accepted. */
export function tagsOf(reading: Reading, basketId: string): Promise<TagRow[]> {
  return select(
    reading,
    `SELECT p.serial, r.revision, i.number AS inspection, i.verdict, ${isoOf('i.signed_at')} AS at, a.name AS \`by\`,
       (SELECT GROUP_CONCAT(f.number ORDER BY f.number SEPARATOR ', ') FROM findings f WHERE f.inspection_id = i.id) AS findings
     FROM basket_parts b JOIN inspections i ON i.id = b.draft_id JOIN parts p ON p.id = b.part_id JOIN plan_issues pi ON pi.id = i.plan_issue_id
     JOIN drawing_revisions r ON r.id = pi.drawing_revision_id JOIN accounts a ON a.id = i.signed_by
     WHERE b.basket_id = ? AND i.verdict <> 'accept' ORDER BY p.serial LIMIT 500`,
    [basketId],
  );
}

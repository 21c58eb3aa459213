import { select, selectOne, type Reading } from '../work';

export interface Candidate {
  readonly id: string;
  readonly serial: string;
  readonly drawingId: string;
  readonly partNumber: string;
  readonly title: string;
  readonly planIssueId: string;
}

/** Parts with exactly this serial; a serial is unique only within a part number. */
export function partsWithSerial(reading: Reading, serial: string): Promise<Candidate[]> {
  return select(
    reading,
    `SELECT p.id, p.serial, p.drawing_id AS drawingId, d.number AS partNumber, d.title, p.plan_issue_id AS planIssueId
     FROM parts p JOIN drawings d ON d.id = p.drawing_id WHERE p.serial = ? ORDER BY d.number LIMIT 20`,
    [serial],
  );
}

/** The newest approved plan issue of a part number. */
export function approvedPlanOf(
  reading: Reading,
  partNumber: string,
): Promise<{ drawingId: string; planId: string; title: string } | undefined> {
  return selectOne(
    reading,
    `SELECT d.id AS drawingId, d.title, p.id AS planId FROM drawings d JOIN drawing_revisions r ON r.drawing_id = d.id JOIN plan_issues p ON p.drawing_revision_id = r.id
     WHERE d.number = ? AND p.state = 'approved' ORDER BY r.created_at DESC, p.issue DESC LIMIT 1`,
    [partNumber],
  );
}

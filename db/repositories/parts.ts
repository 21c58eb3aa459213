import type { z } from 'zod';
import type { partState, RequirementState } from '../../services/contracts/common';
import { table } from '../models/table';
import { isoOf, select, selectOne, type Reading } from '../work';

export interface PartRow {
  id: string;
  drawingId: string;
  serial: string;
  planIssueId: string;
  customerId: string;
  clusterId: string;
  position: string;
  state: z.output<typeof partState>;
  held: boolean;
  metCount: number;
  requirementCount: number;
  nextRequirement: string | null;
  openFindings: number;
  releaseCycle: number;
  version: number;
  createdAt: string;
}

export const parts = table<PartRow>('parts', {
  id: 'uuid',
  drawingId: 'uuid',
  serial: 'text',
  planIssueId: 'uuid',
  customerId: 'uuid',
  clusterId: 'uuid',
  position: 'text',
  state: 'text',
  held: 'flag',
  metCount: 'int',
  requirementCount: 'int',
  nextRequirement: 'text',
  openFindings: 'int',
  releaseCycle: 'int',
  version: 'int',
  createdAt: 'time',
});

export interface PartRequirementRow {
  partId: string;
  requirementId: string;
  position: number;
  state: RequirementState;
  inspectionId: string | null;
  cycle: number;
  reason: string | null;
}

export const partRequirements = table<PartRequirementRow>(
  'part_requirements',
  { partId: 'uuid', requirementId: 'uuid', position: 'int', state: 'text', inspectionId: 'uuid', cycle: 'int', reason: 'text' },
  ['partId', 'position'],
);

/** A part as lists show it. */
export interface PartSummary extends PartRow {
  readonly partNumber: string;
  readonly title: string;
  readonly revision: string;
  readonly planIssue: number;
  readonly cluster: string;
  readonly customer: string;
}

type Stored = Omit<PartSummary, 'held'> & { held: number };

export const partColumns = `p.id, p.drawing_id AS drawingId, p.serial, p.plan_issue_id AS planIssueId, p.customer_id AS customerId, p.cluster_id AS clusterId, p.position,
  p.state, p.held, p.met_count AS metCount, p.requirement_count AS requirementCount, p.next_requirement AS nextRequirement, p.open_findings AS openFindings,
  p.release_cycle AS releaseCycle, p.version, ${isoOf('p.created_at')} AS createdAt, d.number AS partNumber, d.title, r.revision, pi.issue AS planIssue, l.number AS cluster, c.name AS customer`;
export const partJoins = `FROM parts p JOIN drawings d ON d.id = p.drawing_id JOIN plan_issues pi ON pi.id = p.plan_issue_id
  JOIN drawing_revisions r ON r.id = pi.drawing_revision_id JOIN lots l ON l.id = p.cluster_id JOIN customers c ON c.id = p.customer_id`;

export function toPartSummary(row: Stored): PartSummary {
  return { ...row, held: row.held === 1 };
}

export async function partById(reading: Reading, partId: string): Promise<PartSummary | undefined> {
  const row = await selectOne<Stored>(reading, `SELECT ${partColumns} ${partJoins} WHERE p.id = ?`, [partId]);
  return row && toPartSummary(row);
}

/** What the plan demands of one part, in route order, with the state of each. */
export interface PartRequirement extends PartRequirementRow {
  readonly key: string;
  readonly operation: string;
  readonly title: string;
  readonly method: string;
  readonly technique: string | null;
}

/** Requirements of several parts in one query, by part id. */
export async function requirementsOfParts(reading: Reading, partIds: readonly string[]): Promise<Map<string, PartRequirement[]>> {
  const found = new Map<string, PartRequirement[]>(partIds.map((partId) => [partId, []]));
  if (partIds.length === 0) return found;
  const rows = await select<PartRequirement>(
    reading,
    `SELECT pr.part_id AS partId, pr.requirement_id AS requirementId, pr.position, pr.state, pr.inspection_id AS inspectionId, pr.cycle, pr.reason,
       q.\`key\`, q.operation, q.title, q.method, q.technique
     FROM part_requirements pr JOIN requirements q ON q.id = pr.requirement_id WHERE pr.part_id IN (?) ORDER BY pr.part_id, pr.position`,
    [partIds],
  );
  for (const row of rows) found.get(row.partId)?.push(row);
  return found;
}

import { lotsAbove } from '@/db/repositories/lots';
import { partById, requirementsOfParts } from '@/db/repositories/parts';
import {
  certificatesOfPart,
  findingsOfPart,
  holdsOver,
  inspectionsAndDrafts,
  shipmentOfPart,
  siblingsOf,
} from '@/db/repositories/part-story';
import type { Reading } from '@/db/work';
import type { Part } from '@/services/contracts/parts';
import { notFound } from '@/services/http/problem';
import { summaryOf } from './list-parts';

/** One part with its whole present state. Problem not-found. */
export async function readPart(reading: Reading, partId: string): Promise<Part> {
  const row = await partById(reading, partId);
  if (!row) throw notFound('Part');
  const requirements = (await requirementsOfParts(reading, [partId])).get(partId) ?? [];
  const lots = await lotsAbove(reading, row.clusterId);
  const { inspections, drafts } = await inspectionsAndDrafts(reading, partId);
  return {
    ...summaryOf(row, requirements),
    version: row.version,
    plan: { id: row.planIssueId, issue: row.planIssue },
    requirements: requirements.map((one) => ({
      key: one.key,
      title: one.title,
      operation: one.operation,
      method: one.method,
      state: one.state,
      id: one.requirementId,
      technique: one.technique,
      inspection: inspections.get(one.inspectionId ?? '') ?? null,
      draft: drafts.get(one.requirementId) ?? null,
      cycle: one.cycle,
      reason: one.reason,
    })),
    lots,
    siblings: await siblingsOf(reading, row.clusterId, partId),
    findings: await findingsOfPart(reading, partId),
    holds: await holdsOver(
      reading,
      partId,
      lots.map(({ id }) => id),
    ),
    certificates: await certificatesOfPart(reading, partId),
    shipment: await shipmentOfPart(reading, partId),
  };
}

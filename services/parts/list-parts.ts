import { listParts as rowsOf, type PartsFilter, type PartsOrder } from '@/db/repositories/parts-list';
import { requirementsOfParts, type PartRequirement, type PartSummary as PartRow } from '@/db/repositories/parts';
import type { Reading } from '@/db/work';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import type { listParts as contract, PartSummary } from '@/services/contracts/parts';
import { pageOf, partsOfKey } from '@/services/http/keyset';

/** A part as lists show it, with its ring. */
export function summaryOf(row: PartRow, requirements: readonly PartRequirement[]): PartSummary {
  return {
    id: row.id,
    serial: row.serial,
    partNumber: row.partNumber,
    title: row.title,
    revision: row.revision,
    planIssue: row.planIssue,
    customer: row.customer,
    cluster: row.cluster,
    position: row.position,
    state: row.state,
    held: row.held,
    openFindings: row.openFindings,
    met: row.metCount,
    required: row.requirementCount,
    next: row.nextRequirement,
    ring: requirements.map(({ key, title, operation, method, state }) => ({ key, title, operation, method, state })),
  };
}

/** A page of parts; rings come with one further query whatever the page's length. */
export async function pageOfParts(
  reading: Reading,
  filter: PartsFilter,
  order: { readonly sort: PartsOrder; readonly limit: number; readonly after: string | undefined },
): Promise<AnswerOf<typeof contract>> {
  const after = partsOfKey(order.after, 2);
  const rows = await rowsOf(reading, filter, order.sort, order.limit + 1, after && [String(after[0]), String(after[1])]);
  const requirements = await requirementsOfParts(
    reading,
    rows.slice(0, order.limit).map(({ id }) => id),
  );
  return pageOf(
    rows,
    order.limit,
    ({ serial, id }) => [serial, id],
    (row) => summaryOf(row, requirements.get(row.id) ?? []),
  );
}

/** Parts that match the filter; a serial resolves to every part whose serial starts with it. */
export function listParts(reading: Reading, query: QueryOf<typeof contract>): Promise<AnswerOf<typeof contract>> {
  const { limit, after, sort, ...filter } = query;
  return pageOfParts(reading, filter, { sort, limit, after });
}

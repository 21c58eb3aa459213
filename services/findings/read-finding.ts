import { dispositionsOf, findingByNumber, historyOf, listFindings as rowsOf, toSummary } from '@/db/repositories/findings';
import { planById, requirementsOfPlan } from '@/db/repositories/plans';
import type { Reading } from '@/db/work';
import type { Finding, listFindings as contract } from '@/services/contracts/findings';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';

/** Findings that need judgement or follow-up, oldest first. */
export async function listFindings(reading: Reading, query: QueryOf<typeof contract>): Promise<AnswerOf<typeof contract>> {
  const after = partsOfKey(query.after, 2);
  const rows = await rowsOf(reading, query.state, query.limit + 1, after && [String(after[0]), String(after[1])]);
  return pageOf(rows, query.limit, ({ openedAt, id }) => [openedAt, id], toSummary);
}

/** One finding with what was decided and the history of its requirement. Problem not-found. */
export async function readFinding(reading: Reading, number: string): Promise<Finding> {
  const row = await findingByNumber(reading, number);
  if (!row) throw notFound(`Finding ${number}`);
  const history = await historyOf(reading, row.partId, row.requirementId);
  const route = await requirementsOfPlan(reading, row.planId);
  const plan = await planById(reading, row.planId);
  return {
    ...toSummary(row),
    id: row.id,
    inspection: history.find(({ id }) => id === row.inspectionId) ?? null,
    dispositions: await dispositionsOf(reading, row.id),
    history,
    operations: route.map(({ key, operation, title }) => ({ key, operation, title })),
    rework: (plan?.rework ?? []).map(({ kind, title, reopens }) => ({ kind, title, reopens })),
  };
}

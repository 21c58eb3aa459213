import {
  dispositionsOf,
  evidenceOf,
  failedIn,
  findingByNumber,
  historyOf,
  listFindings as rowsOf,
  rankOf,
  toSummary,
} from '@/db/repositories/findings';
import { planById, requirementsOfPlan } from '@/db/repositories/plans';
import type { Reading } from '@/db/work';
import type { Finding, listFindings as contract } from '@/services/contracts/findings';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { notFound } from '@/services/http/problem';

/** Findings that need judgement first, then those that wait for their follow-up; each oldest first. */
export async function listFindings(reading: Reading, query: QueryOf<typeof contract>): Promise<AnswerOf<typeof contract>> {
  const [rank, openedAt, id] = partsOfKey(query.after, 3) ?? [];
  const after = rank === undefined ? null : { rank: Number(rank), openedAt: String(openedAt), id: String(id) };
  const rows = await rowsOf(reading, query.state, query.limit + 1, after);
  return pageOf(rows, query.limit, (row) => [rankOf(row), row.openedAt, row.id], toSummary);
}

/** One finding with what failed, its files, what was decided and the history of its requirement. Problem not-found. */
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
    failed: row.inspectionId === null ? { readings: [], indications: [] } : await failedIn(reading, row.inspectionId),
    evidence: row.inspectionId === null ? [] : await evidenceOf(reading, row.inspectionId),
    dispositions: await dispositionsOf(reading, row.id),
    history,
    operations: route.map(({ key, operation, title }) => ({ key, operation, title })),
    rework: (plan?.rework ?? []).map(({ kind, title, reopens }) => ({ kind, title, reopens })),
  };
}

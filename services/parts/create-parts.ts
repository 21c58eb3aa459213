import { newId } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { insert, insertAll } from '@/db/models/table';
import { clusterByKey, lotsAbove } from '@/db/repositories/lots';
import { holdsOver } from '@/db/repositories/part-story';
import { partRequirements, parts } from '@/db/repositories/parts';
import { planById, requirementsOfPlan } from '@/db/repositories/plans';
import { select, selectOne, type Work } from '@/db/work';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import type { createParts as contract } from '@/services/contracts/parts';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { pageOfParts } from './list-parts';

type Asked = BodyOf<typeof contract>['parts'][number];

interface Placed extends Asked {
  readonly clusterId: string;
}

async function place(work: Work, asked: readonly Asked[], drawingId: string): Promise<Placed[]> {
  const errors: FieldError[] = [];
  const known = new Map<string, string | null>();
  for (const key of new Set(asked.map(({ cluster }) => cluster))) known.set(key, (await clusterByKey(work, key))?.id ?? null);
  const taken = await select<{ serial: string }>(work, 'SELECT serial FROM parts WHERE drawing_id = ? AND serial IN (?)', [
    drawingId,
    asked.map(({ serial }) => serial),
  ]);
  const serials = new Set(taken.map(({ serial }) => serial));
  const occupied = new Set(
    (
      await select<{ place: string }>(
        work,
        `SELECT CONCAT(cluster_id, ' ', position) AS place FROM parts WHERE cluster_id IN (?)`,
        [[...known.values(), newId()].filter((id) => id !== null)],
      )
    ).map(({ place: at }) => at),
  );
  const placed = asked.map((one, at) => {
    const clusterId = known.get(one.cluster) ?? null;
    const path = `parts.${String(at)}`;
    if (clusterId === null) errors.push({ path: `${path}.cluster`, message: 'is not a known cluster' });
    if (serials.has(one.serial)) errors.push({ path: `${path}.serial`, message: 'is already given for this part number' });
    if (clusterId !== null && occupied.has(`${clusterId} ${one.position}`))
      errors.push({ path: `${path}.position`, message: 'already has its serial' });
    serials.add(one.serial);
    occupied.add(`${clusterId ?? ''} ${one.position}`);
    return { ...one, clusterId: clusterId ?? '' };
  });
  if (errors.length > 0)
    throw new Problem('invalid-input', errors.map(({ path, message }) => `${path}: ${message}`).join('; '), errors);
  return placed;
}

/**
 * Takes the clusters and every lot above them, so that a hold placed at the same instant is either seen here or finds
 * the new parts, and answers which clusters a hold reaches.
 */
async function takeClusters(work: Work, keys: readonly string[]): Promise<Set<string>> {
  const above = new Map<string, string[]>();
  for (const key of keys) {
    const cluster = await clusterByKey(work, key);
    if (!cluster) continue;
    const lots = await lotsAbove(work, cluster.id);
    above.set(
      cluster.id,
      lots.map(({ id }) => id),
    );
  }
  await takeRows(work, 'lots', [...above.values()].flat());
  const held = new Set<string>();
  for (const [clusterId, lotIds] of above) if ((await holdsOver(work, clusterId, lotIds)).length > 0) held.add(clusterId);
  return held;
}

/** Gives serials to positions of clusters (cut-off); each part starts with its plan's whole route open. */
export async function createParts(work: Work, body: BodyOf<typeof contract>): Promise<Recorded<AnswerOf<typeof contract>>> {
  const plan = await planById(work, body.plan);
  if (plan?.state !== 'approved')
    throw new Problem('invalid-input', 'plan: is not an approved plan issue', [
      { path: 'plan', message: 'is not an approved plan issue' },
    ]);
  const drawing = await selectOne<{ id: string; customerId: string }>(
    work,
    'SELECT id, customer_id AS customerId FROM drawings WHERE number = ?',
    [plan.drawing],
  );
  if (!drawing) throw new Error('an approved plan has no drawing');
  const route = await requirementsOfPlan(work, plan.id);
  const keys = [...new Set(body.parts.map(({ cluster }) => cluster))];
  const heldClusters = await takeClusters(work, keys);
  const placed = await place(work, body.parts, drawing.id);
  const made: { id: string; serial: string; clusterId: string; position: string }[] = [];
  for (const { serial, clusterId, position } of placed) {
    const id = newId();
    await insert(work, parts, {
      id,
      drawingId: drawing.id,
      serial,
      planIssueId: plan.id,
      customerId: drawing.customerId,
      clusterId,
      position,
      state: 'serialised',
      held: heldClusters.has(clusterId),
      metCount: 0,
      requirementCount: route.length,
      nextRequirement: route[0]?.title ?? null,
      openFindings: 0,
      releaseCycle: 0,
      version: 0,
      createdAt: work.now,
    });
    await insertAll(
      work,
      partRequirements,
      route.map((row) => ({
        partId: id,
        requirementId: row.id,
        position: row.position,
        state: 'open' as const,
        inspectionId: null,
        cycle: 1,
        reason: null,
      })),
    );
    made.push({ id, serial, clusterId, position });
  }
  const ids = made.map(({ id }) => id);
  const { items } = await pageOfParts(work, { ids }, { sort: 'serial', limit: ids.length, after: undefined });
  return {
    answer: { items: ids.flatMap((id) => items.find((one) => one.id === id) ?? []), next: null },
    events: made.map(({ id, serial, clusterId, position }) => ({
      subject: { kind: 'part', id },
      also: [{ kind: 'lot', id: clusterId }],
      details: { serial, position, plan: plan.id, planIssue: plan.issue },
    })),
  };
}

import { newId, nextNumber } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { leaningInspections, type Interval, type Leaning } from '@/db/repositories/suspects';
import { execute, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { SuspectList } from '@/services/contracts/suspects';
import type { Recorded } from '@/services/http/route';
import { suspectListWith } from './read-suspects';

type By = Work & { readonly actor: Actor };

/** Takes the parts of everything that leaned on what failed, in id order. Call before its own row is taken, and again after. */
export async function takeLeaning(work: Work, interval: Interval, taken: ReadonlySet<string> = new Set()): Promise<Leaning[]> {
  const found = await leaningInspections(work, interval);
  await takeRows(
    work,
    'parts',
    found.map(({ partId }) => partId).filter((partId) => !taken.has(partId)),
  );
  return found;
}

export interface Failure {
  readonly cause: 'calibration' | 'check' | 'technique';
  readonly causeId: string;
  readonly method: string;
  readonly technique: string | null;
  readonly equipmentId: string | null;
  readonly scope: string | null;
  /** As people call it: `UT-04`, `booth 3`, `FP-210 issue 2`. */
  readonly named: string;
  readonly reason: string;
  readonly since: string | null;
  readonly until: string;
}

// A gauge used for months leaves thousands of inspections.
const rowsAtOnce = 500;

type Group = { readonly id: string; readonly requirementId: string; readonly gone: boolean };

async function storeGroups(work: Work, listId: string, leaning: readonly Leaning[]): Promise<void> {
  const groups = new Map<string, Group>();
  for (const { requirementId, gone } of leaning) {
    const key = `${requirementId} ${String(gone)}`;
    if (!groups.has(key)) groups.set(key, { id: newId(), requirementId, gone });
  }
  for (const { id, requirementId, gone } of groups.values())
    await execute(work, 'INSERT INTO suspect_groups (id, list_id, requirement_id, gone) VALUES (?, ?, ?, ?)', [
      ...[id, listId, requirementId],
      gone ? 1 : 0,
    ]);
  const rows = leaning.map(({ requirementId, gone, inspectionId, partId, rests }) => [
    groups.get(`${requirementId} ${String(gone)}`)?.id,
    inspectionId,
    partId,
    rests ? 1 : 0,
  ]);
  for (let from = 0; from < rows.length; from += rowsAtOnce) {
    const some = rows.slice(from, from + rowsAtOnce);
    const places = some.map(() => '(?, ?, ?, ?)').join(', ');
    await execute(
      work,
      `INSERT INTO suspect_inspections (group_id, inspection_id, part_id, rests) VALUES ${places}`,
      some.flat(),
    );
  }
}

/**
 * Draws the suspect list of a failure and holds the parts that rest on it, under rows that `takeLeaning` took.
 * Answers null when nothing leaned on it.
 */
export async function openSuspects(
  work: By,
  failure: Failure,
  leaning: readonly Leaning[],
): Promise<{ list: SuspectList; event: Recorded<unknown>['events'][number] } | null> {
  if (leaning.length === 0) return null;
  const listId = newId();
  const number = await nextNumber(work, 'Q');
  const { cause, causeId, method, technique, equipmentId, scope, named, reason, since, until } = failure;
  await execute(
    work,
    `INSERT INTO suspect_lists (id, number, cause, cause_id, method, technique, equipment_id, scope, named, reason, since_at, until_at, opened_by, opened_at)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    [
      ...[listId, number, cause, causeId, method, technique, equipmentId, scope, named.slice(0, 80), reason.slice(0, 400)],
      ...[since && sqlTimeOf(since), sqlTimeOf(until), work.actor.id, sqlTimeOf(until)],
    ],
  );
  await storeGroups(work, listId, leaning);
  const held = [...new Set(leaning.filter(({ rests }) => rests).map(({ partId }) => partId))];
  if (held.length > 0) await execute(work, 'UPDATE parts SET held = 1 WHERE id IN (?)', [held]);
  const list = await suspectListWith(work, listId);
  const subjects = new Set(leaning.map(({ partId }) => partId));
  return {
    list,
    event: {
      kind: 'suspects-opened',
      subject: { kind: 'suspect-list', id: listId },
      also: [
        ...(equipmentId === null ? [] : [{ kind: 'equipment', id: equipmentId }]),
        ...[...subjects].map((id) => ({ kind: 'part', id })),
      ],
      details: {
        ...{ number, cause, named, reason, since, until, inspections: leaning.length },
        held: list.held,
        recall: list.items
          .filter(({ gone }) => gone)
          .map(({ part, certificates }) => ({ serial: part.serial, certificates: certificates.map((one) => one.number) })),
      },
    },
  };
}

import {
  authorisationsFor,
  checksAround,
  equipmentByIds,
  peopleByIds,
  visionOf,
  type EquipmentRow,
} from '@/db/repositories/act-conditions';
import { foundOutSince } from '@/db/repositories/equipment';
import type { Reading } from '@/db/work';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { FieldError } from '@/services/http/problem';
import { scopeStandings, titlesAsked, type CheckStanding } from './check-covers';
import type { InspectionCase } from './load-case';
import { personStanding, type PersonStanding } from './person-counts';
import { plantDay } from './plant-day';

type Act = InspectionContent['acts'][number];

/** An act with what made it count: goes into the record as it stands. */
export interface ActOnRecord {
  readonly act: Act;
  readonly at: string | null;
  readonly person: { readonly id: string; readonly name: string } | null;
  readonly standing: PersonStanding | null;
  readonly equipment: readonly EquipmentRow[];
  readonly checks: readonly CheckStanding[];
  readonly faults: readonly FieldError[];
}

// A block reading is part of the measurement, and asks no qualification of its own.
const qualified: readonly Act['kind'][] = ['processed', 'exposed', 'measured', 'evaluated'];
// A clock on the bench may be a little ahead of the database's.
const aheadMs = 120_000;

/** An entered time as an ISO instant in UTC with microseconds, or null when it is none. */
export function instantOf(text: string | null | undefined): string | null {
  if (
    !text ||
    !/^\d{4}-\d{2}-\d{2}T\d{2}:\d{2}(:\d{2}(\.\d{1,6})?)?(Z|[+-]\d{2}:\d{2})$/.test(text) ||
    Number.isNaN(Date.parse(text))
  )
    return null;
  const fraction = (/\.(\d{1,6})/.exec(text)?.[1] ?? '').padEnd(6, '0');
  return `${new Date(Date.parse(text)).toISOString().slice(0, 19)}.${fraction}Z`;
}

function equipmentFaults(path: string, act: Act, rows: readonly EquipmentRow[], method: string, day: string): FieldError[] {
  return act.equipment.flatMap((equipmentId, place): FieldError[] => {
    const field = `${path}.equipment.${String(place)}`;
    const row = rows.find(({ id }) => id === equipmentId);
    if (!row) return [{ path: field, message: 'is not known equipment' }];
    if (row.method !== method)
      return [{ path: field, message: `${row.number} is equipment for ${row.method}, not for ${method}` }];
    if (row.calibratedOn === null || row.dueOn === null)
      return [{ path: field, message: `${row.number} has no calibration on ${day}` }];
    if (row.asLeft === 'failed')
      return [{ path: field, message: `${row.number} was left failed by its calibration of ${row.calibratedOn}` }];
    return row.dueOn < day
      ? [{ path: field, message: `${row.number} was due for calibration on ${row.dueOn}, before the act on ${day}` }]
      : [];
  });
}

function timeFaults(path: string, act: Act, at: string | null, now: string): FieldError[] {
  if (!act.at) return [{ path: `${path}.at`, message: 'the time of the act is needed' }];
  if (at === null) return [{ path: `${path}.at`, message: 'is not an instant such as 2026-03-09T14:05:00Z' }];
  return Date.parse(at) > Date.parse(now) + aheadMs ? [{ path: `${path}.at`, message: 'lies in the future' }] : [];
}

/** Each act with the authorisation, vision, calibration and process checks that counted when it happened, and every fault. */
export async function actsOnRecord(reading: Reading, inspection: InspectionCase, acts: readonly Act[]): Promise<ActOnRecord[]> {
  const ids = [...new Set(acts.flatMap(({ person }) => (person ? [person] : [])))];
  const people = await peopleByIds(reading, ids);
  const authorisations = await authorisationsFor(reading, inspection.row.method, ids);
  const tests = await visionOf(reading, ids);
  const found: ActOnRecord[] = [];
  for (const [place, act] of acts.entries()) {
    const path = `acts.${String(place)}`;
    const at = instantOf(act.at);
    const day = plantDay(at ?? inspection.now, inspection.zone);
    const person = people.find(({ id }) => id === act.person) ?? null;
    const asked = qualified.includes(act.kind);
    const { method, technique } = inspection.row;
    const standing =
      person && asked
        ? personStanding(
            { accountId: person.id, name: person.name, method, technique, at: at ?? inspection.now, day },
            authorisations,
            tests,
          )
        : null;
    const equipment = await equipmentByIds(reading, act.equipment, day);
    const foundOut = at === null ? [] : await foundOutSince(reading, act.equipment, at, day);
    const checks: CheckStanding[] = [];
    if (asked)
      for (const scope of inspection.asked.checks)
        checks.push(
          ...scopeStandings(
            scope,
            at ?? inspection.now,
            await checksAround(reading, scope, at ?? inspection.now),
            titlesAsked(inspection.technique?.content, scope),
          ),
        );
    found.push({
      act,
      at,
      person,
      standing,
      equipment,
      checks,
      faults: [
        ...timeFaults(path, act, at, inspection.now),
        ...(person ? [] : [{ path: `${path}.person`, message: act.person ? 'is not a known person' : 'who did it is needed' }]),
        ...(standing?.reasons ?? []).map((message) => ({ path: `${path}.person`, message })),
        ...equipmentFaults(path, act, equipment, method, day),
        ...foundOut.map(({ id, calibratedOn }) => ({
          path: `${path}.equipment.${String(act.equipment.indexOf(id))}`,
          message: `${equipment.find((row) => row.id === id)?.number ?? ''} was found out of tolerance on ${calibratedOn}; an act before that does not count`,
        })),
        ...checks.flatMap(({ reason, scope }) => (reason === null ? [] : [{ path: `${path}.checks.${scope}`, message: reason }])),
      ],
    });
  }
  return found;
}

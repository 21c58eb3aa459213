import { checksAround, plantZone, type ChecksAround } from '@/db/repositories/act-conditions';
import { clearedInspections } from '@/db/repositories/suspects';
import { standingInspections, type RecordedAct, type StandingInspection } from '@/db/repositories/releases';
import type { Reading } from '@/db/work';
import type { GateReason } from '@/services/contracts/shipments';
import { plantDay } from '@/services/inspections/plant-day';

// Acts that only a qualified person may do; reading a step block is part of the measurement.
const qualified: readonly string[] = ['processed', 'exposed', 'measured', 'evaluated'];

type Say = (gate: number, code: string, message: string, who: string) => GateReason;

/** A reason that names the inspection it is about. */
function sayOf({ operation, number }: StandingInspection): Say {
  return (gate, code, message, who) => ({ gate, code, message: `${operation} ${number ?? ''}: ${message}`, who });
}

/** Gates 1 and 5: what stands as met rests on an accepted record that is whole, under documents that were not wrong. */
function recordReasons(row: StandingInspection, say: Say, cleared: (cause: string) => boolean): GateReason[] {
  if (row.number === null || row.verdict !== 'accept')
    return [
      {
        gate: 1,
        code: 'no-accepted-inspection',
        message: `${row.operation} ${row.title} stands as met without an accepted inspection`,
        who: 'reviewer',
      },
    ];
  return [
    ...(row.whole ? [] : [say(1, 'record-altered', 'the signed record is not as it was signed', 'administrator')]),
    ...(row.ended === null ? [] : [say(1, 'inspection-ended', `the inspection was ${row.ended}`, 'inspector')]),
    ...(row.otherPlan !== 1 || row.planState === 'approved' || row.planState === 'superseded'
      ? []
      : [
          say(
            5,
            'plan-not-effective',
            `it was done under plan issue ${String(row.planIssue)}, ${row.planState ?? 'unknown'}`,
            'reviewer',
          ),
        ]),
    ...(row.techniqueState === 'withdrawn-for-error' && !cleared('technique')
      ? [say(5, 'technique-withdrawn', `technique ${row.technique ?? ''} was withdrawn for error`, 'reviewer')]
      : []),
  ];
}

/** Gates 3 and 4: the person and the equipment counted when the act happened, as the record copied them. */
function actReasons(act: RecordedAct, zone: string, say: Say): GateReason[] {
  const name = act.person?.name ?? 'nobody';
  const people = qualified.includes(act.kind)
    ? [
        ...(act.authorisation ? [] : [say(3, 'not-authorised', `${name} (${act.kind}) was not authorised`, 'reviewer')]),
        ...(act.vision?.near?.result === 'pass'
          ? []
          : [say(3, 'no-vision-test', `${name} (${act.kind}) had no valid near vision test`, 'administrator')]),
      ]
    : [];
  const day = act.at === null ? '' : plantDay(act.at, zone);
  const equipment = act.equipment
    .filter(({ asLeft, dueOn }) => asLeft !== 'good' || dueOn === null || dueOn < day)
    .map(({ number }) => say(4, 'out-of-calibration', `${number} was not in calibration`, 'administrator'));
  return [...people, ...equipment];
}

/**
 * Gate 6: the next check of the same scope after an act casts back on it. A failed one closes the gate for everything
 * since the last good one; a bracketing one that is still owed keeps it closed until it is there.
 */
async function checkReasons(
  act: RecordedAct,
  say: Say,
  cleared: (cause: string) => boolean,
  around: (scope: string, at: string) => Promise<readonly ChecksAround[]>,
): Promise<GateReason[]> {
  const found: GateReason[] = [];
  for (const { scope, state, check } of act.checks) {
    if (state !== 'good') found.push(say(6, 'check-not-good', `the process check of ${scope} was ${state}`, 'inspector'));
    if (act.at === null) continue;
    const now = await around(scope, act.at);
    // A failed one may have been entered later with the time at which it was made: before the act, or after.
    const failed = now
      .flatMap(({ before, after }) => [before, after])
      .filter((one) => one?.result === 'failed' && !cleared(one.id));
    for (const one of failed)
      found.push(say(6, 'check-failed-since', `the next process check of ${scope} (${one?.title ?? ''}) failed`, 'reviewer'));
    const own = now.find(({ title }) => title === check?.title);
    if (failed.length === 0 && own?.before?.kind === 'bracketing' && !own.after)
      found.push(say(6, 'check-owed', `the closing process check of ${scope} is not on record`, 'inspector'));
  }
  return found;
}

/** Gates 1 and 3 to 6 over the inspections that the met requirements of these parts rest on, by part id. */
export async function reasonsOfActs(reading: Reading, partIds: readonly string[]): Promise<Map<string, GateReason[]>> {
  const found = new Map<string, GateReason[]>();
  const asked = new Map<string, ReturnType<typeof checksAround>>();
  const around = (scope: string, at: string) => {
    const key = `${at} ${scope}`;
    const known = asked.get(key) ?? checksAround(reading, scope, at);
    asked.set(key, known);
    return known;
  };
  const zone = await plantZone(reading);
  const unaffected = await clearedInspections(reading, partIds);
  for (const row of await standingInspections(reading, partIds)) {
    const say = sayOf(row);
    const cleared = (cause: string) => unaffected.has(`${row.number ?? ''} ${cause}`);
    const reasons = recordReasons(row, say, cleared);
    for (const act of row.acts) reasons.push(...actReasons(act, zone, say), ...(await checkReasons(act, say, cleared, around)));
    found.set(row.partId, [...(found.get(row.partId) ?? []), ...distinct(reasons)]);
  }
  return found;
}

/** Two acts of one inspection may have the same person, gauge or check: one reason is enough. */
function distinct(reasons: readonly GateReason[]): GateReason[] {
  return [...new Map(reasons.map((reason) => [`${reason.code} ${reason.message}`, reason])).values()];
}

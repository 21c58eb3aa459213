import { takeScope, checkById, keepCheck, lastCheckOf, type NewCheck } from '@/db/repositories/checks';
import type { Interval } from '@/db/repositories/suspects';
import { databaseNow, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { Check, recordCheck as contract } from '@/services/contracts/checks';
import type { AnswerOf, BodyOf } from '@/services/contracts/operation';
import { inWindow } from '@/services/engine/quantity/window';
import { Problem, type FieldError } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { instantOf } from '@/services/inspections/acts-on-record';
import { openSuspects, takeLeaning } from '@/services/suspects/open-suspects';
import { askedChecks, keyOfCheck, type AskedCheck } from './required-checks';

type By = Work & { readonly actor: Actor };
type Body = BodyOf<typeof contract>;

const hourMs = 3_600_000;
// A clock on the floor may be a little ahead of the database's.
const aheadMs = 120_000;
const latestEntryHours = 24;
const usualHours = 24;

function valueFaults({ value, unit, result }: Body, asked: AskedCheck | undefined): FieldError[] {
  if (value !== undefined && unit === undefined) return [{ path: 'unit', message: 'is needed with a value' }];
  const windows = asked?.windows ?? [];
  if (value === undefined || unit === undefined)
    return windows.length === 0 || result === 'failed'
      ? []
      : [{ path: 'value', message: 'is needed: the technique gives a window for it' }];
  return windows.flatMap((window): FieldError[] => {
    const inside = inWindow(value, unit, window);
    if (inside === null) return [{ path: 'unit', message: `must be ${window.unit}, as the window is given` }];
    if (inside || result === 'failed') return [];
    const [lower, upper] = [window.lower ?? '–', window.upper ?? '–'];
    return [
      {
        path: 'result',
        message: `${value} ${unit} is outside its window ${lower} to ${upper} ${window.unit}: this check has failed`,
      },
    ];
  });
}

function faultsOf(body: Body, at: string | null, now: string, last: Check | undefined, asked: AskedCheck | undefined) {
  const late = at === null ? 0 : Date.parse(now) - Date.parse(at);
  const faults: FieldError[] = [
    ...(at === null ? [{ path: 'at', message: 'is not an instant such as 2026-03-09T14:05:00Z' }] : []),
    ...(late < -aheadMs ? [{ path: 'at', message: 'lies in the future' }] : []),
    ...(late > latestEntryHours * hourMs ? [{ path: 'at', message: `is more than ${String(latestEntryHours)} hours ago` }] : []),
    ...(at !== null && last && at < last.at ? [{ path: 'at', message: `is before the last one on record, of ${last.at}` }] : []),
    ...(asked && asked.method !== body.method
      ? [{ path: 'method', message: `is ${asked.method} in technique ${asked.techniques.join(', ')}` }]
      : []),
    ...valueFaults(body, asked),
  ];
  if (faults.length > 0)
    throw new Problem('invalid-input', faults.map(({ path, message }) => `${path}: ${message}`).join('; '), faults);
}

function rowOf(body: Body, at: string, asked: AskedCheck | undefined): NewCheck {
  const { scope, title, method, result, value = null, unit = null, note = null } = body;
  return {
    ...{ scope, title, method, result, value, unit, note, at },
    // What the technique asks for is not softened by who records it.
    kind: asked?.kind === 'bracketing' ? 'bracketing' : body.kind,
    validHours: Math.min(asked?.validHours ?? Infinity, body.validHours ?? asked?.validHours ?? usualHours),
  };
}

/** A failed check casts back to the one before; what was signed by now leaned on it. */
function intervalOf(scope: string, last: Check | undefined): Interval {
  return { kind: 'scope', target: scope, since: last?.at ?? null, sinceDay: null, untilDay: null };
}

/**
 * Records a process check. Failed, it holds every part that rests on an act since the last one, in the same
 * transaction: part rows first, in id order, then the scope. Good, the scope counts again at once.
 * Problem: invalid-input, also when a value outside its window is called good.
 */
export async function recordCheck(work: By, body: Body): Promise<Recorded<AnswerOf<typeof contract>>> {
  const { scope, title } = body;
  const at = body.at === undefined ? work.now : instantOf(body.at);
  const asked = (await askedChecks(work)).get(keyOfCheck(body));
  faultsOf(body, at, work.now, await lastCheckOf(work, scope, title), asked);
  const failed = body.result === 'failed';
  const first = failed ? await takeLeaning(work, intervalOf(scope, await lastCheckOf(work, scope, title))) : [];
  await takeScope(work, scope);
  // Somebody may have recorded this check, or signed on this scope, while the rows were waited for.
  const last = await lastCheckOf(work, scope, title);
  faultsOf(body, at, await databaseNow(work), last, asked);
  const taken = new Set(first.map(({ partId }) => partId));
  const leaning = failed ? await takeLeaning(work, intervalOf(scope, last), taken) : [];
  const row = rowOf(body, at ?? work.now, asked);
  const id = await keepCheck(work, row, work.actor.id);
  const opened = await openSuspects(
    work,
    {
      ...{ cause: 'check', causeId: id, method: row.method, technique: null, equipmentId: null, scope, named: scope },
      reason: `the process check of ${scope} (${title}) failed${row.value === null ? '' : `: ${row.value} ${row.unit ?? ''}`}`,
      since: last?.at ?? null,
      until: await databaseNow(work),
    },
    leaning,
  );
  const check = await checkById(work, id);
  if (!check) throw new Error('the check just recorded is not there');
  return {
    answer: { check, suspects: opened?.list ?? null },
    events: [
      {
        subject: { kind: 'check', id },
        also: [{ kind: 'check-scope', id: scope }],
        details: { ...row, suspects: opened?.list.number ?? null },
      },
      ...(opened ? [opened.event] : []),
    ],
  };
}

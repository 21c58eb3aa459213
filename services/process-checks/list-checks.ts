import { checksBefore, lastChecks } from '@/db/repositories/checks';
import { databaseNow, type Reading } from '@/db/work';
import { checkSoonHours, type Check, type CheckStanding, type listChecks as listContract } from '@/services/contracts/checks';
import type { AnswerOf, QueryOf } from '@/services/contracts/operation';
import { pageOf, partsOfKey } from '@/services/http/keyset';
import { askedChecks, keyOfCheck } from './required-checks';

/** Process checks, newest first. */
export async function listChecks(
  reading: Reading,
  { limit, after, scope, method }: QueryOf<typeof listContract>,
): Promise<AnswerOf<typeof listContract>> {
  const key = partsOfKey(after, 2);
  const rows = await checksBefore(reading, { scope, method }, limit + 1, key && [String(key[0]), String(key[1])]);
  return pageOf(
    rows,
    limit,
    ({ at, id }) => [at, id],
    (row) => row,
  );
}

const order: readonly CheckStanding['state'][] = ['failed', 'owed', 'lapsed', 'never', 'due-soon', 'good'];
const hourMs = 3_600_000;
// A check that no technique asks for is forgotten by the page after so long.
const rememberedDays = 90;

function stateOf(last: Check | null, leanedOn: boolean, now: string): CheckStanding['state'] {
  if (!last) return 'never';
  if (last.result === 'failed') return 'failed';
  if (last.validUntil < now) return last.kind === 'bracketing' && leanedOn ? 'owed' : 'lapsed';
  return Date.parse(last.validUntil) - Date.parse(now) < checkSoonHours * hourMs ? 'due-soon' : 'good';
}

/** How every check stands now: those that techniques ask for, and those on record; what stops work first. */
export async function standingChecks(reading: Reading): Promise<{ items: CheckStanding[] }> {
  const now = await databaseNow(reading);
  const asked = await askedChecks(reading);
  const since = new Date(Date.parse(now) - rememberedDays * 24 * hourMs).toISOString();
  const found = await lastChecks(reading, since);
  const recorded = new Map(found.map((one) => [keyOfCheck(one.check), one]));
  const items = [...new Set([...asked.keys(), ...recorded.keys()])].flatMap((key): CheckStanding[] => {
    const [ask, record] = [asked.get(key), recorded.get(key)];
    const last = record?.check ?? null;
    const named = ask ?? last;
    if (!named) return [];
    const { scope, title, method, kind } = named;
    const hours = last ? Math.round((Date.parse(last.validUntil) - Date.parse(last.at)) / hourMs) : 24;
    return [
      {
        ...{ scope, title, method, kind, last },
        validHours: Math.max(1, ask?.validHours ?? hours),
        window: ask?.windows[0] ?? null,
        techniques: [...(ask?.techniques ?? [])],
        state: stateOf(last, record?.leanedOn ?? false, now),
      },
    ];
  });
  const place = (one: CheckStanding) => `${String(order.indexOf(one.state))} ${one.last?.validUntil ?? ''} ${one.scope}`;
  return { items: items.sort((a, b) => (place(a) < place(b) ? -1 : 1)) };
}

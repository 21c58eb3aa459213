import { approvedTechniques } from '@/db/repositories/techniques';
import type { Reading } from '@/db/work';
import type { RequiredCheck } from '@/services/contracts/techniques';
import { compare, rationalOf } from '@/services/engine/quantity/decimal';
import { convertValue, unitOf } from '@/services/engine/quantity/units';

/** A check that approved techniques ask for, with the shortest time and every window they name. */
export interface AskedCheck {
  readonly scope: string;
  readonly title: string;
  readonly method: string;
  readonly kind: RequiredCheck['kind'];
  readonly validHours: number;
  readonly windows: readonly NonNullable<RequiredCheck['window']>[];
  readonly techniques: readonly string[];
}

export function keyOfCheck({ scope, title }: { readonly scope: string; readonly title: string }): string {
  return `${scope}\n${title}`;
}

/** What the approved techniques ask for, by scope and title. Where two ask for the same check, the stricter one counts. */
export async function askedChecks(reading: Reading): Promise<Map<string, AskedCheck>> {
  const found = new Map<string, AskedCheck>();
  for (const { number, method, content } of await approvedTechniques(reading)) {
    for (const { scope, title, kind, validHours, window } of content.checks) {
      const key = keyOfCheck({ scope, title });
      const known = found.get(key);
      found.set(key, {
        ...{ scope, title, method: known?.method ?? method },
        kind: known?.kind === 'bracketing' ? 'bracketing' : kind,
        validHours: Math.min(validHours, known?.validHours ?? validHours),
        windows: [...(known?.windows ?? []), ...(window ? [window] : [])],
        techniques: [...(known?.techniques ?? []), number],
      });
    }
  }
  return found;
}

/** Does a value with its unit lie in a window, both ends included? Null when the units do not measure the same. */
export function inWindow(
  value: string,
  unit: string,
  window: { readonly unit: string; readonly lower: string | null; readonly upper: string | null },
): boolean | null {
  const [from, to] = [unitOf(unit), unitOf(window.unit)];
  if (unit !== window.unit && (!from || !to || from.quantity !== to.quantity)) return null;
  const read = from && to && unit !== window.unit ? convertValue(rationalOf(value), from, to) : rationalOf(value);
  return (
    (window.lower === null || compare(read, rationalOf(window.lower)) >= 0) &&
    (window.upper === null || compare(read, rationalOf(window.upper)) <= 0)
  );
}

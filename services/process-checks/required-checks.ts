import { approvedTechniques } from '@/db/repositories/techniques';
import type { Reading } from '@/db/work';
import type { RequiredCheck } from '@/services/contracts/techniques';

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

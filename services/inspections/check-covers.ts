import type { CheckRow } from '@/db/repositories/act-conditions';

export interface CheckStanding {
  readonly scope: string;
  readonly state: 'good' | 'failed' | 'missed';
  readonly check: CheckRow | null;
  /** A bracketing check still needs a good one after the act. */
  readonly awaitsClosing: boolean;
  readonly reason: string | null;
}

/**
 * Do the process checks of a scope cover an act? An opening check must be good and in its time; a bracketing one must
 * be good before, and the next one after must not have failed.
 */
export function checkStanding(
  scope: string,
  at: string,
  around: { readonly before: CheckRow | undefined; readonly after: CheckRow | undefined },
): CheckStanding {
  const { before, after } = around;
  const base = { scope, check: before ?? null, awaitsClosing: false };
  if (!before) return { ...base, state: 'missed', reason: `no process check of ${scope} is on record before the act` };
  if (before.result === 'failed')
    return { ...base, state: 'failed', reason: `the process check of ${scope} (${before.title}) had failed before the act` };
  if (before.validUntil !== null && before.validUntil < at)
    return {
      ...base,
      state: 'missed',
      reason: `the process check of ${scope} (${before.title}) had run out at ${before.validUntil}`,
    };
  if (before.kind === 'bracketing' && after?.result === 'failed')
    return { ...base, state: 'failed', reason: `the closing process check of ${scope} (${after.title}) failed after the act` };
  return { ...base, state: 'good', awaitsClosing: before.kind === 'bracketing' && !after, reason: null };
}

import type { CheckRow, ChecksAround } from '@/db/repositories/act-conditions';

export interface CheckStanding {
  readonly scope: string;
  readonly state: 'good' | 'failed' | 'missed';
  readonly check: CheckRow | null;
  /** A bracketing check still needs a good one after the act. */
  readonly awaitsClosing: boolean;
  readonly reason: string | null;
}

/**
 * Does a process check cover an act? It must be good before it and in its time, and the next one must not have failed:
 * that casts back on everything since. A bracketing one still needs a good one after.
 */
export function checkStanding(
  scope: string,
  at: string,
  { title, before, after }: Omit<ChecksAround, 'title'> & { readonly title?: string | undefined },
): CheckStanding {
  const base = { scope, check: before ?? null, awaitsClosing: false };
  const named = title === undefined ? scope : `${scope} (${title})`;
  if (!before) return { ...base, state: 'missed', reason: `no process check of ${named} is on record before the act` };
  if (before.result === 'failed')
    return { ...base, state: 'failed', reason: `the process check of ${scope} (${before.title}) had failed before the act` };
  if (before.validUntil !== null && before.validUntil < at)
    return {
      ...base,
      state: 'missed',
      reason: `the process check of ${scope} (${before.title}) had run out at ${before.validUntil}`,
    };
  if (after?.result === 'failed')
    return {
      ...base,
      state: 'failed',
      reason:
        before.kind === 'bracketing'
          ? `the closing process check of ${scope} (${after.title}) failed after the act`
          : `the next process check of ${scope} (${after.title}) failed after the act`,
    };
  return { ...base, state: 'good', awaitsClosing: before.kind === 'bracketing' && !after, reason: null };
}

/** Titles of the checks of a scope that the technique asks for; what a technique of an earlier form holds is not read. */
export function titlesAsked(content: unknown, scope: string): string[] {
  const checks = (content as { checks?: unknown } | null | undefined)?.checks;
  if (!Array.isArray(checks)) return [];
  return checks.flatMap((check: { scope?: unknown; title?: unknown }) =>
    check.scope === scope && typeof check.title === 'string' ? [check.title] : [],
  );
}

/**
 * Every check of a scope that an act leans on: each that the technique asks for, or else the last one made; and any
 * that stands failed, whatever it is called.
 */
export function scopeStandings(
  scope: string,
  at: string,
  around: readonly ChecksAround[],
  asked: readonly string[],
): CheckStanding[] {
  const last = around.reduce<ChecksAround | undefined>(
    (latest, one) => (one.before && (!latest?.before || one.before.at > latest.before.at) ? one : latest),
    undefined,
  );
  const needed = asked.length > 0 ? asked : last ? [last.title] : [];
  const failed = around.filter(({ before }) => before?.result === 'failed').map(({ title }) => title);
  const titles = [...new Set([...needed, ...failed])];
  if (titles.length === 0) return [checkStanding(scope, at, { before: undefined, after: undefined })];
  return titles.map((title) => {
    const found = around.find((one) => one.title === title);
    return checkStanding(scope, at, { title, before: found?.before, after: found?.after });
  });
}

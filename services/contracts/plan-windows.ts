/** The window of a process value as plans and techniques write it; either limit may be absent. */
export interface ProcessWindow {
  readonly number: string;
  readonly title: string;
  readonly unit: string;
  readonly lower: string | null;
  readonly upper: string | null;
}

function text(value: unknown): string | null {
  return typeof value === 'string' && value !== '' ? value : null;
}

/** Reads rows of the engine's form `{number, title, unit, lower, upper}`; what is no row is left out, a row without a number gets `W1`, `W2` … */
export function readWindows(rows: unknown): ProcessWindow[] {
  if (!Array.isArray(rows)) return [];
  return rows.flatMap((row: unknown, place) => {
    if (typeof row !== 'object' || row === null) return [];
    const { number, title, unit, lower, upper } = row as Record<string, unknown>;
    const named = text(number) ?? `W${String(place + 1)}`;
    return [{ number: named, title: text(title) ?? named, unit: text(unit) ?? '', lower: text(lower), upper: text(upper) }];
  });
}

/** The windows of a plan's criteria that one requirement asks. */
export function windowsOfRequirement(criteria: Record<string, unknown>, numbers: readonly string[]): ProcessWindow[] {
  return readWindows(criteria.process).filter(({ number }) => numbers.includes(number));
}

/** The form the engine judges. */
export function asCriteria(windows: readonly ProcessWindow[]): Record<string, unknown>[] {
  return windows.map(({ number, title, unit, lower, upper }) => ({
    number,
    title,
    unit,
    ...(lower === null ? {} : { lower }),
    ...(upper === null ? {} : { upper }),
  }));
}

interface Value {
  readonly number: string;
  readonly value: string;
  readonly unit: string;
}

function sameValue(one: ProcessWindow, other: ProcessWindow): boolean {
  return one.title.trim().toLowerCase() === other.title.trim().toLowerCase() && one.unit === other.unit;
}

/**
 * The values of a run under the numbers of a plan: numbers are the plan's own, so a value is found by its title and
 * unit. What the run does not hold is left out and counts as missing.
 */
export function valuesUnderPlan(
  run: readonly ProcessWindow[],
  values: readonly Value[],
  plan: readonly ProcessWindow[],
): Value[] {
  return plan.flatMap((asked) => {
    const row = run.find((one) => sameValue(one, asked));
    const read = row && values.find(({ number }) => number === row.number);
    return read ? [{ number: asked.number, value: read.value, unit: read.unit }] : [];
  });
}

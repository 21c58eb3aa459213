import type { Fault } from '../../evaluate/fault';
import { compare, isDecimalText, rationalOf } from '../../quantity/decimal';
import { convertValue, unitOf } from '../../quantity/units';
import type { Quantity } from '../../quantity/units';

/** What a penetrant technique sets windows for, and the quantity of each. */
const QUANTITIES = {
  'part-temperature': 'temperature',
  'penetrant-dwell': 'time',
  'emulsifier-dwell': 'time',
  'remover-dwell': 'time',
  'rinse-pressure': 'pressure',
  'rinse-temperature': 'temperature',
  'rinse-distance': 'length',
  'rinse-air-pressure': 'pressure',
  'drying-temperature': 'temperature',
  'drying-time': 'time',
  'developer-dwell': 'time',
  'dark-adaptation': 'time',
  'uv-a': 'irradiance',
  'ambient-light': 'illuminance',
  'white-light': 'illuminance',
} as const satisfies Readonly<Record<string, Quantity>>;

export type PenetrantStep = keyof typeof QUANTITIES;

/** Fluorescent (I) or visible dye (II). Source: ASTM E1417, SAE AMS 2644. */
export type PenetrantType = 'I' | 'II';

/** Water washable, post-emulsifiable lipophilic, solvent removable, post-emulsifiable hydrophilic. Source: as the type. */
export type PenetrantMethod = 'A' | 'B' | 'C' | 'D';

/** One window of a technique. Limits belong to the window; null is open. */
export interface PenetrantWindow {
  readonly step: string;
  readonly lower: string | null;
  readonly upper: string | null;
  readonly unit: string;
}

const RINSED: readonly PenetrantStep[] = ['rinse-pressure', 'rinse-temperature', 'drying-temperature'];
const BY_METHOD: Readonly<Record<PenetrantMethod, readonly PenetrantStep[]>> = {
  A: RINSED,
  B: ['emulsifier-dwell', ...RINSED],
  C: [],
  D: ['remover-dwell', ...RINSED],
};
const BY_TYPE: Readonly<Record<PenetrantType, readonly PenetrantStep[]>> = { I: ['uv-a', 'ambient-light'], II: ['white-light'] };

/** Every step known here, in the order of the work. */
export const PENETRANT_STEPS = Object.keys(QUANTITIES) as readonly PenetrantStep[];

function quantityOf(step: string): Quantity | undefined {
  return Object.hasOwn(QUANTITIES, step) ? QUANTITIES[step as PenetrantStep] : undefined;
}

function limitFaults({ lower, upper }: PenetrantWindow, path: string): Fault[] {
  if (lower === null && upper === null) return [{ path, message: 'needs a lower or an upper limit' }];
  const faults: Fault[] = [];
  if (lower !== null && !isDecimalText(lower)) faults.push({ path: `${path}.lower`, message: 'must be a decimal' });
  if (upper !== null && !isDecimalText(upper)) faults.push({ path: `${path}.upper`, message: 'must be a decimal' });
  if (faults.length === 0 && lower !== null && upper !== null && compare(rationalOf(lower), rationalOf(upper)) > 0)
    faults.push({ path: `${path}.lower`, message: 'is above the upper limit' });
  return faults;
}

/**
 * Everything that stands against a technique's table of windows, in one pass: unknown steps, steps used twice, units of another
 * quantity, limits that cannot be, and steps of the work without a window. The limits themselves are the technique's: sources
 * differ (E1417, ISO 3452-1, ISO 3059, user specifications), and the engine holds no number of its own against them.
 */
export function penetrantWindowFaults(
  windows: readonly PenetrantWindow[],
  type: PenetrantType,
  method: PenetrantMethod,
): Fault[] {
  const faults = windows.flatMap((window, place): Fault[] => {
    const path = `windows.${String(place)}`;
    const quantity = quantityOf(window.step);
    if (quantity === undefined) return [{ path: `${path}.step`, message: `${window.step} is not a step of penetrant work` }];
    const twice = windows.findIndex(({ step }) => step === window.step) < place;
    return [
      ...(twice ? [{ path: `${path}.step`, message: `${window.step} is used twice` }] : []),
      ...(unitOf(window.unit)?.quantity === quantity ? [] : [{ path: `${path}.unit`, message: `must be a unit of ${quantity}` }]),
      ...limitFaults(window, path),
    ];
  });
  const needs: readonly PenetrantStep[] = ['penetrant-dwell', ...BY_METHOD[method], 'developer-dwell', ...BY_TYPE[type]];
  const missing = needs.filter((needed) => !windows.some(({ step }) => step === needed));
  return [...faults, ...missing.map((step) => ({ path: 'windows', message: `${step} has no window` }))];
}

/** What was read at a step. */
export interface PenetrantEntry {
  readonly step: string;
  readonly value: string;
  readonly unit: string;
}

export interface WindowStanding {
  readonly step: string;
  /** `unreadable`: no decimal, or a unit of another quantity. */
  readonly standing: 'inside' | 'below' | 'above' | 'not-entered' | 'unreadable';
}

function standingOf({ lower, upper, unit }: PenetrantWindow, entry: PenetrantEntry): WindowStanding['standing'] {
  const [from, to] = [unitOf(entry.unit), unitOf(unit)];
  if (!isDecimalText(entry.value) || !from || !to || from.quantity !== to.quantity) return 'unreadable';
  const value = convertValue(rationalOf(entry.value), from, to);
  if (lower !== null && compare(value, rationalOf(lower)) < 0) return 'below';
  return upper !== null && compare(value, rationalOf(upper)) > 0 ? 'above' : 'inside';
}

/**
 * How each window of a technique (free of faults) stands, in the technique's order; limits are inside, units convert exactly.
 * A step entered more than once stands as its worst entry: the first that is not inside.
 */
export function penetrantStandings(windows: readonly PenetrantWindow[], entries: readonly PenetrantEntry[]): WindowStanding[] {
  return windows.map((window) => {
    const found = entries.filter(({ step }) => step === window.step).map((entry) => standingOf(window, entry));
    return { step: window.step, standing: found.find((standing) => standing !== 'inside') ?? found[0] ?? 'not-entered' };
  });
}

import type { Fault } from '../evaluate/fault';
import { compare, isDecimalText, rationalOf, ZERO } from '../quantity/decimal';

/** Looks at one value that is present, adds every fault it finds, and says whether it found none. */
export type Check = (value: unknown, path: string, faults: Fault[]) => boolean;

export interface Field {
  readonly check: Check;
  readonly required: boolean;
  /** Null is a value of this key, not its absence (only an indication's `shape`). */
  readonly nullable: boolean;
}

export type JsonObject = Readonly<Record<string, unknown>>;

const LONE_SURROGATE = /[\ud800-\udfff]/u;
const NAME = /^[a-z0-9]+(?:-[a-z0-9]+)*$/;

export function required(check: Check): Field {
  return { check, required: true, nullable: false };
}

export function optional(check: Check): Field {
  return { check, required: false, nullable: false };
}

/** The key must be there; null is one of its values and is not looked at further. */
export function requiredOrNull(check: Check): Field {
  return { check, required: true, nullable: true };
}

export function joinPath(path: string, key: string | number): string {
  return path === '' ? String(key) : `${path}.${key}`;
}

/** Adds a fault and answers false, so that a check can end with it. */
export function fault(faults: Fault[], path: string, message: string): false {
  faults.push({ path, message });
  return false;
}

/** Whether a value is a JSON object (neither null nor a list). */
export function isObject(value: unknown): value is JsonObject {
  return typeof value === 'object' && value !== null && !Array.isArray(value);
}

/** A key's own value; null and undefined both mean absent. Undefined for anything that is no object. */
export function valueAt(value: unknown, key: string): unknown {
  if (!isObject(value) || !Object.hasOwn(value, key)) return undefined;
  return value[key] ?? undefined;
}

/** A key's list, or an empty one when it is absent or not a list. */
export function listAt(value: unknown, key: string): readonly unknown[] {
  const list = valueAt(value, key);
  return Array.isArray(list) ? (list as readonly unknown[]) : [];
}

/** A key's text, or undefined when it is absent or not a text. */
export function textAt(value: unknown, key: string): string | undefined {
  const text = valueAt(value, key);
  return typeof text === 'string' ? text : undefined;
}

/** Any text that can be written as UTF-8. */
export const anyText: Check = (value, path, faults) => {
  if (typeof value !== 'string') return fault(faults, path, 'must be a text');
  return LONE_SURROGATE.test(value) ? fault(faults, path, 'holds half of a character') : true;
};

/** A text with a character that is not white space: an id, a number, a reason. */
export const filledText: Check = (value, path, faults) => {
  if (!anyText(value, path, faults)) return false;
  return (value as string).trim() === '' ? fault(faults, path, 'must not be blank') : true;
};

/** A method or type: lower-case words joined by hyphens. */
export const wordName: Check = (value, path, faults) =>
  typeof value === 'string' && NAME.test(value) ? true : fault(faults, path, 'must be lower-case words joined by hyphens');

/** As `wordName`, or `*`. */
export const wordNameOrAll: Check = (value, path, faults) => (value === '*' ? true : wordName(value, path, faults));

export const truth: Check = (value, path, faults) =>
  typeof value === 'boolean' ? true : fault(faults, path, 'must be true or false');

/** A decimal text of any sign. */
export const decimal: Check = (value, path, faults) =>
  typeof value === 'string' && isDecimalText(value)
    ? true
    : fault(faults, path, 'must be a decimal written as a text, such as "0.75"');

/** A decimal text > 0. */
export const decimalAboveZero: Check = (value, path, faults) => {
  if (!decimal(value, path, faults)) return false;
  return compare(rationalOf(value as string), ZERO) > 0 ? true : fault(faults, path, 'must be greater than 0');
};

/** A decimal text ≥ 0. */
export const decimalNotNegative: Check = (value, path, faults) => {
  if (!decimal(value, path, faults)) return false;
  return compare(rationalOf(value as string), ZERO) >= 0 ? true : fault(faults, path, 'must not be less than 0');
};

/** A whole JSON number from `least` to `most`. */
export function whole(least: number, most: number): Check {
  return (value, path, faults) =>
    typeof value === 'number' && Number.isInteger(value) && value >= least && value <= most
      ? true
      : fault(faults, path, `must be a whole number from ${least} to ${most}`);
}

export function oneOf(...allowed: readonly string[]): Check {
  return (value, path, faults) =>
    typeof value === 'string' && allowed.includes(value) ? true : fault(faults, path, `must be one of ${allowed.join(', ')}`);
}

/** A list of which every item passes; `least` items at least. */
export function listOf(check: Check, least = 0): Check {
  return (value, path, faults) => {
    if (!Array.isArray(value)) return fault(faults, path, 'must be a list');
    if (value.length < least) return fault(faults, path, least === 1 ? 'must not be empty' : `must have at least ${least} items`);
    let good = true;
    value.forEach((item: unknown, index) => {
      if (!check(item, joinPath(path, index), faults)) good = false;
    });
    return good;
  };
}

/** An object with these keys and no others. */
export function objectOf(fields: Readonly<Record<string, Field>>): Check {
  const known = Object.entries(fields);
  return (value, path, faults) => {
    if (!isObject(value)) return fault(faults, path, 'must be an object');
    let good = true;
    for (const [key, field] of known) {
      const there = Object.hasOwn(value, key) ? value[key] : undefined;
      if (there === null && field.nullable) continue;
      if (there === undefined || there === null) {
        if (field.required) good = fault(faults, joinPath(path, key), 'is required');
      } else if (!field.check(there, joinPath(path, key), faults)) good = false;
    }
    for (const key of Object.keys(value)) {
      if (!Object.hasOwn(fields, key)) good = fault(faults, joinPath(path, key), 'is not a known key');
    }
    return good;
  };
}

/** Adds a fault at every later item of a list whose `key` repeats an earlier one's. */
export function noRepeats(list: readonly unknown[], key: string, path: string, faults: Fault[]): void {
  const seen = new Set<string>();
  list.forEach((item, index) => {
    const text = textAt(item, key);
    if (text === undefined) return;
    if (seen.has(text)) fault(faults, joinPath(joinPath(path, index), key), 'is used twice');
    seen.add(text);
  });
}

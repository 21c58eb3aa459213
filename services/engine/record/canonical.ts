import { sha256Hex, utf8Of } from './sha256';

const LONE_SURROGATE = /[\ud800-\udfff]/u;

function textJson(text: string): string {
  if (LONE_SURROGATE.test(text)) throw new TypeError('a text holds half of a character');
  return JSON.stringify(text);
}

/** RFC 8785 text of a JSON value. Throws TypeError for what is not I-JSON: undefined, NaN, infinities, half characters, other objects. */
export function canonicalJson(value: unknown): string {
  if (value === null || typeof value === 'boolean') return String(value);
  if (typeof value === 'string') return textJson(value);
  if (typeof value === 'number' && Number.isFinite(value)) return JSON.stringify(value);
  if (Array.isArray(value)) return `[${Array.from(value as readonly unknown[], canonicalJson).join(',')}]`;
  if (typeof value !== 'object') throw new TypeError('not a JSON value');
  const kind: unknown = Object.getPrototypeOf(value);
  if (kind !== Object.prototype && kind !== null) throw new TypeError('not a plain object');
  // The default order of sort is by UTF-16 code units, as RFC 8785 3.2.3 asks.
  const members = Object.keys(value).sort();
  return `{${members.map((key) => `${textJson(key)}:${canonicalJson((value as Record<string, unknown>)[key])}`).join(',')}}`;
}

/** `sha256:` and the digest of a value's canonical bytes. Throws as `canonicalJson`. */
export function digestOf(value: unknown): string {
  return `sha256:${sha256Hex(utf8Of(canonicalJson(value)))}`;
}

/** A value that has no canonical form: `path` says where it stands. */
export class NotCanonicalError extends Error {
  constructor(
    readonly path: string,
    readonly fault: string,
  ) {
    super(`${path === '' ? 'The value' : path} ${fault}`);
    this.name = 'NotCanonicalError';
  }
}

/**
 * One text for one value: RFC 8785 (JSON Canonicalization Scheme), restricted so that nothing is left to a number formatter:
 * numbers are safe integers only, decimals travel as strings. Keys are sorted by UTF-16 code units.
 * Throws NotCanonicalError for undefined, fractions, lone surrogates, and anything that is not plain data.
 */
export function canonicalJson(value: unknown, path = ''): string {
  if (value === null || typeof value === 'boolean') return String(value);
  if (typeof value === 'string') return canonicalString(value, path);
  if (typeof value === 'number') {
    if (!Number.isSafeInteger(value) || Object.is(value, -0))
      throw new NotCanonicalError(path, 'must be a whole number or a string');
    return String(value);
  }
  if (Array.isArray(value)) return `[${value.map((item, index) => canonicalJson(item, `${path}[${index}]`)).join(',')}]`;
  if (typeof value === 'object' && Object.getPrototypeOf(value) === Object.prototype) {
    const members = Object.entries(value).sort(([a], [b]) => (a < b ? -1 : 1));
    const texts = members.map(
      ([key, item]) => `${canonicalString(key, path)}:${canonicalJson(item, path === '' ? key : `${path}.${key}`)}`,
    );
    return `{${texts.join(',')}}`;
  }
  throw new NotCanonicalError(path, 'is not plain data');
}

function canonicalString(text: string, path: string): string {
  if (/\p{Surrogate}/u.test(text)) throw new NotCanonicalError(path, 'holds half of a character pair');
  return JSON.stringify(text);
}

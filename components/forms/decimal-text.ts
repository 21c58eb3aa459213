/**
 * The exact decimal in a typed text, with a point: '1,50' and '1.50' are both '1.50'. Every digit is kept.
 * Undefined when it could mean two things or is no plain decimal ('1,234.5', '1 2', '1e3', 'NaN', '').
 */
export function decimalFrom(text: string): string | undefined {
  const match = /^([+\-\u2212]?)(\d*)(?:[.,](\d+))?$/.exec(text.trim());
  if (!match) return undefined;
  const [, sign = '', whole = '', fraction] = match;
  if (whole === '' && fraction === undefined) return undefined;
  const body = (whole === '' ? '0' : whole) + (fraction === undefined ? '' : `.${fraction}`);
  return sign === '-' || sign === '\u2212' ? `-${body}` : body;
}

import { compare, rationalOf } from './decimal';
import { convertValue, unitOf } from './units';

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

import { boxGap } from './geometry/points';
import { separationOf } from './geometry/separation';
import type { Mark } from './mark';
import { nmOf } from './rounding';

/** Rounded separations between drawn marks in whole nanometres, each computed once. */
export interface Separations {
  /** The separation; both marks are drawn. */
  readonly between: (one: Mark, other: Mark) => number;
  /** Not more than the separation, and cheap. */
  readonly atLeast: (one: Mark, other: Mark) => number;
}

/** A table of the separations of one evaluation, filled as they are asked for. */
export function separationsTable(): Separations {
  const known = new Map<number, number>();
  const atLeast = (one: Mark, other: Mark) =>
    one.drawn && other.drawn ? nmOf(boxGap(one.drawn.outline.box, other.drawn.outline.box)) - 1 : 0;
  const between = (one: Mark, other: Mark): number => {
    if (!one.drawn || !other.drawn) return Infinity;
    const [first, second] = one.index < other.index ? [one, other] : [other, one];
    const key = second.index * 1_000_000 + first.index;
    const found = known.get(key);
    if (found !== undefined) return found;
    const nm = nmOf(separationOf(one.drawn.outline, other.drawn.outline));
    known.set(key, nm);
    return nm;
  };
  return { between, atLeast };
}

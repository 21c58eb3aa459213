import { clustersOf } from './grouping';
import type { GroupingTerms } from './grouping';
import type { Mark } from './mark';
import type { Separations } from './separations';

/**
 * Bounds of what groups may become when indications without a place join them: given those (and whether one has not even a size),
 * the largest length in nanometres that a mark's group stays below or at.
 */
export type Growth = (loose: readonly Mark[], scaleless: boolean) => (mark: Mark) => number;

/** A growth bound for the drawn marks of one method and view; nothing is computed before it is asked for. */
export function growthOf(marks: readonly Mark[], terms: GroupingTerms, separations: Separations): Growth {
  const drawn = marks.filter((mark) => mark.drawn);
  return (loose, scaleless) => {
    const { distance } = terms;
    if (scaleless) return (mark) => (mark.apart ? 0 : Infinity);
    if (distance === null || loose.length === 0) return () => 0;
    const lengths = loose.map((mark) => mark.sizes?.lengthNm ?? 0).sort((a, b) => b - a);
    // Each of them in turn is put at the far side, just inside the distance.
    const grown = (from: number, by: readonly number[]) => by.reduce((sum, length) => sum + length + distance(sum, length), from);
    // They may also bridge the gap between drawn groups that do not join by themselves.
    const bridged = (one: number, other: number) =>
      Math.max(
        grown(one, lengths) - one + distance(grown(one, lengths), other),
        grown(other, lengths) - other + distance(grown(other, lengths), one),
      );
    const upper = new Map<Mark, number>();
    let most = grown(lengths[0] ?? 0, lengths.slice(1));
    for (const cluster of clustersOf(drawn, bridged, separations)) {
      const length = grown(cluster.lengthNm, lengths);
      most = Math.max(most, length);
      for (const mark of cluster.members) upper.set(mark, length);
    }
    return (mark) => (mark.apart ? 0 : (upper.get(mark) ?? (loose.includes(mark) ? most : 0)));
  };
}

import type { IndicationClass, Merge } from '../evaluate/types';
import { rationalOf } from '../quantity/decimal';
import { farthestBetween, leastWidth, piecesOf, thinned } from './geometry/calipers';
import type { Piece } from './geometry/calipers';
import { boxAround, boxGap } from './geometry/points';
import type { Box } from './geometry/points';
import { isLinear } from './mark';
import type { LinearRule, Mark } from './mark';
import { lengthLimit, nmOf, timesNm } from './rounding';
import type { LengthUnit } from './rounding';
import type { Separations } from './separations';

/** Indications judged as one by size; `lengthNm` is the caliper of their union. */
export interface Group {
  readonly members: readonly Mark[];
  readonly lengthNm: number;
  readonly classes: ReadonlySet<IndicationClass>;
  /** At or above the recordable size. */
  readonly judged: boolean;
}

/** When two groups join: their separation is below this, in nanometres, given both lengths. */
export type MergeDistance = (lengthNm: number, otherNm: number) => number;

/** The distance of a merge in whole nanometres: a separation joins when it is less. */
export function mergeDistanceOf(merge: Merge, unit: LengthUnit): MergeDistance {
  if ('within' in merge && merge.within !== undefined && merge.within !== null) {
    const { ceil } = lengthLimit(merge.within, unit);
    return () => ceil;
  }
  const { factor, of } = merge as Extract<Merge, { readonly factor: string }>;
  const exact = rationalOf(factor);
  const known = new Map<number, number>();
  return (lengthNm, otherNm) => {
    const base = of === 'larger' ? Math.max(lengthNm, otherNm) : Math.min(lengthNm, otherNm);
    const found = known.get(base) ?? (Number.isFinite(base) ? timesNm(exact, base) : Infinity);
    known.set(base, found);
    return found;
  };
}

interface Cluster {
  readonly members: readonly Mark[];
  readonly pieces: readonly Piece[];
  readonly box: Box | null;
  readonly lengthUm: number;
  readonly lengthNm: number;
}

function lone(mark: Mark): Cluster {
  const lengthNm = mark.sizes?.lengthNm ?? 0;
  return {
    members: [mark],
    pieces: mark.drawn ? piecesOf(mark.drawn.outline) : [],
    box: mark.drawn?.outline.box ?? null,
    lengthUm: lengthNm / 1000,
    lengthNm,
  };
}

function joined(one: Cluster, other: Cluster): Cluster {
  const lengthUm = farthestBetween(one.pieces, other.pieces, Math.max(one.lengthUm, other.lengthUm));
  return {
    members: [...one.members, ...other.members],
    pieces: thinned([...one.pieces, ...other.pieces]),
    box: one.box && other.box ? boxAround(one.box, other.box) : null,
    lengthUm,
    lengthNm: nmOf(lengthUm),
  };
}

function boxesNearer(one: Box | null, other: Box | null, distanceNm: number): boolean {
  return one !== null && other !== null && nmOf(boxGap(one, other)) - 1 < distanceNm;
}

function nearerThan(one: Cluster, other: Cluster, distanceNm: number, separations: Separations): boolean {
  if (!boxesNearer(one.box, other.box, distanceNm)) return false;
  return one.members.some(
    (a) =>
      boxesNearer(a.drawn?.outline.box ?? null, other.box, distanceNm) &&
      other.members.some((b) => separations.atLeast(a, b) < distanceNm && separations.between(a, b) < distanceNm),
  );
}

/** One pass with the lengths as they stand: the clusters after it, those that grew first, and how many grew. */
function joinOnce(
  clusters: readonly Cluster[],
  grown: number,
  distance: MergeDistance,
  separations: Separations,
): { clusters: readonly Cluster[]; grown: number } {
  const leaders = clusters.map((_, index) => index);
  const leaderOf = (index: number): number => {
    let leader = index;
    while (leaders[leader] !== leader) leader = leaders[leader] ?? leader;
    leaders[index] = leader;
    return leader;
  };
  clusters.slice(0, grown).forEach((cluster, index) => {
    for (let next = index + 1; next < clusters.length; next++) {
      const other = clusters[next];
      if (!other || leaderOf(index) === leaderOf(next)) continue;
      if (nearerThan(cluster, other, distance(cluster.lengthNm, other.lengthNm), separations)) {
        leaders[leaderOf(next)] = leaderOf(index);
      }
    }
  });
  const unions = new Map<number, Cluster>();
  const larger = new Set<number>();
  clusters.forEach((cluster, index) => {
    const leader = leaderOf(index);
    const standing = unions.get(leader);
    if (standing) larger.add(leader);
    unions.set(leader, standing ? joined(standing, cluster) : cluster);
  });
  const first = [...unions].filter(([leader]) => larger.has(leader)).map(([, cluster]) => cluster);
  const rest = [...unions].filter(([leader]) => !larger.has(leader)).map(([, cluster]) => cluster);
  return { clusters: [...first, ...rest], grown: first.length };
}

/**
 * Joins marks until none join. A join only ever shortens separations and lengthens lengths, so the end does not depend on the
 * order; what has grown is looked at again until nothing grows.
 */
export function clustersOf(marks: readonly Mark[], distance: MergeDistance, separations: Separations): readonly Cluster[] {
  let clusters: readonly Cluster[] = marks.map(lone);
  let grown = clusters.length;
  while (grown > 0) ({ clusters, grown } = joinOnce(clusters, grown, distance, separations));
  return clusters;
}

function classesOf(cluster: Cluster, linear: LinearRule | null): ReadonlySet<IndicationClass> {
  const classes = new Set<IndicationClass>();
  if (!linear) return classes;
  for (const member of cluster.members) if (member.class) classes.add(member.class);
  if (cluster.members.length === 1) return classes;
  const narrowest = Math.min(...cluster.members.map((member) => member.sizes?.widthNm ?? 0));
  if (isLinear(cluster.lengthNm, narrowest, linear)) classes.add('linear');
  if (!classes.has('rounded') || !classes.has('linear')) {
    const own = isLinear(cluster.lengthNm, nmOf(leastWidth(cluster.pieces)), linear);
    classes.add(own ? 'linear' : 'rounded');
  }
  return classes;
}

/** What a rule set asks of the marks of one method and view before its rules. */
export interface GroupingTerms {
  readonly distance: MergeDistance | null;
  /** In whole nanometres, rounded up: a group of this length is judged. */
  readonly recordableNm: number;
  readonly linear: LinearRule | null;
}

/** Groups of scaled marks of one method and view, by smallest position. */
export function groupsOf(marks: readonly Mark[], terms: GroupingTerms, separations: Separations): readonly Group[] {
  const drawn = marks.filter((mark) => mark.drawn);
  const clusters = terms.distance ? clustersOf(drawn, terms.distance, separations) : drawn.map(lone);
  const entered = marks.filter((mark) => !mark.drawn && mark.sizes).map(lone);
  return [...clusters, ...entered]
    .map((cluster) => ({
      members: [...cluster.members].sort((a, b) => a.index - b.index),
      lengthNm: cluster.lengthNm,
      classes: classesOf(cluster, terms.linear),
      judged: cluster.lengthNm >= terms.recordableNm,
    }))
    .sort((a, b) => (a.members[0]?.index ?? 0) - (b.members[0]?.index ?? 0));
}

import type { Criteria, IndicationClass, IndicationRuleSet } from '../evaluate/types';
import { compare, multiply, rationalOf, roundHalfEven, type Rational } from '../quantity/decimal';
import { calipersOfUnion } from './caliper';
import type { Nanometres } from './exact-length';
import { classOf, nanometresOf, type Member } from './members';
import type { Outline } from './outline';
import { leastPossible, separation } from './separation';

/** Indications that count as one by size (rules I5, I6). */
export interface Group {
  readonly members: readonly Member[];
  readonly length: Nanometres;
  readonly width: Nanometres;
  readonly classes: ReadonlySet<IndicationClass>;
  /** False below the recordable size: listed, not judged. */
  readonly judged: boolean;
}

function outlines(members: readonly Member[]): Outline[] {
  return members.map(({ outline }) => outline).filter((outline): outline is Outline => outline !== null);
}

function grouped(criteria: Criteria, set: IndicationRuleSet, members: readonly Member[]): Group {
  const [only] = members;
  const drawn = outlines(members);
  const calipers = members.length === 1 && only ? { length: only.length ?? 0, width: only.width ?? 0 } : calipersOfUnion(drawn);
  const classes = new Set<IndicationClass>(
    members.map((member) => member.class).filter((one): one is IndicationClass => one !== null),
  );
  if (members.length > 1) {
    const smallest = Math.min(...members.map(({ width }) => width ?? Infinity));
    for (const one of [
      classOf(criteria.linear, calipers.length, calipers.width),
      classOf(criteria.linear, calipers.length, smallest),
    ]) {
      if (one === 'linear' || (one === 'rounded' && !classes.has('linear'))) classes.add(one);
    }
    const union = classOf(criteria.linear, calipers.length, calipers.width);
    if (union) classes.add(union);
  }
  const recordable = set.recordable ? nanometresOf(set.recordable, criteria.lengthUnit) : null;
  const judged = recordable === null || compare({ n: BigInt(calipers.length), d: 1n }, recordable) >= 0;
  return { members, ...calipers, classes, judged };
}

/** Distance under which two groups of these lengths join. */
function joiningDistance(criteria: Criteria, set: IndicationRuleSet, one: Nanometres, other: Nanometres): Rational | null {
  const { merge } = set;
  if (!merge) return null;
  if ('within' in merge) return nanometresOf(merge.within, criteria.lengthUnit);
  const length = merge.of === 'larger' ? Math.max(one, other) : Math.min(one, other);
  return roundHalfEven(multiply(rationalOf(merge.factor), { n: BigInt(length), d: 1n }), 0);
}

function apart(one: Group, other: Group, distance: Rational): boolean {
  const most = Number((distance.n * 1000n) / distance.d) / 1000 + 1;
  for (const a of outlines(one.members)) {
    for (const b of outlines(other.members)) {
      if (leastPossible(a, b) * 1000 > most) continue;
      if (compare({ n: BigInt(separation(a, b)), d: 1n }, distance) < 0) return false;
    }
  }
  return true;
}

/** Groups of one rule set, view and method: joined until no two are nearer than the set's distance. */
export function groupsOf(criteria: Criteria, set: IndicationRuleSet, members: readonly Member[]): Group[] {
  const groups = members.map((member) => grouped(criteria, set, [member]));
  if (!set.merge) return groups;
  for (let joined = true; joined;) {
    joined = false;
    for (let i = 0; i < groups.length; i += 1) {
      for (let j = i + 1; j < groups.length;) {
        const [one, other] = [groups[i], groups[j]];
        if (!one || !other) break;
        const distance = joiningDistance(criteria, set, one.length, other.length);
        if (distance === null || apart(one, other, distance)) {
          j += 1;
          continue;
        }
        groups[i] = grouped(
          criteria,
          set,
          [...one.members, ...other.members].sort((a, b) => (a.id < b.id ? -1 : 1)),
        );
        groups.splice(j, 1);
        joined = true;
      }
    }
  }
  return groups;
}

/** Would these two merge by themselves? Such pairs are passed over by separation rules. */
export function wouldMerge(criteria: Criteria, set: IndicationRuleSet, one: Member, other: Member, between: Nanometres): boolean {
  const distance = joiningDistance(criteria, set, one.length ?? 0, other.length ?? 0);
  return distance !== null && compare({ n: BigInt(between), d: 1n }, distance) < 0;
}

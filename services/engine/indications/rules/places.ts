import type { IndicationRule } from '../../evaluate/types';
import type { Alignable, Link } from '../alignable';
import { hangingTogether, longestAlignment } from '../alignment';
import type { AlignmentFinding } from '../alignment';
import { centroidStep } from '../mark';
import { areaLimit, lengthLimit, reachUm } from '../rounding';
import type { Member, Scene } from '../scene';
import { heaviestWindow } from '../windows';
import { floating, partOf, placed, selectable, selected, waitsForPlace } from './part';
import type { Part } from './part';

type Rule<Kind extends IndicationRule['kind']> = Extract<IndicationRule, { readonly kind: Kind }>;

function ownLength(member: Member): number {
  return member.mark.sizes?.lengthNm ?? 0;
}

/** The least separation of drawn pairs that do not merge by themselves, and every member of such a pair nearer than `ceil`. */
function nearPairs(members: readonly Member[], scene: Scene, ceil: number): { least: number | null; near: ReadonlySet<Member> } {
  const { separations, terms } = scene;
  const near = new Set<Member>();
  let least = Infinity;
  members.forEach((one, index) => {
    for (let next = index + 1; next < members.length; next++) {
      const other = members[next];
      if (!other) continue;
      const bound = separations.atLeast(one.mark, other.mark);
      if (bound >= least && (bound >= ceil || (near.has(one) && near.has(other)))) continue;
      const separation = separations.between(one.mark, other.mark);
      if (terms.distance && separation < terms.distance(ownLength(one), ownLength(other))) continue;
      least = Math.min(least, separation);
      if (separation < ceil) near.add(one).add(other);
    }
  });
  return { least: least === Infinity ? null : least, near };
}

/** Two members of the zone nearer than the limit. */
export function judgeMinSeparation(rule: Rule<'min-separation'>, scene: Scene): Part {
  const { ceil } = lengthLimit(rule.limit, scene.unit);
  const could = selectable(rule, scene);
  const waits = waitsForPlace(scene, could);
  const { least, near } = nearPairs(placed(selected(rule, scene)).drawn, scene, ceil);
  const merged = (one: Member, other: Member) => scene.terms.distance?.(ownLength(one), ownLength(other)) ?? 0;
  const meets = (one: Member) => could.some((other) => other !== one && !other.mark.apart && merged(one, other) < ceil);
  const open = () => floating(could).some(meets) || nearPairs(placed(could).drawn, scene, ceil).near.size > 0;
  return partOf({ breaking: [...near], measured: least, waits, open: waits && open() });
}

interface Weighing {
  readonly shape: 'circle' | 'square';
  readonly sizeUm: number;
  readonly allowed: number;
  readonly weightOf: (member: Member) => number;
}

/** The heaviest window over what has a place; what lies apart or alone fills a window by itself. */
function weigh(members: readonly Member[], { shape, sizeUm, allowed, weightOf }: Weighing) {
  const { drawn, alone } = placed(members);
  const origin = drawn[0];
  const places = origin ? drawn.map((member) => ({ ...centroidStep(origin.mark, member.mark), weight: weightOf(member) })) : [];
  const found = heaviestWindow(places, shape, sizeUm, allowed);
  return {
    most: alone.reduce((most, member) => Math.max(most, weightOf(member)), found.most),
    breaking: [
      ...drawn.filter((_, position) => found.breaking.has(position)),
      ...alone.filter((member) => weightOf(member) > allowed),
    ],
  };
}

function judgeWindow(rule: Parameters<typeof selected>[0], scene: Scene, weighing: Weighing): Part {
  const could = selectable(rule, scene);
  const waits = waitsForPlace(scene, could);
  const { most, breaking } = weigh(selected(rule, scene), weighing);
  const open = () => {
    const loose = floating(could);
    const rest = weigh(
      could.filter((member) => !loose.includes(member)),
      weighing,
    );
    // What lies apart shares no window with another.
    const shared = weigh(
      could.filter((member) => member.mark.drawn),
      weighing,
    );
    const brought = loose.reduce((sum, member) => sum + weighing.weightOf(member), 0);
    return Math.max(rest.most, shared.most + brought) > weighing.allowed;
  };
  return partOf({ breaking, measured: most, waits, open: waits && open() });
}

/** More than limit centroids in some window, put anywhere. */
export function judgeCountInWindow(rule: Rule<'max-count-in-window'>, scene: Scene): Part {
  const { shape, size } = rule.window;
  const sizeUm = reachUm(lengthLimit(size, scene.unit));
  return judgeWindow(rule, scene, { shape, sizeUm, allowed: rule.limit, weightOf: () => 1 });
}

/** The sum of members' own lengths, or whole areas, with the centroid in some window. */
export function judgeTotalInWindow(
  rule: Rule<'max-total-length' | 'max-total-area'>,
  window: { readonly shape: 'circle' | 'square'; readonly size: string },
  scene: Scene,
): Part {
  const isLength = rule.kind === 'max-total-length';
  const limit = isLength ? lengthLimit(rule.limit, scene.unit) : areaLimit(rule.limit, scene.unit);
  const weightOf = ({ mark }: Member) => (mark.sizes ? (isLength ? mark.sizes.lengthNm : mark.sizes.areaUm2) : Infinity);
  const sizeUm = reachUm(lengthLimit(window.size, scene.unit));
  return judgeWindow(rule, scene, { shape: window.shape, sizeUm, allowed: limit.floor, weightOf });
}

/** How many alignment steps one row may take; past it, more than 200 indications that hang together are refused by name. */
const ALIGNMENT_STEPS = 30_000_000;
const ALWAYS_TAKEN = 200;

function alignable(members: readonly Member[], rule: Rule<'alignment'>, scene: Scene, loose: readonly Member[]): Alignable {
  const gap = lengthLimit(rule.gap, scene.unit);
  const lengths = loose.map((member) => member.mark.sizes?.lengthNm ?? Infinity).sort((a, b) => b - a);
  // Nearer than this with so many unplaced ones put between, each nearer than the gap to the next.
  const reaches = [gap.ceil];
  lengths.forEach((length, index) =>
    reaches.push((index + 2) * gap.ceil + lengths.slice(0, index).reduce((a, b) => a + b, length)),
  );
  const farthest = reaches[reaches.length - 1] ?? 0;
  const links: Link[][] = members.map(() => []);
  members.forEach((one, index) => {
    for (let next = index + 1; next < members.length; next++) {
      const other = members[next];
      if (!other || scene.separations.atLeast(one.mark, other.mark) >= farthest) continue;
      const separation = scene.separations.between(one.mark, other.mark);
      const bridges = reaches.findIndex((reach) => separation < reach);
      if (bridges < 0) continue;
      links[index]?.push({ to: next, bridges });
      links[next]?.push({ to: index, bridges });
    }
  });
  const origin = members[0];
  const places = members.map((member) => (origin ? centroidStep(origin.mark, member.mark) : { x: 0, y: 0 }));
  return { places, links, spare: loose.length };
}

function align(field: Alignable, rule: Rule<'alignment'>, scene: Scene, steps: number): AlignmentFinding {
  return longestAlignment(field, reachUm(lengthLimit(rule.stripWidth, scene.unit)), rule.count, steps);
}

/** Whether an alignment would be refused: more than 200 that hang together by its gap, and too long a search. */
export function alignmentTooLong(rule: Rule<'alignment'>, scene: Scene): boolean {
  const field = alignable(placed(selected(rule, scene)).drawn, rule, scene, []);
  if (hangingTogether(field.links).every((part) => part.length <= ALWAYS_TAKEN)) return false;
  return !align(field, rule, scene, ALIGNMENT_STEPS).finished;
}

/** At least `count` members in line, each nearer than the gap to the next. */
export function judgeAlignment(rule: Rule<'alignment'>, scene: Scene): Part {
  const could = selectable(rule, scene);
  const waits = waitsForPlace(scene, could);
  const { drawn, alone } = placed(selected(rule, scene));
  const { longest, breaking } = align(alignable(drawn, rule, scene, []), rule, scene, Infinity);
  const open = () => {
    const loose = floating(could);
    const field = alignable(placed(could).drawn, rule, scene, loose);
    const bridged = align(field, rule, scene, ALIGNMENT_STEPS);
    return !bridged.finished || bridged.longest + loose.length >= rule.count;
  };
  return partOf({
    breaking: drawn.filter((_, position) => breaking.has(position)),
    measured: drawn.length + alone.length === 0 ? null : Math.max(longest, alone.length > 0 ? 1 : 0),
    waits,
    open: waits && open(),
  });
}

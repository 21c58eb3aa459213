import { turnOf } from './geometry/points';
import type { Vector } from './geometry/points';

/** Two places near enough to follow each other in a line; `bridges` unplaced ones are needed between them (0: none). */
export interface Link {
  readonly to: number;
  readonly bridges: number;
}

/** Centroids (µm, differences to one of them) and which may follow which. */
export interface Alignable {
  readonly places: readonly Vector[];
  readonly links: readonly (readonly Link[])[];
  /** How many unplaced ones may be put between or at the ends. */
  readonly spare: number;
}

/** The longest line of placed ones, and those of them in some line of at least `count`. */
export interface AlignmentFinding {
  readonly longest: number;
  readonly breaking: ReadonlySet<number>;
  /** Whether the steps allowed were enough; if not the rest means nothing. */
  readonly finished: boolean;
}

/** Positions that hang together by links, each list rising. */
export function hangingTogether(links: Alignable['links']): readonly (readonly number[])[] {
  const seen = new Set<number>();
  const parts: number[][] = [];
  links.forEach((_, start) => {
    if (seen.has(start)) return;
    const part: number[] = [];
    const open = [start];
    seen.add(start);
    for (let at = open.pop(); at !== undefined; at = open.pop()) {
      part.push(at);
      for (const link of links[at] ?? []) {
        if (seen.has(link.to)) continue;
        seen.add(link.to);
        open.push(link.to);
      }
    }
    parts.push(part.sort((a, b) => a - b));
  });
  return parts;
}

interface Turn {
  readonly at: number;
  readonly normal: Vector;
  /** Something more may line up past it: a place enters the strip, or two change their order. */
  readonly gains: boolean;
  /** Something may line up no more past it. */
  readonly loses: boolean;
}

/** A turn of the normal past (x, y) at which a place at `step` from the anchor enters or leaves over the lower or upper border. */
function crossing(x: number, y: number, step: Vector, upper: boolean): Turn {
  const rises = x * step.y - y * step.x > 0;
  const enters = rises !== upper;
  return { at: turnOf(x, y), normal: { x, y }, gains: enters, loses: !enters };
}

const NEAR = 1e-3;

/** Turns at which two linked places change their order along the strip: the normal points from one to the other there. */
function swaps(one: Vector, other: Vector, stripWidth: number): Turn[] {
  const gap = Math.sqrt((other.x - one.x) ** 2 + (other.y - one.y) ** 2);
  // Both must fit the width there.
  if (gap === 0 || gap > stripWidth) return [];
  return [1, -1].flatMap((sign) => {
    const n = { x: (sign * (other.x - one.x)) / gap, y: (sign * (other.y - one.y)) / gap };
    const heights = [n.x * one.x + n.y * one.y, n.x * other.x + n.y * other.y];
    const inside = heights.every((height) => height > -NEAR && height < stripWidth + NEAR);
    return inside ? [{ at: turnOf(n.x, n.y), normal: n, gains: true, loses: true }] : [];
  });
}

/**
 * Directions of the strip's normal at which, with its lower border through `anchor`, what it holds or the order of two linked
 * places along it changes, by angle.
 */
function turnsAbout(anchor: number, part: readonly number[], { places, links }: Alignable, stripWidth: number): Turn[] {
  const from = places[anchor] ?? { x: 0, y: 0 };
  const turns: Turn[] = [];
  const stepTo = (position: number): Vector => {
    const place = places[position] ?? from;
    return { x: place.x - from.x, y: place.y - from.y };
  };
  for (const position of part) {
    const step = stepTo(position);
    for (const link of links[position] ?? []) if (link.to > position) turns.push(...swaps(step, stepTo(link.to), stripWidth));
    const size = Math.sqrt(step.x * step.x + step.y * step.y);
    if (size === 0) continue;
    const u = { x: step.x / size, y: step.y / size };
    turns.push(crossing(-u.y, u.x, step, false), crossing(u.y, -u.x, step, false));
    if (size < stripWidth) continue;
    const cos = stripWidth / size;
    const sin = Math.sqrt(Math.max(0, (1 - cos) * (1 + cos)));
    turns.push(crossing(u.x * cos - u.y * sin, u.y * cos + u.x * sin, step, true));
    turns.push(crossing(u.x * cos + u.y * sin, u.y * cos - u.x * sin, step, true));
  }
  return turns.sort((a, b) => a.at - b.at);
}

/** Places linked to the anchor inside the strip, in order along it. */
function lineUp(anchor: number, normal: Vector, { places, links }: Alignable, stripWidth: number): number[] {
  const from = places[anchor] ?? { x: 0, y: 0 };
  const along = new Map<number, number>();
  const open = [anchor];
  along.set(anchor, 0);
  for (let at = open.pop(); at !== undefined; at = open.pop()) {
    for (const { to } of links[at] ?? []) {
      if (along.has(to)) continue;
      const place = places[to] ?? from;
      const x = place.x - from.x;
      const y = place.y - from.y;
      const height = normal.x * x + normal.y * y;
      if (height < 0 || height > stripWidth) continue;
      along.set(to, normal.y * x - normal.x * y);
      open.push(to);
    }
  }
  return [...along].sort((a, b) => a[1] - b[1] || a[0] - b[0]).map(([position]) => position);
}

/** For each place of a line-up the most that a chain may hold up to it and from it, when `spare` bridges may be used in all. */
function chainsThrough(order: readonly number[], links: Alignable['links'], spare: number): Map<number, number[]> {
  const held = new Map<number, number[]>();
  for (const at of order) {
    const most = new Array<number>(spare + 1).fill(1);
    for (const { to, bridges } of links[at] ?? []) {
      const before = held.get(to);
      if (!before) continue;
      for (let used = bridges; used <= spare; used++) most[used] = Math.max(most[used] ?? 1, (before[used - bridges] ?? 0) + 1);
    }
    held.set(at, most);
  }
  return held;
}

class Search {
  longest = 0;
  readonly breaking = new Set<number>();

  constructor(
    private readonly field: Alignable,
    private readonly stripWidth: number,
    private readonly count: number,
  ) {}

  /** Looks at one strip; answers how many steps that took. */
  look(anchor: number, normal: Vector): number {
    const { links, spare } = this.field;
    const order = lineUp(anchor, normal, this.field, this.stripWidth);
    const before = chainsThrough(order, links, spare);
    let most = 0;
    for (const [, held] of before) most = Math.max(most, ...held);
    this.longest = Math.max(this.longest, most);
    if (most >= this.count) {
      const after = chainsThrough([...order].reverse(), links, spare);
      for (const at of order) {
        if ((before.get(at)?.[spare] ?? 0) + (after.get(at)?.[spare] ?? 0) - 1 >= this.count) this.breaking.add(at);
      }
    }
    return order.reduce((sum, at) => sum + 4 + (links[at]?.length ?? 0) * (spare + 1), 0);
  }
}

/** Half-way from one direction on to another at most half a turn further. */
function middleOf(from: Vector, to: Vector): Vector {
  const x = from.x + to.x;
  const y = from.y + to.y;
  const size = Math.sqrt(x * x + y * y);
  // Half a turn apart they have no middle by adding.
  return size > 1e-9 ? { x: x / size, y: y / size } : { x: -from.y, y: from.x };
}

/**
 * The longest line-up within any closed strip of `stripWidth` (µm, with half a rounding step), in any direction. A line-up holds in
 * a range of directions that ends where a place leaves the strip or two neighbours change order; between such directions nothing
 * changes, so one look between each two is enough, with the strip's lower border through each place in turn.
 */
export function longestAlignment(field: Alignable, stripWidth: number, count: number, stepsAllowed: number): AlignmentFinding {
  const search = new Search(field, stripWidth, count);
  let steps = 0;
  for (const part of hangingTogether(field.links)) {
    if (part.length === 1) search.longest = Math.max(search.longest, 1);
    if (part.length === 1) continue;
    for (const anchor of part) {
      const turns = turnsAbout(anchor, part, field, stripWidth);
      steps += 8 * turns.length;
      let gained = true;
      turns.forEach((turn, index) => {
        const next = turns[(index + 1) % turns.length];
        gained ||= turn.gains;
        // Until something is lost, what lines up only grows.
        if (!next || !gained || !next.loses || turn.at === next.at || steps > stepsAllowed) return;
        gained = false;
        steps += search.look(anchor, middleOf(turn.normal, next.normal));
      });
      if (turns.length === 0) steps += search.look(anchor, { x: 0, y: 1 });
      if (steps > stepsAllowed) return { longest: 0, breaking: search.breaking, finished: false };
    }
  }
  return { longest: search.longest, breaking: search.breaking, finished: true };
}

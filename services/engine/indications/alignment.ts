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
}

function turnAt(x: number, y: number): Turn {
  return { at: turnOf(x, y), normal: { x, y } };
}

const NEAR = 1e-3;

/**
 * Directions of the strip's normal at which, with its lower border through `anchor`, what it holds or the order of two linked
 * places along it changes.
 */
function turnsAbout(anchor: number, part: readonly number[], { places, links }: Alignable, stripWidth: number): Turn[] {
  const from = places[anchor] ?? { x: 0, y: 0 };
  const turns: Turn[] = [];
  const step = (position: number): Vector => {
    const place = places[position] ?? from;
    return { x: place.x - from.x, y: place.y - from.y };
  };
  for (const position of part) {
    const { x, y } = step(position);
    const size = Math.sqrt(x * x + y * y);
    if (size === 0) continue;
    const u = { x: x / size, y: y / size };
    turns.push(turnAt(-u.y, u.x), turnAt(u.y, -u.x));
    if (size >= stripWidth) {
      const cos = stripWidth / size;
      const sin = Math.sqrt(Math.max(0, (1 - cos) * (1 + cos)));
      turns.push(turnAt(u.x * cos - u.y * sin, u.y * cos + u.x * sin), turnAt(u.x * cos + u.y * sin, u.y * cos - u.x * sin));
    }
    for (const link of links[position] ?? []) {
      if (link.to < position) continue;
      const other = step(link.to);
      const gap = Math.sqrt((other.x - x) ** 2 + (other.y - y) ** 2);
      // Two places change their order where the normal points from one to the other: both must fit the width there.
      if (gap === 0 || gap > stripWidth) continue;
      for (const sign of [1, -1]) {
        const n = { x: (sign * (other.x - x)) / gap, y: (sign * (other.y - y)) / gap };
        const heights = [n.x * x + n.y * y, n.x * other.x + n.y * other.y];
        if (heights.every((height) => height > -NEAR && height < stripWidth + NEAR)) turns.push(turnAt(n.x, n.y));
      }
    }
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
      for (let index = 0; index < turns.length; index++) {
        const turn = turns[index];
        const next = turns[(index + 1) % turns.length];
        if (!turn || !next || turn.at === next.at) continue;
        const x = turn.normal.x + next.normal.x;
        const y = turn.normal.y + next.normal.y;
        const size = Math.sqrt(x * x + y * y);
        // Two turns half a circle apart have no middle by adding: turn the first by a quarter instead.
        steps += search.look(anchor, size > 1e-9 ? { x: x / size, y: y / size } : { x: -turn.normal.y, y: turn.normal.x });
        if (steps > stepsAllowed) return { longest: 0, breaking: search.breaking, finished: false };
      }
      if (turns.length === 0) steps += search.look(anchor, { x: 0, y: 1 });
    }
  }
  return { longest: search.longest, breaking: search.breaking, finished: true };
}

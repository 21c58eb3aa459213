import type { Alignable } from './alignable';
import type { Vector } from './geometry/points';
import { crossings, middleOf, swaps } from './strip-turns';
import type { Turn } from './strip-turns';

const NONE = -1;

/** Farther below than rounding could put it, µm. */
const NEAR = 1e-6;

/** Up to so many, links are also kept as a table. */
const TABLE_SIZE = 256;

/** Looks through the strips about the places of one part that hangs together; places go by their number in the part. */
export class StripSearch {
  longest = 1;
  private readonly count: number;
  private readonly breaking: Uint8Array;
  private readonly starts: Int32Array;
  private readonly ends: Int32Array;
  private readonly bridges: Int32Array;
  private readonly table: Int32Array | null;
  private readonly short: readonly (readonly [number, number])[];
  private readonly places: readonly Vector[];
  private readonly along: Float64Array;
  private readonly rank: Int32Array;
  private readonly before: Int32Array;
  private readonly after: Int32Array;
  private readonly layers: number;
  private found = 0;
  private order: number[] = [];

  constructor(
    private readonly part: readonly number[],
    field: Alignable,
    private readonly stripWidth: number,
    count: number,
  ) {
    const size = part.length;
    const numberOf = new Map(part.map((position, number) => [position, number]));
    const links = part.map((position) =>
      (field.links[position] ?? []).map(({ to, bridges }) => ({ to: numberOf.get(to) ?? 0, bridges })),
    );
    this.count = count;
    this.layers = field.spare + 1;
    this.places = part.map((position) => field.places[position] ?? { x: 0, y: 0 });
    this.breaking = new Uint8Array(size);
    this.starts = new Int32Array(size + 1);
    links.forEach((list, number) => (this.starts[number + 1] = (this.starts[number] ?? 0) + list.length));
    this.ends = Int32Array.from(links.flatMap((list) => list.map((link) => link.to)));
    this.bridges = Int32Array.from(links.flatMap((list) => list.map((link) => link.bridges)));
    this.table = size > TABLE_SIZE ? null : new Int32Array(size * size).fill(NONE);
    links.forEach((list, from) =>
      list.forEach(({ to, bridges }) => this.table?.fill(bridges, from * size + to, from * size + to + 1)),
    );
    this.short = links.flatMap((list, from) =>
      list.flatMap(({ to }) => (to > from && this.isShort(from, to) ? [[from, to] as const] : [])),
    );
    this.along = new Float64Array(size);
    this.rank = new Int32Array(size).fill(NONE);
    this.before = new Int32Array(size * this.layers);
    this.after = new Int32Array(size * this.layers);
  }

  private isShort(from: number, to: number): boolean {
    const step = this.stepOf(from, to);
    const gap = Math.sqrt(step.x * step.x + step.y * step.y);
    return gap > 0 && gap <= this.stripWidth;
  }

  private stepOf(from: number, to: number): Vector {
    const a = this.places[from] ?? { x: 0, y: 0 };
    const b = this.places[to] ?? a;
    return { x: b.x - a.x, y: b.y - a.y };
  }

  /** Nothing can be added any more: all of the part line up. */
  get exhausted(): boolean {
    return this.longest === this.part.length && (this.longest < this.count || this.found === this.part.length);
  }

  breakingPositions(): readonly number[] {
    return this.part.filter((_, number) => this.breaking[number] === 1);
  }

  /** Turns a strip with its lower border through one place once about it; answers the steps that took, ending early past `allowed`. */
  turnAbout(anchor: number, allowed: number): number {
    const steps = this.places.map((_, number) => this.stepOf(anchor, number));
    const turns: Turn[] = steps.flatMap((step, number) => [...crossings(step, number, this.stripWidth)]);
    for (const [one, other] of this.short) {
      turns.push(...swaps(steps[one] ?? { x: 0, y: 0 }, steps[other] ?? { x: 0, y: 0 }, this.stripWidth));
    }
    turns.sort((a, b) => a.at - b.at);
    let taken = 8 * turns.length + this.short.length;
    const last = turns[turns.length - 1];
    const first = turns[0];
    const start = last && first ? middleOf(last.normal, first.normal) : { x: 0, y: 1 };
    this.order = [];
    steps.forEach((step, number) => {
      const height = start.x * step.x + start.y * step.y;
      if (height >= 0 && height <= this.stripWidth) this.order.push(number);
    });
    if (!first) taken += this.look(anchor, start, steps);
    let gained = true;
    for (let index = 0; index < turns.length && taken <= allowed; index++) {
      const turn = turns[index];
      const next = turns[(index + 1) % turns.length];
      if (!turn || !next) break;
      this.apply(turn);
      gained ||= turn.change.kind !== 'leave';
      // Until something is lost, what lines up only grows.
      if (!gained || next.change.kind === 'enter' || turn.at === next.at) continue;
      gained = false;
      taken += this.look(anchor, middleOf(turn.normal, next.normal), steps);
    }
    return taken;
  }

  private apply({ change }: Turn): void {
    if (change.kind === 'swap') return;
    const place = this.order.indexOf(change.position);
    if (change.kind === 'enter' && place < 0) this.order.push(change.position);
    if (change.kind === 'leave' && place >= 0) this.order.splice(place, 1);
  }

  /** Looks at one strip; answers the steps that took. */
  private look(anchor: number, normal: Vector, steps: readonly Vector[]): number {
    const { order } = this;
    const settled = order.length < this.count || order.every((number) => this.breaking[number] === 1);
    if (order.length <= this.longest && settled) return 4 + order.length;
    if (this.slides(normal, steps)) return 2 * steps.length;
    for (const number of order) {
      const step = steps[number];
      if (step) this.along[number] = normal.y * step.x - normal.x * step.y;
    }
    this.sortOrder();
    const lined = this.table ? order : this.hangingOn(anchor);
    const most = this.chains(lined, this.before);
    this.longest = Math.max(this.longest, most);
    if (most >= this.count) {
      this.chains([...lined].reverse(), this.after);
      for (const number of lined) {
        const through =
          (this.before[(number + 1) * this.layers - 1] ?? 0) + (this.after[(number + 1) * this.layers - 1] ?? 0) - 1;
        if (through < this.count || this.breaking[number] === 1) continue;
        this.breaking[number] = 1;
        this.found++;
      }
    }
    return 2 * order.length + this.chainSteps(lined);
  }

  /** The strip may slide down to a place below it and lose nothing: what it holds is looked at from there. */
  private slides(normal: Vector, steps: readonly Vector[]): boolean {
    let top = 0;
    for (const number of this.order) {
      const step = steps[number];
      if (step) top = Math.max(top, normal.x * step.x + normal.y * step.y);
    }
    return steps.some((step) => {
      const height = normal.x * step.x + normal.y * step.y;
      return height < -NEAR && top - height <= this.stripWidth;
    });
  }

  /** Little changes from one strip to the next, so that inserting is quick. */
  private sortOrder(): void {
    const { order, along } = this;
    for (let index = 1; index < order.length; index++) {
      const number = order[index] ?? 0;
      const key = along[number] ?? 0;
      let place = index;
      for (; place > 0; place--) {
        const other = order[place - 1] ?? 0;
        const its = along[other] ?? 0;
        if (its < key || (its === key && other < number)) break;
        order[place] = other;
      }
      order[place] = number;
    }
  }

  /** Of the strip's places those that hang on the anchor by links within it, in order. */
  private hangingOn(anchor: number): number[] {
    const inside = new Set(this.order);
    const reached = new Set([anchor]);
    const open = [anchor];
    for (let at = open.pop(); at !== undefined; at = open.pop()) {
      for (let link = this.starts[at] ?? 0; link < (this.starts[at + 1] ?? 0); link++) {
        const to = this.ends[link] ?? 0;
        if (!inside.has(to) || reached.has(to)) continue;
        reached.add(to);
        open.push(to);
      }
    }
    return this.order.filter((number) => reached.has(number));
  }

  private linksOf(lined: readonly number[]): number {
    return lined.reduce((sum, number) => sum + (this.starts[number + 1] ?? 0) - (this.starts[number] ?? 0), 0);
  }

  private chainSteps(lined: readonly number[]): number {
    const links = this.linksOf(lined);
    return 2 * this.layers * (this.table ? Math.min(links, (lined.length * lined.length) / 2) : links);
  }

  /** For each place of a line-up the most that a chain may hold up to it, by how many bridges were used; answers the most of all. */
  private chains(lined: readonly number[], held: Int32Array): number {
    const { layers, table, part } = this;
    const byTable = table !== null && (lined.length * lined.length) / 2 < this.linksOf(lined);
    lined.forEach((number, place) => (this.rank[number] = place));
    let most = 0;
    lined.forEach((number, place) => {
      held.fill(1, number * layers, (number + 1) * layers);
      if (byTable && table) {
        for (let earlier = 0; earlier < place; earlier++) {
          const from = lined[earlier] ?? 0;
          const bridges = table[number * part.length + from] ?? NONE;
          if (bridges !== NONE) this.extend(held, from, number, bridges);
        }
      } else {
        for (let link = this.starts[number] ?? 0; link < (this.starts[number + 1] ?? 0); link++) {
          const from = this.ends[link] ?? 0;
          const rank = this.rank[from] ?? NONE;
          if (rank !== NONE && rank < place) this.extend(held, from, number, this.bridges[link] ?? 0);
        }
      }
      for (let layer = 0; layer < layers; layer++) most = Math.max(most, held[number * layers + layer] ?? 0);
    });
    for (const number of lined) this.rank[number] = NONE;
    return most;
  }

  private extend(held: Int32Array, from: number, to: number, bridges: number): void {
    const { layers } = this;
    for (let used = bridges; used < layers; used++) {
      const longer = (held[from * layers + used - bridges] ?? 0) + 1;
      if (longer > (held[to * layers + used] ?? 0)) held[to * layers + used] = longer;
    }
  }
}

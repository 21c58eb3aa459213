import { turnOf } from './geometry/points';

/** A place with what it weighs (1 when members are counted). */
export interface Weight {
  readonly x: number;
  readonly y: number;
  readonly weight: number;
}

/** The heaviest window, and every place that lies in some window heavier than allowed (positions in the list given). */
export interface WindowFinding {
  readonly most: number;
  readonly breaking: ReadonlySet<number>;
}

// An event's turn (0 to 4) and its number share one double, so that a plain numeric sort orders them: opening before closing.
const EVENT_BITS = 2 ** 52;

/** Closed arcs of a circle's centre, seen from one place on its border, from which the circle also holds other places. */
class Arcs {
  private readonly keys: Float64Array;
  private readonly owners: Int32Array;
  private readonly heavyBefore: Int32Array;
  private readonly numbers: number;
  private readonly scale: number;
  private readonly weights: Float64Array;
  private count = 0;

  constructor(
    places: readonly Weight[],
    private readonly breaking: Uint8Array,
  ) {
    this.weights = Float64Array.from(places, (place) => place.weight);
    // An arc over turn 0 is cut in two.
    const arcs = 2 * places.length;
    this.keys = new Float64Array(2 * arcs);
    this.owners = new Int32Array(arcs);
    this.heavyBefore = new Int32Array(arcs);
    this.numbers = 2 ** Math.ceil(Math.log2(2 * arcs + 1));
    this.scale = Math.floor(EVENT_BITS / this.numbers / 4);
  }

  clear(): void {
    this.count = 0;
  }

  private key(turn: number, event: number): number {
    return Math.floor(turn * this.scale) * this.numbers + event;
  }

  private add(start: number, end: number, owner: number): void {
    this.owners[this.count] = owner;
    this.keys[2 * this.count] = this.key(start, this.count);
    this.keys[2 * this.count + 1] = this.key(end, this.count + this.numbers / 2);
    this.count++;
  }

  /** The arc around a direction (unit vector) whose half-angle has this cosine. */
  addAround(x: number, y: number, cos: number, owner: number): void {
    const sin = Math.sqrt(Math.max(0, (1 - cos) * (1 + cos)));
    const start = turnOf(x * cos + y * sin, y * cos - x * sin);
    const end = turnOf(x * cos - y * sin, y * cos + x * sin);
    if (start <= end) this.add(start, end, owner);
    else {
      this.add(start, 4, owner);
      this.add(0, end, owner);
    }
  }

  /** The heaviest point of all arcs over a base weight; owners of arcs that hold a point heavier than allowed are breaking. */
  heaviest(base: number, allowed: number): number {
    const { numbers } = this;
    let weight = base;
    let most = base;
    let heavy = 0;
    for (const key of this.keys.subarray(0, 2 * this.count).sort()) {
      const event = key - Math.floor(key / numbers) * numbers;
      const arc = event < numbers / 2 ? event : event - numbers / 2;
      const owner = this.owners[arc] ?? 0;
      const own = this.weights[owner] ?? 0;
      if (event < numbers / 2) {
        this.heavyBefore[arc] = heavy;
        weight += own;
        if (weight > most) most = weight;
        if (weight > allowed) heavy++;
      } else {
        // Some opening since this one, or this one itself, was heavy.
        if (heavy > (this.heavyBefore[arc] ?? 0)) this.breaking[owner] = 1;
        weight -= own;
      }
    }
    return most;
  }
}

/** Coordinates side by side, sorted by y, for loops that look at every pair. */
interface Sorted {
  readonly xs: Float64Array;
  readonly ys: Float64Array;
  readonly weights: Float64Array;
  /** The position of each in the list given. */
  readonly positions: Int32Array;
}

function sortedByY(places: readonly Weight[]): Sorted {
  const positions = Int32Array.from(places.keys()).sort((a, b) => (places[a]?.y ?? 0) - (places[b]?.y ?? 0));
  const of = (key: 'x' | 'y' | 'weight') => Float64Array.from(positions, (position) => places[position]?.[key] ?? 0);
  return { xs: of('x'), ys: of('y'), weights: of('weight'), positions };
}

function numbersOf(marked: Uint8Array): ReadonlySet<number> {
  return new Set([...marked.keys()].filter((number) => marked[number] === 1));
}

/** Any circle may be shifted until a place it holds lies on its border, so circles through each place in turn are enough. */
function heaviestCircle(places: readonly Weight[], diameter: number, allowed: number): WindowFinding {
  const breaking = new Uint8Array(places.length);
  const { xs, ys, weights, positions } = sortedByY(places);
  const arcs = new Arcs(places, breaking);
  let most = 0;
  let first = 0;
  for (let from = 0; from < xs.length; from++) {
    const fromX = xs[from] ?? 0;
    const fromY = ys[from] ?? 0;
    const here: number[] = [];
    let base = 0;
    arcs.clear();
    while (fromY - (ys[first] ?? fromY) > diameter) first++;
    for (let at = first; at < xs.length; at++) {
      const x = (xs[at] ?? 0) - fromX;
      const y = (ys[at] ?? 0) - fromY;
      if (y > diameter) break;
      const square = x * x + y * y;
      if (square === 0) {
        here.push(positions[at] ?? 0);
        base += weights[at] ?? 0;
        continue;
      }
      const distance = Math.sqrt(square);
      if (distance <= diameter) arcs.addAround(x / distance, y / distance, distance / diameter, positions[at] ?? 0);
    }
    const found = arcs.heaviest(base, allowed);
    most = Math.max(most, found);
    if (found > allowed) for (const position of here) breaking[position] = 1;
  }
  return { most, breaking: numbersOf(breaking) };
}

/** Any square may be shifted until its left and bottom sides each hold a place. */
function heaviestSquare(places: readonly Weight[], side: number, allowed: number): WindowFinding {
  const breaking = new Uint8Array(places.length);
  const { xs, ys, weights, positions } = sortedByY(places);
  const column = new Int32Array(xs.length);
  let most = 0;
  for (const left of xs) {
    let count = 0;
    for (let at = 0; at < xs.length; at++) {
      const x = (xs[at] ?? 0) - left;
      if (x >= 0 && x <= side) column[count++] = at;
    }
    let weight = 0;
    let above = 0;
    let marked = 0;
    for (let index = 0; index < count; index++) {
      const bottom = column[index] ?? 0;
      const bottomY = ys[bottom] ?? 0;
      for (; above < count && (ys[column[above] ?? 0] ?? 0) - bottomY <= side; above++)
        weight += weights[column[above] ?? 0] ?? 0;
      if (weight > most) most = weight;
      if (weight > allowed) {
        for (marked = Math.max(marked, index); marked < above; marked++) breaking[positions[column[marked] ?? 0] ?? 0] = 1;
      }
      weight -= weights[bottom] ?? 0;
    }
  }
  return { most, breaking: numbersOf(breaking) };
}

/**
 * The heaviest closed circle of a diameter, or axis-parallel square of a side, put anywhere: exact, since only windows with a place
 * on their border are looked at and all of them are. `size` in the places' unit; it carries half a rounding step, so that what is
 * on the border is held.
 */
export function heaviestWindow(
  places: readonly Weight[],
  shape: 'circle' | 'square',
  size: number,
  allowed: number,
): WindowFinding {
  return shape === 'circle' ? heaviestCircle(places, size, allowed) : heaviestSquare(places, size, allowed);
}

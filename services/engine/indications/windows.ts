import type { Vector } from './geometry/points';
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

interface Span {
  readonly start: number;
  readonly end: number;
  readonly position: number;
  readonly weight: number;
}

/**
 * Sweeps closed spans along a line, `always` weighing everywhere: the heaviest point, and the spans that hold some point heavier
 * than allowed.
 */
function sweep(spans: readonly Span[], always: number, allowed: number): { most: number; breaking: readonly number[] } {
  const events = spans.flatMap((span, index) => [
    { at: span.start, opens: true, index, weight: span.weight },
    { at: span.end, opens: false, index, weight: span.weight },
  ]);
  // What ends where another starts still holds that point.
  events.sort((a, b) => a.at - b.at || Number(b.opens) - Number(a.opens));
  let weight = always;
  let most = always;
  let heavy = 0;
  const heavyBefore: number[] = spans.map(() => 0);
  const breaking: number[] = [];
  for (const event of events) {
    if (event.opens) {
      heavyBefore[event.index] = heavy;
      weight += event.weight;
      most = Math.max(most, weight);
      if (weight > allowed) heavy++;
    } else {
      // Heavy now, or heavy at some opening since this span opened.
      const span = spans[event.index];
      if (span && heavy > (heavyBefore[event.index] ?? 0)) breaking.push(span.position);
      weight -= event.weight;
    }
  }
  return { most, breaking };
}

/** Some window may always be shifted until a place it holds lies on its border; so windows through each place are enough. */
function circlesThrough(places: readonly Weight[], at: number, radius: number): { spans: Span[]; always: number[] } {
  const from = places[at];
  const spans: Span[] = [];
  const always: number[] = [at];
  if (!from) return { spans, always };
  places.forEach((place, position) => {
    if (position === at) return;
    const dx = place.x - from.x;
    const dy = place.y - from.y;
    if (Math.abs(dx) > 2 * radius || Math.abs(dy) > 2 * radius) return;
    const distance = Math.sqrt(dx * dx + dy * dy);
    if (distance === 0) always.push(position);
    else if (distance <= 2 * radius)
      spans.push(...arcSpans({ x: dx / distance, y: dy / distance }, distance / (2 * radius), position, place.weight));
  });
  return { spans, always };
}

/** Centres seen from a place on the circle's border, from which the circle also holds another place: one arc, cut at turn 0. */
function arcSpans(towards: Vector, cos: number, position: number, weight: number): Span[] {
  const sin = Math.sqrt(Math.max(0, (1 - cos) * (1 + cos)));
  const start = turnOf(towards.x * cos + towards.y * sin, towards.y * cos - towards.x * sin);
  const end = turnOf(towards.x * cos - towards.y * sin, towards.y * cos + towards.x * sin);
  if (start <= end) return [{ start, end, position, weight }];
  return [
    { start, end: 4, position, weight },
    { start: 0, end, position, weight },
  ];
}

function heaviestCircle(places: readonly Weight[], diameter: number, allowed: number): WindowFinding {
  const breaking = new Set<number>();
  let most = 0;
  places.forEach((_, at) => {
    const { spans, always } = circlesThrough(places, at, diameter / 2);
    const base = always.reduce((sum, position) => sum + (places[position]?.weight ?? 0), 0);
    const found = sweep(spans, base, allowed);
    most = Math.max(most, found.most);
    if (found.most > allowed) for (const position of [...always, ...found.breaking]) breaking.add(position);
  });
  return { most, breaking };
}

function heaviestSquare(places: readonly Weight[], side: number, allowed: number): WindowFinding {
  const breaking = new Set<number>();
  let most = 0;
  for (const left of places) {
    const spans: Span[] = [];
    places.forEach((place, position) => {
      const dx = place.x - left.x;
      // The bottoms of squares of this left side that hold the place.
      if (dx >= 0 && dx <= side) spans.push({ start: place.y - side, end: place.y, position, weight: place.weight });
    });
    const found = sweep(spans, 0, allowed);
    most = Math.max(most, found.most);
    for (const position of found.breaking) breaking.add(position);
  }
  return { most, breaking };
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

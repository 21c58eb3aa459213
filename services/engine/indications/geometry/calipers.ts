import type { PointUm } from '../../evaluate/types';
import { convexHull } from './convex-hull';
import { extremeOf, farthestFromPoint, reachOf } from './ellipse';
import type { Ellipse } from './ellipse';
import type { Outline } from './outline';
import { directionBetween, distanceBetween, unitVector } from './points';
import type { Vector } from './points';

/** The convex pieces whose hull is an outline's hull: circles (a corner has radius 0) and ellipses. */
export interface Piece {
  readonly center: PointUm;
  readonly radius: number;
  readonly ellipse: Ellipse | null;
}

/** Pieces of one outline, corners of its hull only. */
export function piecesOf(outline: Outline): readonly Piece[] {
  if (outline.kind === 'ellipse') {
    const { ellipse } = outline;
    return [{ center: ellipse.center, radius: Math.max(ellipse.a, ellipse.b), ellipse }];
  }
  return convexHull(outline.points).map((center) => ({ center, radius: outline.radius, ellipse: null }));
}

/** Pieces without those that lie inside the hull of others of the same radius. */
export function thinned(pieces: readonly Piece[]): readonly Piece[] {
  if (pieces.length < 64) return pieces;
  const byRadius = new Map<number, PointUm[]>();
  for (const piece of pieces) {
    if (piece.ellipse) continue;
    const same = byRadius.get(piece.radius);
    if (same) same.push(piece.center);
    else byRadius.set(piece.radius, [piece.center]);
  }
  const kept = pieces.filter((piece) => piece.ellipse);
  for (const [radius, centers] of byRadius) {
    for (const center of convexHull(centers)) kept.push({ center, radius, ellipse: null });
  }
  return kept;
}

interface Cell {
  readonly from: Vector;
  readonly to: Vector;
  readonly atFrom: number;
  readonly atTo: number;
  readonly depth: number;
}

/** An upper bound of a support function between two directions: the corner of its two tangents, where it lies between them. */
function tangentBound({ from, to, atFrom, atTo }: Cell): number {
  const cos = from.x * to.x + from.y * to.y;
  const sin = from.x * to.y - from.y * to.x;
  if (atFrom * cos >= atTo) return atFrom;
  if (atTo * cos >= atFrom) return atTo;
  return Math.sqrt(Math.max(0, atFrom * atFrom + atTo * atTo - 2 * atFrom * atTo * cos)) / sin;
}

const FINEST = 8;

/**
 * The largest distance from a point of one ellipse to a point of another, µm, or `known` when that is larger. Along direction n
 * the far sides are n·D + h₁(n) + h₂(n) apart; its largest value is the answer. Arcs that cannot hold it are dropped, the
 * smallest are searched by halving.
 */
function ellipsesFarthest(one: Ellipse, other: Ellipse, known: number): number {
  const dx = other.center[0] - one.center[0];
  const dy = other.center[1] - one.center[1];
  const spanAt = (n: Vector) => n.x * dx + n.y * dy + reachOf(one, n) + reachOf(other, n);
  const growthAt = (n: Vector) => {
    const a = extremeOf(one, n);
    const b = extremeOf(other, n);
    return (dy + a.y + b.y) * n.x - (dx + a.x + b.x) * n.y;
  };
  let best = known;
  const cells: Cell[] = [];
  const open = (from: Vector, to: Vector, atFrom: number, atTo: number, depth: number) => {
    best = Math.max(best, atFrom, atTo);
    cells.push({ from, to, atFrom, atTo, depth });
  };
  const middle = dx === 0 && dy === 0 ? { x: 1, y: 0 } : unitVector(dx, dy);
  let from: Vector = { x: middle.y, y: -middle.x };
  const to: Vector = { x: -middle.y, y: middle.x };
  const fan = [unitVector(from.x + middle.x, from.y + middle.y), middle, unitVector(to.x + middle.x, to.y + middle.y), to];
  for (const next of fan) {
    open(from, next, spanAt(from), spanAt(next), 0);
    from = next;
  }
  for (let cell = cells.pop(); cell; cell = cells.pop()) {
    if (tangentBound(cell) <= best + 1e-9) continue;
    if (cell.depth < FINEST) {
      const half = directionBetween(cell.from, cell.to);
      const atHalf = spanAt(half);
      open(cell.from, half, cell.atFrom, atHalf, cell.depth + 1);
      open(half, cell.to, atHalf, cell.atTo, cell.depth + 1);
    } else if (growthAt(cell.from) > 0 && growthAt(cell.to) < 0) {
      let low = cell.from;
      let high = cell.to;
      for (let step = 0; step < 40; step++) {
        const half = directionBetween(low, high);
        if (growthAt(half) > 0) low = half;
        else high = half;
      }
      best = Math.max(best, spanAt(low));
    }
  }
  return best;
}

/** The largest distance between a point of one set of pieces and a point of another, µm, or `known` when that is larger. */
export function farthestBetween(some: readonly Piece[], others: readonly Piece[], known: number): number {
  let best = known;
  for (const a of some) {
    for (const b of others) {
      const most = distanceBetween(a.center, b.center) + a.radius + b.radius;
      if (most <= best) continue;
      if (a.ellipse && b.ellipse) best = ellipsesFarthest(a.ellipse, b.ellipse, best);
      else if (a.ellipse) best = Math.max(best, farthestFromPoint(a.ellipse, b.center) + b.radius);
      else if (b.ellipse) best = Math.max(best, farthestFromPoint(b.ellipse, a.center) + a.radius);
      else best = most;
    }
  }
  return best;
}

function pieceExtreme(piece: Piece, n: Vector): Vector {
  return piece.ellipse ? extremeOf(piece.ellipse, n) : { x: n.x * piece.radius, y: n.y * piece.radius };
}

/** The widest span of the pieces along n, as the vector between its two extreme points. */
function spanVector(pieces: readonly Piece[], origin: PointUm, n: Vector): Vector {
  let top: Piece | undefined;
  let bottom: Piece | undefined;
  let most = -Infinity;
  let least = Infinity;
  for (const piece of pieces) {
    const middle = n.x * (piece.center[0] - origin[0]) + n.y * (piece.center[1] - origin[1]);
    const reach = piece.ellipse ? reachOf(piece.ellipse, n) : piece.radius;
    if (middle + reach > most) [most, top] = [middle + reach, piece];
    if (middle - reach < least) [least, bottom] = [middle - reach, piece];
  }
  if (!top || !bottom) return { x: 0, y: 0 };
  const high = pieceExtreme(top, n);
  const low = pieceExtreme(bottom, n);
  return { x: top.center[0] - bottom.center[0] + high.x + low.x, y: top.center[1] - bottom.center[1] + high.y + low.y };
}

const WIDTH_TOLERANCE_UM = 1e-4;

/**
 * The least caliper width of the hull of pieces, µm, never too small and at most 0.0001 µm too large. Between two directions the
 * width is at least the distance of the chord between their span vectors from the origin; arcs that cannot hold less are dropped.
 */
export function leastWidth(pieces: readonly Piece[]): number {
  const origin = pieces[0]?.center ?? [0, 0];
  interface Arc {
    readonly from: Vector;
    readonly to: Vector;
    readonly atFrom: Vector;
    readonly atTo: Vector;
  }
  const along = (n: Vector, v: Vector) => n.x * v.x + n.y * v.y;
  const fan: Vector[] = [{ x: 1, y: 0 }];
  for (const step of [unitVector(1, 1), { x: 0, y: 1 }, unitVector(-1, 1), { x: -1, y: 0 }]) fan.push(step);
  const arcs: Arc[] = [];
  let best = Infinity;
  const open = (from: Vector, to: Vector, atFrom: Vector, atTo: Vector) => {
    best = Math.min(best, along(from, atFrom), along(to, atTo));
    arcs.push({ from, to, atFrom, atTo });
  };
  for (let index = 1; index < fan.length; index++) {
    const from = fan[index - 1] ?? { x: 1, y: 0 };
    const to = fan[index] ?? { x: 1, y: 0 };
    open(from, to, spanVector(pieces, origin, from), spanVector(pieces, origin, to));
  }
  for (let arc = arcs.pop(); arc; arc = arcs.pop()) {
    const { from, to, atFrom, atTo } = arc;
    const chord = { x: atTo.x - atFrom.x, y: atTo.y - atFrom.y };
    const size = Math.sqrt(chord.x * chord.x + chord.y * chord.y);
    if (size === 0) continue;
    // Of the two normals of the chord, the one seen from the origin of the span vectors.
    const turned = unitVector(chord.y, -chord.x);
    const normal = along(turned, atFrom) < 0 ? { x: -turned.x, y: -turned.y } : turned;
    const inside = from.x * normal.y - from.y * normal.x > 0 && normal.x * to.y - normal.y * to.x > 0;
    if (!inside || along(normal, atFrom) >= best - WIDTH_TOLERANCE_UM) continue;
    const half = directionBetween(from, to);
    for (const split of [normal, half]) best = Math.min(best, along(split, spanVector(pieces, origin, split)));
    const atHalf = spanVector(pieces, origin, half);
    open(from, half, atFrom, atHalf);
    open(half, to, atHalf, atTo);
  }
  return best;
}

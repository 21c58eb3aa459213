import type { PointUm } from '../evaluate/types';
import { roundLength, type Nanometres } from './exact-length';
import { distinctPoints, outlineOf, support, type DrawnShape, type Outline } from './outline';
import { best } from './search-direction';

/** Largest and least caliper diameter in whole nanometres. */
export interface Calipers {
  readonly length: Nanometres;
  readonly width: Nanometres;
}

function farthest(one: Outline, other: Outline): number {
  const dx = other.origin[0] - one.origin[0];
  const dy = other.origin[1] - one.origin[1];
  if (one.ellipse || other.ellipse) return best((cos, sin) => support(one, cos, sin, 0, 0) + support(other, -cos, -sin, dx, dy));
  let most = 0;
  for (const a of one.capsules) {
    for (const p of [a.from, a.to]) {
      for (const b of other.capsules) {
        for (const q of [b.from, b.to])
          most = Math.max(most, Math.hypot(q[0] + dx - p[0], q[1] + dy - p[1]) + a.radius + b.radius);
      }
    }
  }
  return most;
}

/** Least distance of two parallel lines that hold the polygon: one of them lies on an edge of its hull. */
function polygonWidth(points: readonly PointUm[]): number {
  const corners = distinctPoints(points, true);
  let least = Infinity;
  for (const a of corners) {
    for (const b of corners) {
      const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
      if (dx === 0 && dy === 0) continue;
      let [low, high] = [0, 0];
      for (const p of corners) {
        const away = dx * (p[1] - a[1]) - dy * (p[0] - a[0]);
        low = Math.min(low, away);
        high = Math.max(high, away);
      }
      if (low < 0 && high > 0) continue;
      least = Math.min(least, (high - low) / Math.hypot(dx, dy));
    }
  }
  return least === Infinity ? 0 : least;
}

/** L and W of one drawn shape; a polyline's W is its stated width, so that a bent crack stays a line. */
export function calipersOf(shape: DrawnShape): Calipers {
  if (shape.kind === 'circle') return { length: shape.diameter * 1000, width: shape.diameter * 1000 };
  if (shape.kind === 'ellipse') return { length: Math.max(...shape.axes) * 1000, width: Math.min(...shape.axes) * 1000 };
  const outline = outlineOf(shape);
  const length = roundLength(farthest(outline, outline));
  return { length, width: shape.kind === 'polyline' ? shape.width * 1000 : roundLength(polygonWidth(shape.points)) };
}

/** Calipers of the union of several outlines. */
export function calipersOfUnion(outlines: readonly Outline[]): Calipers {
  const [first] = outlines;
  if (!first) return { length: 0, width: 0 };
  let length = 0;
  for (const [at, one] of outlines.entries())
    for (const other of outlines.slice(at)) length = Math.max(length, farthest(one, other));
  const extent = (cos: number, sin: number) =>
    Math.max(...outlines.map((one) => support(one, cos, sin, one.origin[0] - first.origin[0], one.origin[1] - first.origin[1])));
  const width = -best((cos, sin) => -(extent(cos, sin) + extent(-cos, -sin)));
  return { length: roundLength(length), width: roundLength(width) };
}

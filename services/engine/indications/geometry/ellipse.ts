import type { PointUm } from '../../evaluate/types';
import { directionBetween, unitVector } from './points';
import type { Vector } from './points';

/** A filled ellipse: semi-axes a along (cos, sin) and b across it, µm. */
export interface Ellipse {
  readonly center: PointUm;
  readonly a: number;
  readonly b: number;
  readonly cos: number;
  readonly sin: number;
}

const SERIES_TERMS = 12;

/** Sine and cosine of an angle in degrees from + − × ÷ only; a quarter turn more only swaps them. */
function sineAndCosine(angleDeg: number): { sin: number; cos: number } {
  const turned = angleDeg % 360;
  const quarters = Math.round(turned / 90);
  const x = ((turned - quarters * 90) * Math.PI) / 180;
  let sin = 0;
  let cos = 0;
  for (let term = SERIES_TERMS; term > 0; term--) {
    sin = 1 - ((x * x) / (2 * term * (2 * term + 1))) * (term === SERIES_TERMS ? 1 : sin);
    cos = 1 - ((x * x) / ((2 * term - 1) * (2 * term))) * (term === SERIES_TERMS ? 1 : cos);
  }
  sin *= x;
  switch (((quarters % 4) + 4) % 4) {
    case 1:
      return { sin: cos, cos: -sin };
    case 2:
      return { sin: -sin, cos: -cos };
    case 3:
      return { sin: -cos, cos: sin };
    default:
      return { sin, cos };
  }
}

/** An ellipse from its full axes (the first along `angleDeg` from +x towards +y). */
export function ellipseOf(center: PointUm, axesUm: readonly [number, number], angleDeg: number): Ellipse {
  return { center, a: axesUm[0] / 2, b: axesUm[1] / 2, ...sineAndCosine(angleDeg) };
}

/** How far the ellipse reaches from its centre in a direction. */
export function reachOf(ellipse: Ellipse, n: Vector): number {
  const along = ellipse.a * (n.x * ellipse.cos + n.y * ellipse.sin);
  const across = ellipse.b * (n.y * ellipse.cos - n.x * ellipse.sin);
  return Math.sqrt(along * along + across * across);
}

/** The point of the ellipse that lies farthest in a direction, from its centre. */
export function extremeOf(ellipse: Ellipse, n: Vector): Vector {
  const along = ellipse.a * (n.x * ellipse.cos + n.y * ellipse.sin);
  const across = ellipse.b * (n.y * ellipse.cos - n.x * ellipse.sin);
  const reach = Math.sqrt(along * along + across * across);
  const u = (ellipse.a * along) / reach;
  const v = (ellipse.b * across) / reach;
  return { x: u * ellipse.cos - v * ellipse.sin, y: u * ellipse.sin + v * ellipse.cos };
}

/** A difference to the centre in the ellipse's own axes. */
function inAxes(ellipse: Ellipse, dx: number, dy: number): Vector {
  return { x: dx * ellipse.cos + dy * ellipse.sin, y: dy * ellipse.cos - dx * ellipse.sin };
}

/** The nearest point of a filled ellipse on its axes to (x, y) with the distance; the point itself and 0 when it lies inside. */
function nearestOnAxes(a: number, b: number, x: number, y: number): { x: number; y: number; distance: number } {
  const px = Math.abs(x);
  const py = Math.abs(y);
  if ((px / a) ** 2 + (py / b) ** 2 <= 1) return { x, y, distance: 0 };
  // Newton from the left on a falling convex function never passes its root (the Lagrange multiplier of the nearest point).
  let t = Math.max(0, a * px - a * a, b * py - b * b);
  for (let step = 0; step < 200; step++) {
    const u = (a * px) / (t + a * a);
    const v = (b * py) / (t + b * b);
    const value = u * u + v * v - 1;
    const next = t + value / (2 * ((u * u) / (t + a * a) + (v * v) / (t + b * b)));
    if (!(next > t)) break;
    t = next;
  }
  const u = px / (t + a * a);
  const v = py / (t + b * b);
  return { x: Math.sign(x) * a * a * u, y: Math.sign(y) * b * b * v, distance: t * Math.sqrt(u * u + v * v) };
}

/** Distance of a point from a filled ellipse, µm. */
export function ellipseToPoint(ellipse: Ellipse, point: PointUm): number {
  const { x, y } = inAxes(ellipse, point[0] - ellipse.center[0], point[1] - ellipse.center[1]);
  return nearestOnAxes(ellipse.a, ellipse.b, x, y).distance;
}

/** Distance of a segment from a filled ellipse, µm. */
export function ellipseToSegment(ellipse: Ellipse, p: PointUm, q: PointUm): number {
  const { a, b, center } = ellipse;
  const start = inAxes(ellipse, p[0] - center[0], p[1] - center[1]);
  const end = inAxes(ellipse, q[0] - center[0], q[1] - center[1]);
  const e = { x: end.x - start.x, y: end.y - start.y };
  const square = e.x * e.x + e.y * e.y;
  const ends = Math.min(nearestOnAxes(a, b, start.x, start.y).distance, nearestOnAxes(a, b, end.x, end.y).distance);
  if (square === 0 || ends === 0) return ends;
  const length = Math.sqrt(square);
  const side = e.x * start.y - e.y * start.x >= 0 ? 1 : -1;
  const n = { x: (-e.y / length) * side, y: (e.x / length) * side };
  const reach = Math.sqrt((a * n.x) ** 2 + (b * n.y) ** 2);
  const lineDistance = n.x * start.x + n.y * start.y - reach;
  if (lineDistance <= 0) {
    // The line meets the ellipse: seen with the ellipse drawn as the unit circle, is the segment's nearest point inside?
    const ex = e.x / a;
    const ey = e.y / b;
    const part = Math.min(1, Math.max(0, -((start.x / a) * ex + (start.y / b) * ey) / (ex * ex + ey * ey)));
    const x = start.x / a + part * ex;
    const y = start.y / b + part * ey;
    return x * x + y * y <= 1 ? 0 : ends;
  }
  const touch = { x: (a * a * n.x) / reach, y: (b * b * n.y) / reach };
  const foot = ((touch.x - start.x) * e.x + (touch.y - start.y) * e.y) / square;
  return foot >= 0 && foot <= 1 ? lineDistance : ends;
}

/** How far apart two ellipses are seen along n, and how that grows as n turns towards +90°. */
function gapAlong(one: Ellipse, other: Ellipse, n: Vector): { gap: number; growth: number } {
  const dx = other.center[0] - one.center[0];
  const dy = other.center[1] - one.center[1];
  const from = extremeOf(one, n);
  const to = extremeOf(other, n);
  const x = dx - from.x - to.x;
  const y = dy - from.y - to.y;
  return { gap: n.x * dx + n.y * dy - reachOf(one, n) - reachOf(other, n), growth: y * n.x - x * n.y };
}

/** A direction along which two ellipses lie apart, or null when they touch or overlap. */
function partingDirection(one: Ellipse, other: Ellipse): Vector | null {
  // Drawn so that the first is the unit circle, the other is an ellipse again: p = M q with q on the unit circle.
  const offset = inAxes(one, other.center[0] - one.center[0], other.center[1] - one.center[1]);
  const turnCos = one.cos * other.cos + one.sin * other.sin;
  const turnSin = one.cos * other.sin - one.sin * other.cos;
  const m = {
    xx: (turnCos * other.a) / one.a,
    xy: (-turnSin * other.b) / one.a,
    yx: (turnSin * other.a) / one.b,
    yy: (turnCos * other.b) / one.b,
  };
  const half = (m.xx * m.xx + m.xy * m.xy - m.yx * m.yx - m.yy * m.yy) / 2;
  const cross = m.xx * m.yx + m.xy * m.yy;
  const mean = (m.xx * m.xx + m.xy * m.xy + m.yx * m.yx + m.yy * m.yy) / 2;
  const spread = Math.sqrt(half * half + cross * cross);
  const axis = spread === 0 ? { x: 1, y: 0 } : half >= 0 ? unitVector(spread + half, cross) : unitVector(cross, spread - half);
  const major = Math.sqrt(mean + spread);
  const minor = Math.abs(m.xx * m.yy - m.xy * m.yx) / major;
  const x = -offset.x / one.a;
  const y = -offset.y / one.b;
  const seen = { x: x * axis.x + y * axis.y, y: y * axis.x - x * axis.y };
  const nearest = nearestOnAxes(major, minor, seen.x, seen.y);
  if (nearest.distance <= 1) return null;
  const away = { x: nearest.x - seen.x, y: nearest.y - seen.y };
  const drawn = { x: (away.x * axis.x - away.y * axis.y) / one.a, y: (away.x * axis.y + away.y * axis.x) / one.b };
  return unitVector(drawn.x * one.cos - drawn.y * one.sin, drawn.x * one.sin + drawn.y * one.cos);
}

/**
 * Distance between two filled ellipses, µm: the largest gap seen along any direction. Where the gap is positive it has one
 * maximum only (its sets above a level are convex cones), so halving the angle finds it.
 */
export function ellipseToEllipse(one: Ellipse, other: Ellipse): number {
  const start = partingDirection(one, other);
  if (start === null) return 0;
  const first = gapAlong(one, other, start);
  if (first.gap <= 0) return 0;
  const turn = first.growth >= 0 ? 1 : -1;
  const rises = (n: Vector) => {
    const seen = gapAlong(one, other, n);
    return seen.gap > 0 && seen.growth * turn > 0;
  };
  const quarter = (n: Vector): Vector => ({ x: -n.y * turn, y: n.x * turn });
  let low = start;
  let high = quarter(start);
  if (rises(high)) [low, high] = [high, quarter(high)];
  for (let step = 0; step < 56; step++) {
    const middle = directionBetween(low, high);
    if (rises(middle)) low = middle;
    else high = middle;
  }
  return Math.max(first.gap, gapAlong(one, other, low).gap);
}

/** The largest distance from a point to a point of the ellipse, µm; it lies in the quadrant across, where it is the only maximum. */
export function farthestFromPoint(ellipse: Ellipse, point: PointUm): number {
  const seen = inAxes(ellipse, point[0] - ellipse.center[0], point[1] - ellipse.center[1]);
  const { a, b } = ellipse;
  const px = Math.abs(seen.x);
  const py = Math.abs(seen.y);
  let low: Vector = { x: 1, y: 0 };
  let high: Vector = { x: 0, y: 1 };
  for (let step = 0; step < 56; step++) {
    const m = directionBetween(low, high);
    if (-a * px * m.y + b * py * m.x + (b * b - a * a) * m.x * m.y > 0) low = m;
    else high = m;
  }
  return [low, high].reduce((most, m) => Math.max(most, Math.sqrt((px + a * m.x) ** 2 + (py + b * m.y) ** 2)), 0);
}

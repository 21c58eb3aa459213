import { best, type Turning } from './search-direction';
import { roundLength, type Nanometres } from './exact-length';
import { support, type Capsule, type Outline } from './outline';

type Place = readonly [number, number];

/** Twice the signed area of a, b, c; exact: coordinates are whole numbers below 2^28, products are summed as BigInt when large. */
function side(a: Place, b: Place, c: Place): number {
  const [ux, uy, vx, vy] = [b[0] - a[0], b[1] - a[1], c[0] - a[0], c[1] - a[1]];
  const value = ux * vy - uy * vx;
  if (Math.abs(value) > 64 || !Number.isInteger(ux + uy + vx + vy)) return value;
  const exact = BigInt(ux) * BigInt(vy) - BigInt(uy) * BigInt(vx);
  return exact > 0n ? 1 : exact < 0n ? -1 : 0;
}

function pointToSegment(p: Place, a: Place, b: Place): number {
  const [dx, dy] = [b[0] - a[0], b[1] - a[1]];
  const squared = dx * dx + dy * dy;
  if (squared === 0) return Math.hypot(p[0] - a[0], p[1] - a[1]);
  const along = ((p[0] - a[0]) * dx + (p[1] - a[1]) * dy) / squared;
  if (along <= 0) return Math.hypot(p[0] - a[0], p[1] - a[1]);
  if (along >= 1) return Math.hypot(p[0] - b[0], p[1] - b[1]);
  return Math.abs((p[0] - a[0]) * dy - (p[1] - a[1]) * dx) / Math.sqrt(squared);
}

function segmentsCross(a: Place, b: Place, c: Place, d: Place): boolean {
  const [s1, s2, s3, s4] = [side(a, b, c), side(a, b, d), side(c, d, a), side(c, d, b)];
  return ((s1 > 0 && s2 < 0) || (s1 < 0 && s2 > 0)) && ((s3 > 0 && s4 < 0) || (s3 < 0 && s4 > 0));
}

function moved([x, y]: Place, dx: number, dy: number): Place {
  return [x + dx, y + dy];
}

function capsuleDistance(one: Capsule, other: Capsule, dx: number, dy: number): number {
  const [c, d] = [moved(other.from, dx, dy), moved(other.to, dx, dy)];
  if (segmentsCross(one.from, one.to, c, d)) return 0;
  const apart = Math.min(
    pointToSegment(one.from, c, d),
    pointToSegment(one.to, c, d),
    pointToSegment(c, one.from, one.to),
    pointToSegment(d, one.from, one.to),
  );
  return Math.max(0, apart - one.radius - other.radius);
}

/** Is the place inside the filled polygon or on its border? Winding by exact sides. */
export function isInside(p: Place, corners: readonly Place[]): boolean {
  let winding = 0;
  for (const [at, a] of corners.entries()) {
    const b = corners[(at + 1) % corners.length] ?? a;
    if (pointToSegment(p, a, b) === 0) return true;
    if (a[1] <= p[1] && b[1] > p[1] && side(a, b, p) > 0) winding += 1;
    if (a[1] > p[1] && b[1] <= p[1] && side(a, b, p) < 0) winding -= 1;
  }
  return winding !== 0;
}

/** A place of the outline, relative to its origin: if it is inside the other and the borders don't meet, all of it is. */
function anyPlace(outline: Outline): Place {
  return outline.capsules[0]?.from ?? [0, 0];
}

/** Distance of two convex outlines, one of them an ellipse, by the best separating direction; 0 when they meet. */
function convexDistance(one: Outline, other: Outline, dx: number, dy: number): number {
  const gap: Turning = (cos, sin) => -support(one, cos, sin, 0, 0) - support(other, -cos, -sin, dx, dy);
  return Math.max(0, best(gap));
}

function pieces(outline: Outline): Outline[] {
  if (outline.ellipse) return [outline];
  return outline.capsules.map((capsule) => ({ ...outline, capsules: [capsule], filled: [] }));
}

function boxGap(one: Outline, other: Outline, dx: number, dy: number): number {
  const right = -support(other, -1, 0, dx, dy) - support(one, 1, 0, 0, 0);
  const left = -support(one, -1, 0, 0, 0) - support(other, 1, 0, dx, dy);
  const up = -support(other, 0, -1, dx, dy) - support(one, 0, 1, 0, 0);
  const down = -support(one, 0, -1, 0, 0) - support(other, 0, 1, dx, dy);
  return Math.hypot(Math.max(0, right, left), Math.max(0, up, down));
}

/** The least distance that the outlines' boxes allow, in µm; a cheap lower bound of `separation`. */
export function leastPossible(one: Outline, other: Outline): number {
  return boxGap(one, other, other.origin[0] - one.origin[0], other.origin[1] - one.origin[1]);
}

/** Edge-to-edge distance of two filled outlines in whole nanometres; 0 when they touch, overlap or one holds the other. */
export function separation(one: Outline, other: Outline): Nanometres {
  const dx = other.origin[0] - one.origin[0];
  const dy = other.origin[1] - one.origin[1];
  if (one.filled.length > 0 && isInside(moved(anyPlace(other), dx, dy), one.filled)) return 0;
  if (other.filled.length > 0 && isInside(moved(anyPlace(one), -dx, -dy), other.filled)) return 0;
  let least = Infinity;
  if (one.ellipse || other.ellipse) {
    for (const a of pieces(one)) for (const b of pieces(other)) least = Math.min(least, convexDistance(a, b, dx, dy));
  } else {
    for (const a of one.capsules) for (const b of other.capsules) least = Math.min(least, capsuleDistance(a, b, dx, dy));
  }
  return roundLength(least);
}

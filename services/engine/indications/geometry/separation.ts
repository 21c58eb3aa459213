import type { PointUm } from '../../evaluate/types';
import { ellipseToEllipse, ellipseToPoint, ellipseToSegment } from './ellipse';
import type { Ellipse } from './ellipse';
import type { Outline } from './outline';
import { boxGap, distanceBetween } from './points';
import type { Box } from './points';
import { polygonHolds, segmentsMeet } from './polygon';

type Path = Extract<Outline, { readonly kind: 'path' }>;

interface Segment {
  readonly a: PointUm;
  readonly b: PointUm;
  readonly box: Box;
}

function segmentsOf(path: Path): Segment[] {
  const { points, filled } = path;
  const count = points.length === 1 || filled ? points.length : points.length - 1;
  const segments: Segment[] = [];
  for (let index = 0; index < count; index++) {
    const a = points[index];
    const b = points[(index + 1) % points.length];
    if (!a || !b) continue;
    const box = {
      left: Math.min(a[0], b[0]),
      right: Math.max(a[0], b[0]),
      bottom: Math.min(a[1], b[1]),
      top: Math.max(a[1], b[1]),
    };
    segments.push({ a, b, box });
  }
  return segments;
}

/** Distance of a point from a closed segment, µm. */
function pointToSegment(p: PointUm, a: PointUm, b: PointUm): number {
  const ex = b[0] - a[0];
  const ey = b[1] - a[1];
  const dx = p[0] - a[0];
  const dy = p[1] - a[1];
  const along = dx * ex + dy * ey;
  const square = ex * ex + ey * ey;
  if (along <= 0) return distanceBetween(p, a);
  if (along >= square) return distanceBetween(p, b);
  return Math.abs(ex * dy - ey * dx) / Math.sqrt(square);
}

function segmentToSegment(one: Segment, other: Segment): number {
  if (segmentsMeet(one.a, one.b, other.a, other.b)) return 0;
  return Math.min(
    pointToSegment(one.a, other.a, other.b),
    pointToSegment(one.b, other.a, other.b),
    pointToSegment(other.a, one.a, one.b),
    pointToSegment(other.b, one.a, one.b),
  );
}

function holds(path: Path, point: PointUm | undefined): boolean {
  return path.filled && point !== undefined && polygonHolds(path.points, point);
}

function pathToPath(one: Path, other: Path): number {
  const [p] = one.points;
  const [q] = other.points;
  if (p && q && one.points.length === 1 && other.points.length === 1) return distanceBetween(p, q);
  if (holds(one, q) || holds(other, p)) return 0;
  const others = segmentsOf(other);
  let least = Infinity;
  for (const segment of segmentsOf(one)) {
    for (const against of others) {
      if (boxGap(segment.box, against.box) < least) least = Math.min(least, segmentToSegment(segment, against));
      if (least === 0) return 0;
    }
  }
  return least;
}

function ellipseToPath(ellipse: Ellipse, path: Path): number {
  const [only] = path.points;
  if (only && path.points.length === 1) return ellipseToPoint(ellipse, only);
  if (holds(path, ellipse.center)) return 0;
  return segmentsOf(path).reduce((least, { a, b }) => Math.min(least, ellipseToSegment(ellipse, a, b)), Infinity);
}

/** Distance between two filled outlines, µm, not yet rounded; 0 when they touch, overlap or one holds the other. */
export function separationOf(one: Outline, other: Outline): number {
  if (one.kind === 'ellipse') {
    if (other.kind === 'ellipse') return ellipseToEllipse(one.ellipse, other.ellipse);
    return Math.max(0, ellipseToPath(one.ellipse, other) - other.radius);
  }
  if (other.kind === 'ellipse') return Math.max(0, ellipseToPath(other.ellipse, one) - one.radius);
  return Math.max(0, pathToPath(one, other) - (one.radius + other.radius));
}

import type { PointUm } from '../../evaluate/types';
import { crossSign, distanceBetween, sideOf } from './points';

function halfHull(sorted: readonly PointUm[]): PointUm[] {
  const half: PointUm[] = [];
  for (const point of sorted) {
    for (;;) {
      const last = half[half.length - 1];
      const before = half[half.length - 2];
      if (!last || !before || sideOf(before, last, point) > 0) break;
      half.pop();
    }
    half.push(point);
  }
  half.pop();
  return half;
}

/** Corners of the convex hull, counter-clockwise, none on a straight edge; one or two points stay as they are. Exact. */
export function convexHull(points: readonly PointUm[]): readonly PointUm[] {
  const sorted = [...points].sort((a, b) => a[0] - b[0] || a[1] - b[1]);
  const different = sorted.filter((point, index) => {
    const before = sorted[index - 1];
    return !before || before[0] !== point[0] || before[1] !== point[1];
  });
  if (different.length < 3) return different;
  return [...halfHull(different), ...halfHull([...different].reverse())];
}

/** The largest distance between two corners of a hull, µm. */
export function hullDiameter(hull: readonly PointUm[]): number {
  let largest = 0;
  hull.forEach((a, index) => {
    for (let other = index + 1; other < hull.length; other++) {
      const b = hull[other];
      if (b) largest = Math.max(largest, distanceBetween(a, b));
    }
  });
  return largest;
}

/** The least caliper width of a hull with at least three corners, µm: a caliper at rest lies along an edge (Freeman and Shapira). */
export function hullWidth(hull: readonly PointUm[]): number {
  const count = hull.length;
  const at = (index: number): PointUm => hull[index % count] ?? [0, 0];
  let least = Infinity;
  let far = 1;
  for (let index = 0; index < count; index++) {
    const a = at(index);
    const ex = at(index + 1)[0] - a[0];
    const ey = at(index + 1)[1] - a[1];
    far = Math.max(far, index + 1);
    while (crossSign(ex, ey, at(far + 1)[0] - at(far)[0], at(far + 1)[1] - at(far)[1]) > 0) far++;
    const cross = ex * (at(far)[1] - a[1]) - ey * (at(far)[0] - a[0]);
    least = Math.min(least, Math.abs(cross) / Math.sqrt(ex * ex + ey * ey));
  }
  return least;
}

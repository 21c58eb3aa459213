import type { PointUm } from '../../evaluate/types';
import { crossSign, sideOf } from './points';

function within(a: PointUm, b: PointUm, p: PointUm): boolean {
  return (
    Math.min(a[0], b[0]) <= p[0] && p[0] <= Math.max(a[0], b[0]) && Math.min(a[1], b[1]) <= p[1] && p[1] <= Math.max(a[1], b[1])
  );
}

/** Whether two closed segments have a point in common; exact. */
export function segmentsMeet(a: PointUm, b: PointUm, c: PointUm, d: PointUm): boolean {
  const sideC = sideOf(a, b, c);
  const sideD = sideOf(a, b, d);
  const sideA = sideOf(c, d, a);
  const sideB = sideOf(c, d, b);
  if (sideC * sideD < 0 && sideA * sideB < 0) return true;
  return (
    (sideC === 0 && within(a, b, c)) ||
    (sideD === 0 && within(a, b, d)) ||
    (sideA === 0 && within(c, d, a)) ||
    (sideB === 0 && within(c, d, b))
  );
}

/** Whether a point lies in a filled polygon, its border included; exact. */
export function polygonHolds(polygon: readonly PointUm[], p: PointUm): boolean {
  let inside = false;
  let a = polygon[polygon.length - 1];
  for (const b of polygon) {
    if (!a) return false;
    if (a[1] > p[1] !== b[1] > p[1]) {
      const side = sideOf(a, b, p);
      if (side === 0) return true;
      if (side > 0 === b[1] > a[1]) inside = !inside;
    } else if (sideOf(a, b, p) === 0 && within(a, b, p)) return true;
    a = b;
  }
  return inside;
}

interface Edge {
  readonly a: PointUm;
  readonly b: PointUm;
  readonly index: number;
  readonly left: number;
  readonly right: number;
}

function foldsBack(a: PointUm, corner: PointUm, c: PointUm): boolean {
  const ax = a[0] - corner[0];
  const ay = a[1] - corner[1];
  const cx = c[0] - corner[0];
  const cy = c[1] - corner[1];
  return crossSign(ax, ay, cx, cy) === 0 && crossSign(ax, ay, -cy, cx) > 0;
}

function edgesOf(points: readonly PointUm[]): Edge[] {
  return points.flatMap((a, index) => {
    const b = points[(index + 1) % points.length];
    return b ? [{ a, b, index, left: Math.min(a[0], b[0]), right: Math.max(a[0], b[0]) }] : [];
  });
}

/** Whether no two edges of a closed outline (without repeated neighbours) meet, except neighbours at their corner; exact. */
export function isSimple(points: readonly PointUm[]): boolean {
  const edges = edgesOf(points);
  const count = edges.length;
  const folded = edges.some((edge) => {
    const next = edges[(edge.index + 1) % count];
    return next !== undefined && foldsBack(edge.a, edge.b, next.b);
  });
  if (folded) return false;
  let open: Edge[] = [];
  for (const edge of [...edges].sort((one, other) => one.left - other.left)) {
    open = open.filter((other) => other.right >= edge.left);
    for (const other of open) {
      const apart = Math.abs(edge.index - other.index);
      if (apart !== 1 && apart !== count - 1 && segmentsMeet(edge.a, edge.b, other.a, other.b)) return false;
    }
    open.push(edge);
  }
  return true;
}

/** Twice the signed area, and the first moments times six, from differences to the first point; exact. */
function moments(points: readonly PointUm[]): { twice: bigint; x: bigint; y: bigint } {
  const first = points[0] ?? [0, 0];
  let twice = 0n;
  let x = 0n;
  let y = 0n;
  for (let index = 1; index + 1 < points.length; index++) {
    const a = points[index] ?? first;
    const b = points[index + 1] ?? first;
    const ax = BigInt(a[0] - first[0]);
    const ay = BigInt(a[1] - first[1]);
    const bx = BigInt(b[0] - first[0]);
    const by = BigInt(b[1] - first[1]);
    const cross = ax * by - ay * bx;
    twice += cross;
    x += cross * (ax + bx);
    y += cross * (ay + by);
  }
  return { twice, x, y };
}

const FINE = 10n ** 9n;

/** Area in µm² and centroid (as a difference to the first point, µm) of a simple polygon. */
export function polygonMoments(points: readonly PointUm[]): { areaUm2: number; centroidX: number; centroidY: number } {
  const { twice, x, y } = moments(points);
  const offset = (moment: bigint) => Number((moment * FINE) / (3n * twice)) / 1e9;
  return { areaUm2: Number(twice < 0n ? -twice : twice) / 2, centroidX: offset(x), centroidY: offset(y) };
}

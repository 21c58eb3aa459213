import type { PointUm } from '../../evaluate/types';

/** A vector or place in double precision, µm. */
export interface Vector {
  readonly x: number;
  readonly y: number;
}

/** Axis-parallel box, µm. */
export interface Box {
  readonly left: number;
  readonly right: number;
  readonly bottom: number;
  readonly top: number;
}

// Whole products up to here, and their differences, are exact in a double.
const EXACT = 2 ** 52;

/** The sign of ax·by − ay·bx for whole numbers, always exact: coordinate differences reach 2·10⁸, their products do not fit a double. */
export function crossSign(ax: number, ay: number, bx: number, by: number): -1 | 0 | 1 {
  const left = ax * by;
  const right = ay * bx;
  if (Math.abs(left) < EXACT && Math.abs(right) < EXACT) return left > right ? 1 : left < right ? -1 : 0;
  const exact = BigInt(ax) * BigInt(by) - BigInt(ay) * BigInt(bx);
  return exact > 0n ? 1 : exact < 0n ? -1 : 0;
}

/** On which side of a → b a point lies: 1 left, −1 right, 0 on the line. */
export function sideOf(a: PointUm, b: PointUm, p: PointUm): -1 | 0 | 1 {
  return crossSign(b[0] - a[0], b[1] - a[1], p[0] - a[0], p[1] - a[1]);
}

/** Points without neighbours that repeat; of a closed outline the last also neighbours the first. */
export function withoutRepeats(points: readonly PointUm[], closed: boolean): readonly PointUm[] {
  const kept: PointUm[] = [];
  for (const point of points) {
    const last = kept[kept.length - 1];
    if (!last || last[0] !== point[0] || last[1] !== point[1]) kept.push(point);
  }
  const first = kept[0];
  while (closed && first && kept.length > 1) {
    const last = kept[kept.length - 1];
    if (!last || last[0] !== first[0] || last[1] !== first[1]) break;
    kept.pop();
  }
  return kept;
}

/** How many different points there are. */
export function differentPoints(points: readonly PointUm[]): number {
  return new Set(points.map((point) => `${point[0]} ${point[1]}`)).size;
}

export function distanceBetween(a: PointUm, b: PointUm): number {
  const dx = a[0] - b[0];
  const dy = a[1] - b[1];
  return Math.sqrt(dx * dx + dy * dy);
}

export function boxOf(points: readonly PointUm[], marginX: number, marginY: number): Box {
  let left = Infinity;
  let right = -Infinity;
  let bottom = Infinity;
  let top = -Infinity;
  for (const [x, y] of points) {
    left = Math.min(left, x);
    right = Math.max(right, x);
    bottom = Math.min(bottom, y);
    top = Math.max(top, y);
  }
  return { left: left - marginX, right: right + marginX, bottom: bottom - marginY, top: top + marginY };
}

/** No two points of the boxes are nearer than this, µm. */
export function boxGap(a: Box, b: Box): number {
  const dx = Math.max(0, a.left - b.right, b.left - a.right);
  const dy = Math.max(0, a.bottom - b.top, b.bottom - a.top);
  return Math.sqrt(dx * dx + dy * dy);
}

/** The smallest box around two boxes. */
export function boxAround(a: Box, b: Box): Box {
  return {
    left: Math.min(a.left, b.left),
    right: Math.max(a.right, b.right),
    bottom: Math.min(a.bottom, b.bottom),
    top: Math.max(a.top, b.top),
  };
}

export function unitVector(x: number, y: number): Vector {
  const length = Math.sqrt(x * x + y * y);
  return { x: x / length, y: y / length };
}

/** The direction half-way between two directions less than half a turn apart, by + × ÷ √ only. */
export function directionBetween(a: Vector, b: Vector): Vector {
  return unitVector(a.x + b.x, a.y + b.y);
}

/** Grows with the angle of a direction from 0 up to 4 for a whole turn, without trigonometry. */
export function turnOf(x: number, y: number): number {
  const part = y / (Math.abs(x) + Math.abs(y));
  return x < 0 ? 2 - part : y < 0 ? 4 + part : part;
}

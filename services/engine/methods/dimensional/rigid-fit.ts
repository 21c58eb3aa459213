import { derived, refused } from '../derived';
import type { Derived } from '../derived';
import { singularValues } from './singular-values';
import type { Matrix } from './singular-values';

/** A point of two or three coordinates in mm. */
export type Point = readonly number[];

export interface RigidFit {
  /** Rotation by rows; its determinant is +1. */
  readonly rotation: Matrix;
  readonly shiftMm: Point;
  /** Each source point moved onto the target, less its target point. */
  readonly residualsMm: readonly Point[];
  readonly rootMeanSquareMm: number;
  readonly largestResidualMm: number;
}

const UNDETERMINED = 1e-9;
// mm²: points closer together than 0.1 nm are one spot.
const ONE_SPOT_MM2 = 1e-14;

const at = (point: Point, place: number): number => point[place] ?? 0;

function middleOf(points: readonly Point[], axes: readonly number[]): number[] {
  return axes.map((axis) => points.reduce((sum, point) => sum + at(point, axis), 0) / points.length);
}

/** The determinant of a 2 × 2 or 3 × 3 matrix by rows (or columns). */
function determinant(m: Matrix): number {
  const [a = [], b = [], c] = m;
  if (c === undefined) return at(a, 0) * at(b, 1) - at(a, 1) * at(b, 0);
  return (
    at(a, 0) * (at(b, 1) * at(c, 2) - at(b, 2) * at(c, 1)) -
    at(a, 1) * (at(b, 0) * at(c, 2) - at(b, 2) * at(c, 0)) +
    at(a, 2) * (at(b, 0) * at(c, 1) - at(b, 1) * at(c, 0))
  );
}

/** The last direction, square to the others, so that all make a right-handed set. */
function completed(columns: Matrix): Matrix {
  const [a = [], b = []] = columns;
  if (columns.length === 2) return [a, [-at(a, 1), at(a, 0)]];
  const cross = [0, 1, 2].map((i) => at(a, (i + 1) % 3) * at(b, (i + 2) % 3) - at(a, (i + 2) % 3) * at(b, (i + 1) % 3));
  return [a, b, cross];
}

/** R by rows from H = Σ source·targetᵀ given by columns, or null when the points leave a turn free. */
function rotationFrom(columns: Matrix): Matrix | null {
  const { u, s, v } = singularValues(columns);
  const last = s.length - 1;
  const largest = at(s, 0);
  // Both sets of directions are made right-handed: V·Uᵀ is then a rotation, never a mirror.
  const flipped = determinant(u) * determinant(v) < 0 ? -1 : 1;
  if (!(largest > ONE_SPOT_MM2) || at(s, last - 1) + flipped * at(s, last) <= UNDETERMINED * largest) return null;
  const left = completed(u);
  const right = completed(v);
  return right.map((_, row) =>
    left.map((__, column) =>
      left.reduce((sum, direction, place) => sum + at(right[place] ?? [], row) * at(direction, column), 0),
    ),
  );
}

/**
 * The rigid motion (turn and shift, no mirror, no stretch) that brings source points nearest to their target points.
 * Two or three coordinates. Refuses different numbers of points, too few, and points that leave a turn free (all on one
 * spot, in three dimensions all on one line, or a perfect mirror image without one nearest turn).
 * Source: Kabsch 1976 and 1978; checked against published rotations and Horn's quaternions.
 */
export function rigidFit(source: readonly Point[], target: readonly Point[], dimensions: 2 | 3): Derived<RigidFit> {
  if (source.length !== target.length) return refused('points-unpaired', { source: source.length, target: target.length });
  if (source.length < dimensions) return refused('too-few-points', { points: source.length, needed: dimensions });
  const axes = dimensions === 2 ? [0, 1] : [0, 1, 2];
  const from = middleOf(source, axes);
  const to = middleOf(target, axes);
  const columns = axes.map((column) =>
    axes.map((row) =>
      source.reduce((sum, point, place) => {
        const partner = target[place] ?? [];
        return sum + (at(point, row) - at(from, row)) * (at(partner, column) - at(to, column));
      }, 0),
    ),
  );
  const rotation = rotationFrom(columns);
  if (rotation === null) return refused('turn-not-determined');
  const turned = (point: Point) => rotation.map((row) => axes.reduce((sum, axis) => sum + at(row, axis) * at(point, axis), 0));
  const turnedMiddle = turned(from);
  const shiftMm = axes.map((axis) => at(to, axis) - at(turnedMiddle, axis));
  const residualsMm = source.map((point, place) => {
    const moved = turned(axes.map((axis) => at(point, axis) - at(from, axis)));
    return axes.map((axis) => at(moved, axis) + at(to, axis) - at(target[place] ?? [], axis));
  });
  const squares = residualsMm.map((residual) => residual.reduce((sum, entry) => sum + entry * entry, 0));
  return derived({
    rotation,
    shiftMm,
    residualsMm,
    rootMeanSquareMm: Math.sqrt(squares.reduce((sum, entry) => sum + entry, 0) / squares.length),
    largestResidualMm: Math.sqrt(squares.reduce((most, entry) => (entry > most ? entry : most), 0)),
  });
}

/**
 * Profile after best fit: measured points are brought onto their nominal points rigidly, then looked at along the nominal
 * normals (of any length above 0); the answer is twice the largest deviation about the zone's middle, in mm.
 * Source: ISO 1660 (profile), fit by Kabsch.
 */
export function profileAfterFitMm(
  nominal: readonly Point[],
  normals: readonly Point[],
  measured: readonly Point[],
  dimensions: 2 | 3,
  offsetMm = 0,
): Derived<{ readonly profileMm: number; readonly deviationsMm: readonly number[] }> {
  if (normals.length !== nominal.length) return refused('points-unpaired', { source: nominal.length, target: normals.length });
  const lengths = normals.map((normal) => Math.sqrt(normal.reduce((sum, entry) => sum + entry * entry, 0)));
  const blank = lengths.findIndex((length) => !(length > 0));
  if (blank >= 0) return refused('normal-without-direction', { point: blank + 1 });
  const fit = rigidFit(measured, nominal, dimensions);
  if (!fit.ok) return fit;
  const deviationsMm = fit.value.residualsMm.map((residual, place) => {
    const normal = normals[place] ?? [];
    return residual.reduce((sum, entry, axis) => sum + entry * at(normal, axis), 0) / (lengths[place] ?? 1);
  });
  const worst = deviationsMm.reduce((most, entry) => {
    const away = entry < offsetMm ? offsetMm - entry : entry - offsetMm;
    return away > most ? away : most;
  }, 0);
  return derived({ profileMm: 2 * worst, deviationsMm });
}

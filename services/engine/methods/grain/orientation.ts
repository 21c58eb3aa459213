import { angleDegrees, sineAndCosine } from '../../quantity/elementary';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

export type Direction = readonly [number, number, number];

/** Bunge Euler angles φ₁, Φ, φ₂ in degrees: rotations about z, the new x, the new z that bring the sample's axes to the crystal's. */
export interface EulerDegrees {
  readonly phi1: number;
  readonly capitalPhi: number;
  readonly phi2: number;
}

// In cosines: about 10⁻⁷ of a degree at 45°, far below any measurement.
const EQUALLY_NEAR = 1e-9;

const FAMILIES = {
  '001': [
    [1, 0, 0],
    [0, 1, 0],
    [0, 0, 1],
  ],
  '011': [
    [0, 1, 1],
    [0, 1, -1],
    [1, 0, 1],
    [1, 0, -1],
    [1, 1, 0],
    [1, -1, 0],
  ],
  '111': [
    [1, 1, 1],
    [1, 1, -1],
    [1, -1, 1],
    [-1, 1, 1],
  ],
} as const;
export type CrystalFamily = keyof typeof FAMILIES;

function dot(a: Direction, b: Direction): number {
  return a[0] * b[0] + a[1] * b[1] + a[2] * b[2];
}

/** Acute angle between two lines, from cross and dot product: good near 0° and 90°, where an arc cosine is not. */
function betweenLines(a: Direction, b: Direction): number {
  const cross: Direction = [a[1] * b[2] - a[2] * b[1], a[2] * b[0] - a[0] * b[2], a[0] * b[1] - a[1] * b[0]];
  const along = dot(a, b);
  return angleDegrees(Math.sqrt(dot(cross, cross)), along < 0 ? -along : along);
}

/** A direction of length 1; null for none. Scaled first, so that nothing under- or overflows. */
function unit(of: Direction): Direction | null {
  const largest = of.reduce((most, entry) => Math.max(most, entry < 0 ? -entry : entry), 0);
  if (!(largest > 0) || largest === Infinity) return null;
  const scaled: Direction = [of[0] / largest, of[1] / largest, of[2] / largest];
  const length = Math.sqrt(dot(scaled, scaled));
  return [scaled[0] / length, scaled[1] / length, scaled[2] / length];
}

/**
 * Acute angle in degrees between two lines: the deviation of a columnar grain from the stacking axis, or the divergence of
 * two neighbouring grains. Refuses a direction of no length. Source: geometry.
 */
export function deviationDegrees(grain: Direction, axis: Direction): Derived<number> {
  const a = unit(grain);
  const b = unit(axis);
  return a && b ? derived(betweenLines(a, b)) : refused('direction-without-length');
}

/**
 * Angle in degrees of a direction, given along the cube axes of the crystal, to the nearest of a family: ⟨001⟩ gives the
 * primary orientation angle of a blade axis. Refuses a direction of no length. Source: geometry of the cubic lattice.
 */
export function angleToFamilyDegrees(inCrystal: Direction, family: CrystalFamily): Derived<number> {
  const direction = unit(inCrystal);
  if (!direction) return refused('direction-without-length');
  return derived(FAMILIES[family].reduce((least, member) => Math.min(least, betweenLines(direction, member)), 90));
}

/** The sample's x, y and z along the cube axes of the crystal (columns of Bunge's g). Source: Bunge 1982. */
export function sampleAxesInCrystal({ phi1, capitalPhi, phi2 }: EulerDegrees): readonly [Direction, Direction, Direction] {
  const first = sineAndCosine(phi1);
  const tilt = sineAndCosine(capitalPhi);
  const second = sineAndCosine(phi2);
  const { sine: s1, cosine: c1 } = first;
  const { sine: s, cosine: c } = tilt;
  const { sine: s2, cosine: c2 } = second;
  return [
    [c1 * c2 - s1 * s2 * c, -c1 * s2 - s1 * c2 * c, s1 * s],
    [s1 * c2 + c1 * s2 * c, -s1 * s2 + c1 * c2 * c, -c1 * s],
    [s2 * s, c2 * s, c],
  ];
}

/** Primary orientation angle in degrees: the sample's z (the blade axis) to the nearest ⟨001⟩, from Bunge Euler angles. */
export function primaryAngleDegrees(euler: EulerDegrees): Derived<number> {
  return angleToFamilyDegrees(sampleAxesInCrystal(euler)[2], '001');
}

/**
 * Secondary orientation angle in degrees, 0 to 45 for an upright crystal: the sample's x to the nearest cube axis other than
 * the primary one, as seen along z. Refuses a blade axis equally near to two cube axes. The reference direction is the drawing's.
 */
export function secondaryAngleDegrees(euler: EulerDegrees): Derived<number> {
  const [x, y, z] = sampleAxesInCrystal(euler);
  const uprightness = z.map((entry) => (entry < 0 ? -entry : entry));
  const primary = uprightness.indexOf(Math.max(...uprightness));
  if (uprightness.some((entry, axis) => axis !== primary && (uprightness[primary] ?? 0) - entry < EQUALLY_NEAR))
    return refused('no-primary-axis');
  const angles = [0, 1, 2]
    .filter((axis) => axis !== primary)
    .map((axis) => betweenLines([x[axis] ?? 0, y[axis] ?? 0, 0], [1, 0, 0]));
  return derived(Math.min(...angles));
}

import { angleDegrees, sineAndCosine } from '../../quantity/elementary';
import type { EulerDegrees } from './orientation';

/** A rotation as w + xi + yj + zk of length 1. */
export type Quaternion = readonly [number, number, number, number];

const R = Math.SQRT1_2;

/** The 24 rotations that bring a cube onto itself (group 432). */
const CUBE_ROTATIONS: readonly Quaternion[] = [
  [1, 0, 0, 0],
  ...([1, 2, 3] as const).map((axis): Quaternion => [0, axis === 1 ? 1 : 0, axis === 2 ? 1 : 0, axis === 3 ? 1 : 0]),
  ...([1, -1] as const).flatMap((sign): Quaternion[] => [
    [R, sign * R, 0, 0],
    [R, 0, sign * R, 0],
    [R, 0, 0, sign * R],
    [0, R, sign * R, 0],
    [0, R, 0, sign * R],
    [0, 0, R, sign * R],
  ]),
  ...([1, -1] as const).flatMap((a) =>
    ([1, -1] as const).flatMap((b) => ([1, -1] as const).map((c): Quaternion => [0.5, a / 2, b / 2, c / 2])),
  ),
];

function product(p: Quaternion, q: Quaternion): Quaternion {
  return [
    p[0] * q[0] - p[1] * q[1] - p[2] * q[2] - p[3] * q[3],
    p[0] * q[1] + p[1] * q[0] + p[2] * q[3] - p[3] * q[2],
    p[0] * q[2] - p[1] * q[3] + p[2] * q[0] + p[3] * q[1],
    p[0] * q[3] + p[1] * q[2] - p[2] * q[1] + p[3] * q[0],
  ];
}

/** Bunge Euler angles as a rotation from the crystal's axes to the sample's. Source: Bunge 1982. */
export function rotationOf({ phi1, capitalPhi, phi2 }: EulerDegrees): Quaternion {
  const tilt = sineAndCosine(capitalPhi / 2);
  const sum = sineAndCosine((phi1 + phi2) / 2);
  const difference = sineAndCosine((phi1 - phi2) / 2);
  return [tilt.cosine * sum.cosine, tilt.sine * difference.cosine, tilt.sine * difference.sine, tilt.cosine * sum.sine];
}

/** Angle in degrees of a rotation, 0 to 180, from vector and scalar part: good also for the smallest angles. */
function angleOf(q: Quaternion): number {
  return 2 * angleDegrees(Math.sqrt(q[1] * q[1] + q[2] * q[2] + q[3] * q[3]), q[0] < 0 ? -q[0] : q[0]);
}

/**
 * Disorientation in degrees of two cubic crystals: the smallest turn that brings one onto the other, over the 24 rotations of
 * the cube; at most 62.80°. Below 15° a boundary is called low-angle. Source: Mackenzie 1958; Bunge 1982.
 */
export function disorientationDegrees(first: EulerDegrees, second: EulerDegrees): number {
  return leastTurnDegrees(rotationOf(first), rotationOf(second));
}

/** The same for two rotations of length 1 from the crystal's axes to the sample's. */
export function leastTurnDegrees(first: Quaternion, second: Quaternion): number {
  const between = product([first[0], -first[1], -first[2], -first[3]], second);
  return CUBE_ROTATIONS.reduce((least, turn) => Math.min(least, angleOf(product(turn, between))), 180);
}

import type { DemoView, PlaceUm } from './part-forms';
import type { SeededRandom } from './seeded-random';

/** Outline of a mark in the acceptance engine's form: whole micrometres on the view, y upwards. */
export type MarkShape =
  | { readonly kind: 'circle'; readonly center: PlaceUm; readonly diameter: number }
  | { readonly kind: 'ellipse'; readonly center: PlaceUm; readonly axes: readonly [number, number]; readonly angle: number }
  | { readonly kind: 'polyline'; readonly points: readonly PlaceUm[]; readonly width: number };

/** What a demo picture really holds, for comparison with what a person marks on it. */
export interface KnownFlaw {
  readonly type: 'gas-pore' | 'inclusion' | 'crack' | 'shrinkage' | 'residual-core';
  readonly view: DemoView;
  readonly shape: MarkShape;
  /** The voids of a shrinkage cluster, each a sphere. */
  readonly members?: readonly MarkShape[];
}

/** A flaw inside the metal, as asked for in a radiograph. */
export type RadiographicFlaw =
  | { readonly type: 'gas-pore'; readonly center: PlaceUm; readonly diameterUm: number }
  | {
      readonly type: 'inclusion';
      readonly center: PlaceUm;
      readonly axesUm: readonly [number, number];
      readonly angle: number;
      readonly density: 'lighter' | 'denser';
    }
  | { readonly type: 'crack'; readonly points: readonly PlaceUm[]; readonly widthUm: number; readonly depthUm: number }
  | {
      readonly type: 'shrinkage';
      readonly center: PlaceUm;
      readonly axesUm: readonly [number, number];
      readonly angle: number;
      readonly voids: number;
    }
  | {
      readonly type: 'residual-core';
      readonly center: PlaceUm;
      readonly axesUm: readonly [number, number];
      readonly angle: number;
    };

/**
 * Refuses truths that an engine could not take as they are.
 * @throws RangeError when a number is not whole or a size is not above zero.
 */
export function checkShape(shape: MarkShape): MarkShape {
  const sizes = shape.kind === 'circle' ? [shape.diameter] : shape.kind === 'ellipse' ? shape.axes : [shape.width];
  const places = shape.kind === 'polyline' ? shape.points : [shape.center];
  if (![...sizes, ...places.flat()].every((value) => Number.isInteger(value)))
    throw new RangeError('a known flaw is given in whole micrometres');
  if (sizes.some((size) => size <= 0)) throw new RangeError('a known flaw has a size above zero');
  if (shape.kind === 'polyline' && shape.points.length < 2) throw new RangeError('a line has at least two points');
  return shape;
}

/** Turns a view offset into the axes of an ellipse: along its first axis, across it, each −1 to 1 inside. */
export function withinEllipse(
  xUm: number,
  yUm: number,
  center: PlaceUm,
  axesUm: readonly [number, number],
  angle: number,
): readonly [number, number] {
  const turn = (angle * Math.PI) / 180;
  const [dx, dy] = [xUm - center[0], yUm - center[1]];
  return [
    (dx * Math.cos(turn) + dy * Math.sin(turn)) / (axesUm[0] / 2),
    (dy * Math.cos(turn) - dx * Math.sin(turn)) / (axesUm[1] / 2),
  ];
}

/** Scatters small spheres in an ellipse, thicker towards its middle; every sphere lies wholly inside. */
export function shrinkageVoids(flaw: Extract<RadiographicFlaw, { type: 'shrinkage' }>, random: SeededRandom): MarkShape[] {
  const turn = (flaw.angle * Math.PI) / 180;
  const least = Math.min(...flaw.axesUm);
  return Array.from({ length: flaw.voids }, () => {
    const diameter = Math.max(60, Math.round(least * random.between(0.08, 0.24)));
    const away = random.next() ** 0.7;
    const round = random.between(0, 2 * Math.PI);
    const along = (flaw.axesUm[0] / 2 - diameter / 2 - 1) * away * Math.cos(round);
    const across = (flaw.axesUm[1] / 2 - diameter / 2 - 1) * away * Math.sin(round);
    const center: PlaceUm = [
      Math.round(flaw.center[0] + along * Math.cos(turn) - across * Math.sin(turn)),
      Math.round(flaw.center[1] + along * Math.sin(turn) + across * Math.cos(turn)),
    ];
    return { kind: 'circle', center, diameter };
  });
}

/**
 * A line that wanders between grain boundaries as a crack does, in whole micrometres.
 * `wanderUm` is the standard deviation of each inner point from the straight line; the ends are as given.
 */
export function wanderingLine(random: SeededRandom, from: PlaceUm, to: PlaceUm, steps: number, wanderUm: number): PlaceUm[] {
  const [dx, dy] = [to[0] - from[0], to[1] - from[1]];
  const length = Math.hypot(dx, dy);
  return Array.from({ length: steps + 1 }, (_, step): PlaceUm => {
    if (step === 0) return from;
    if (step === steps) return to;
    const along = (step + random.between(-0.25, 0.25)) / steps;
    const aside = (random.normal() * wanderUm) / length;
    return [Math.round(from[0] + along * dx - aside * dy), Math.round(from[1] + along * dy + aside * dx)];
  });
}

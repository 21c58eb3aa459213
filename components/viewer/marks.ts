import type { ViewPoint } from './scale';

/** Shapes as the acceptance engine takes them: whole micrometres, axes and diameters in full, angle in degrees anticlockwise. */
export type MarkShape =
  | { readonly kind: 'circle'; readonly center: ViewPoint; readonly diameter: number }
  | { readonly kind: 'ellipse'; readonly center: ViewPoint; readonly axes: readonly [number, number]; readonly angle: number }
  | { readonly kind: 'polyline'; readonly points: readonly ViewPoint[]; readonly width: number }
  | { readonly kind: 'polygon'; readonly points: readonly ViewPoint[] };
export type ShapeKind = MarkShape['kind'];

export type MarkVerdict = 'accept' | 'reject' | 'indeterminate' | 'not-evaluable';

/**
 * An indication marked on a picture. `shape` is null on a picture whose scale nobody knows.
 * `drawn` is the same in thousandths of a pixel from the lower left corner; kept where the scale is unknown or indicative, so that
 * the mark stays in its place when the scale is entered or corrected.
 */
export interface Mark {
  readonly id: string;
  readonly shape: MarkShape | null;
  readonly drawn?: MarkShape;
  readonly scale: 'calibrated' | 'indicative';
}

/** Moves a shape by whole units. */
export function moved(shape: MarkShape, dx: number, dy: number): MarkShape {
  const by = ([x, y]: ViewPoint): ViewPoint => [Math.round(x + dx), Math.round(y + dy)];
  if (shape.kind === 'circle' || shape.kind === 'ellipse') return { ...shape, center: by(shape.center) };
  return { ...shape, points: shape.points.map(by) };
}

/** The middle about which a shape grows, and where its number stands. */
export function middleOf(shape: MarkShape): ViewPoint {
  if (shape.kind === 'circle' || shape.kind === 'ellipse') return shape.center;
  const sum = shape.points.reduce<[number, number]>(([x, y], point) => [x + point[0], y + point[1]], [0, 0]);
  return [sum[0] / shape.points.length, sum[1] / shape.points.length];
}

/** Makes a shape larger or smaller about its middle; the width of a polyline stays. */
export function grown(shape: MarkShape, factor: number): MarkShape {
  const size = (value: number) => Math.max(1, Math.round(value * factor));
  if (shape.kind === 'circle') return { ...shape, diameter: size(shape.diameter) };
  if (shape.kind === 'ellipse') return { ...shape, axes: [size(shape.axes[0]), size(shape.axes[1])] };
  const [mx, my] = middleOf(shape);
  const points = shape.points.map(([x, y]): ViewPoint => [
    Math.round(mx + (x - mx) * factor),
    Math.round(my + (y - my) * factor),
  ]);
  return { ...shape, points };
}

/** Turns an ellipse by whole degrees, 0 to 179; other shapes are left alone. */
export function turned(shape: MarkShape, degrees: number): MarkShape {
  return shape.kind === 'ellipse' ? { ...shape, angle: wrapped(shape.angle + degrees) } : shape;
}

/** The places by which a shape can be resized, in the shape's own units. */
export function handlesOf(shape: MarkShape): readonly ViewPoint[] {
  if (shape.kind === 'circle') return [[shape.center[0] + shape.diameter / 2, shape.center[1]]];
  if (shape.kind !== 'ellipse') return shape.points;
  const along = (length: number, degrees: number): ViewPoint => {
    const radians = (degrees * Math.PI) / 180;
    return [shape.center[0] + (length / 2) * Math.cos(radians), shape.center[1] + (length / 2) * Math.sin(radians)];
  };
  return [along(shape.axes[0], shape.angle), along(shape.axes[1], shape.angle + 90)];
}

/** The shape after one of its handles was pulled to a place. */
export function pulled(shape: MarkShape, handle: number, to: ViewPoint): MarkShape {
  if (shape.kind === 'polyline' || shape.kind === 'polygon') {
    const point: ViewPoint = [Math.round(to[0]), Math.round(to[1])];
    return { ...shape, points: shape.points.map((old, index) => (index === handle ? point : old)) };
  }
  const [dx, dy] = [to[0] - shape.center[0], to[1] - shape.center[1]];
  const size = Math.max(1, Math.round(2 * Math.hypot(dx, dy)));
  if (shape.kind === 'circle') return { ...shape, diameter: size };
  const degrees = Math.round((Math.atan2(dy, dx) * 180) / Math.PI);
  return handle === 0
    ? { ...shape, axes: [size, shape.axes[1]], angle: wrapped(degrees) }
    : { ...shape, axes: [shape.axes[0], size], angle: wrapped(degrees - 90) };
}

function wrapped(degrees: number): number {
  return ((degrees % 180) + 180) % 180;
}

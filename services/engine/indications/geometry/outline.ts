import type { PointUm, Shape } from '../../evaluate/types';
import { convexHull, hullDiameter, hullWidth } from './convex-hull';
import { ellipseOf, reachOf } from './ellipse';
import type { Ellipse } from './ellipse';
import { boxOf, distanceBetween, withoutRepeats } from './points';
import type { Box } from './points';
import { polygonMoments } from './polygon';

/** A filled outline: all points within `radius` of a line (a single point: a circle) or of a filled polygon, or an ellipse. */
export type Outline =
  | {
      readonly kind: 'path';
      readonly points: readonly PointUm[];
      readonly filled: boolean;
      readonly radius: number;
      readonly box: Box;
    }
  | { readonly kind: 'ellipse'; readonly ellipse: Ellipse; readonly box: Box };

export type DrawnShape = Exclude<Shape, { readonly kind: 'entered' }>;

/** A place as a whole-µm point and an offset to it, so that moving the drawing by whole µm changes no digit of a difference. */
export interface Place {
  readonly base: PointUm;
  readonly dx: number;
  readonly dy: number;
}

/** What is measured of one outline, µm and µm², not yet rounded. */
export interface Measures {
  readonly length: number;
  readonly width: number;
  readonly area: number;
  readonly centroid: Place;
}

function pathOutline(points: readonly PointUm[], filled: boolean, radius: number): Outline {
  return { kind: 'path', points, filled, radius, box: boxOf(points, radius, radius) };
}

/** A zone's filled polygon as an outline. */
export function polygonOutline(points: readonly PointUm[]): Outline {
  return pathOutline(withoutRepeats(points, true), true, 0);
}

/** The outline of a shape that has passed its form and meaning checks. */
export function outlineOf(shape: DrawnShape): Outline {
  switch (shape.kind) {
    case 'circle':
      return pathOutline([shape.center], false, shape.diameter / 2);
    case 'polyline':
      return pathOutline(withoutRepeats(shape.points, false), false, shape.width / 2);
    case 'polygon':
      return polygonOutline(shape.points);
    case 'ellipse': {
      const [first, second] = shape.axes;
      if (first === second) return pathOutline([shape.center], false, first / 2);
      const ellipse = ellipseOf(shape.center, shape.axes, shape.angle ?? 0);
      const box = boxOf([shape.center], reachOf(ellipse, { x: 1, y: 0 }), reachOf(ellipse, { x: 0, y: 1 }));
      return { kind: 'ellipse', ellipse, box };
    }
  }
}

function lineMeasures(points: readonly PointUm[], width: number): Measures {
  const first = points[0] ?? [0, 0];
  let line = 0;
  let x = 0;
  let y = 0;
  for (let index = 1; index < points.length; index++) {
    const a = points[index - 1] ?? first;
    const b = points[index] ?? first;
    const part = distanceBetween(a, b);
    line += part;
    x += (part * (a[0] - first[0] + (b[0] - first[0]))) / 2;
    y += (part * (a[1] - first[1] + (b[1] - first[1]))) / 2;
  }
  return {
    length: hullDiameter(convexHull(points)) + width,
    width,
    area: line * width,
    centroid: { base: first, dx: x / line, dy: y / line },
  };
}

/** Length (largest caliper), width (least caliper; a polyline's stated width), area and centroid. */
export function measuresOf(shape: DrawnShape): Measures {
  switch (shape.kind) {
    case 'circle':
      return {
        length: shape.diameter,
        width: shape.diameter,
        area: (Math.PI / 4) * shape.diameter * shape.diameter,
        centroid: { base: shape.center, dx: 0, dy: 0 },
      };
    case 'ellipse':
      return {
        length: Math.max(...shape.axes),
        width: Math.min(...shape.axes),
        area: (Math.PI / 4) * shape.axes[0] * shape.axes[1],
        centroid: { base: shape.center, dx: 0, dy: 0 },
      };
    case 'polyline':
      return lineMeasures(withoutRepeats(shape.points, false), shape.width);
    case 'polygon': {
      const points = withoutRepeats(shape.points, true);
      const hull = convexHull(points);
      const { areaUm2, centroidX, centroidY } = polygonMoments(points);
      const base = points[0] ?? [0, 0];
      return {
        length: hullDiameter(hull),
        width: hullWidth(hull),
        area: areaUm2,
        centroid: { base, dx: centroidX, dy: centroidY },
      };
    }
  }
}

/** From one place to another, µm. */
export function fromTo(from: Place, to: Place): { x: number; y: number } {
  return { x: to.base[0] - from.base[0] + (to.dx - from.dx), y: to.base[1] - from.base[1] + (to.dy - from.dy) };
}

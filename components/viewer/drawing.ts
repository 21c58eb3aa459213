import type { Mark, MarkShape, ShapeKind } from './marks';
import { lengthUm, toPicture, toView, unscaledFrame } from './scale';
import type { Frame, PicturePoint } from './scale';

/** How many places a shape needs before it may be finished. */
const leastPoints: Record<ShapeKind, number> = { circle: 2, ellipse: 2, polyline: 2, polygon: 3 };

/** Whether the second place finishes the shape at once. */
export function finishesItself(kind: ShapeKind): boolean {
  return kind === 'circle' || kind === 'ellipse';
}

/** A shape from the places a person gave, or null while there are too few or they coincide. Line width in pixels. */
export function shapeFrom(kind: ShapeKind, points: readonly PicturePoint[], lineWidthPx: number, frame: Frame): MarkShape | null {
  const distinct = points.filter((point, index) => {
    const before = points[index - 1];
    return !before || Math.hypot(point[0] - before[0], point[1] - before[1]) > 0.25;
  });
  const [first, second] = distinct;
  if (distinct.length < leastPoints[kind] || !first || !second) return null;
  if (kind === 'polygon') return { kind, points: distinct.map((point) => toView(frame, point)) };
  if (kind === 'polyline')
    return { kind, points: distinct.map((point) => toView(frame, point)), width: lengthUm(frame, lineWidthPx) };
  const center = toView(frame, first);
  const [dx, dy] = [second[0] - first[0], second[1] - first[1]];
  if (kind === 'circle') return { kind, center, diameter: lengthUm(frame, 2 * Math.hypot(dx, dy)) };
  const angle = ((Math.round(frame.turnDeg) % 180) + 180) % 180;
  return { kind, center, axes: [lengthUm(frame, 2 * Math.abs(dx)), lengthUm(frame, 2 * Math.abs(dy))], angle };
}

/** The same shape in another frame of the same picture: after a scale was entered or corrected. */
export function inFrame(shape: MarkShape, from: Frame, to: Frame): MarkShape {
  const place = (point: readonly [number, number]) => toView(to, toPicture(from, point));
  const size = (length: number) => lengthUm(to, length / from.pitchUm);
  if (shape.kind === 'circle') return { ...shape, center: place(shape.center), diameter: size(shape.diameter) };
  if (shape.kind === 'ellipse') {
    const angle = (((shape.angle + to.turnDeg - from.turnDeg) % 180) + 180) % 180;
    return { ...shape, center: place(shape.center), axes: [size(shape.axes[0]), size(shape.axes[1])], angle };
  }
  if (shape.kind === 'polyline') return { ...shape, points: shape.points.map(place), width: size(shape.width) };
  return { ...shape, points: shape.points.map(place) };
}

/** What is known of a picture's scale: calibrated (pitch measured), indicative (entered by a person) or none. */
export interface PictureScale {
  readonly heightPx: number;
  readonly frame: Frame | null;
  readonly calibrated: boolean;
}

/** The frame in which shapes of this picture are worked on; unscaled pictures use thousandths of a pixel. */
export function workingFrame(scale: PictureScale): Frame {
  return scale.calibrated && scale.frame ? scale.frame : unscaledFrame(scale.heightPx);
}

/** The shape of a mark in the working frame, or null when it cannot be placed on this picture. */
export function workingShape(mark: Mark, scale: PictureScale): MarkShape | null {
  if (scale.calibrated) return mark.shape;
  if (mark.drawn) return mark.drawn;
  return mark.shape && scale.frame ? inFrame(mark.shape, scale.frame, unscaledFrame(scale.heightPx)) : null;
}

/** A mark that carries a shape of the working frame, in every form this picture's scale allows. */
export function markWith(id: string, shape: MarkShape, scale: PictureScale): Mark {
  if (scale.calibrated) return { id, shape, scale: 'calibrated' };
  const inView = scale.frame ? inFrame(shape, unscaledFrame(scale.heightPx), scale.frame) : null;
  return { id, shape: inView, drawn: shape, scale: 'indicative' };
}

import type { PointUm, Shape } from '../evaluate/types';

export type DrawnShape = Exclude<Shape, { readonly kind: 'entered' }>;

/** A point, or the segment between two, thickened by a radius; µm, relative to the outline's own origin. */
export interface Capsule {
  readonly from: readonly [number, number];
  readonly to: readonly [number, number];
  readonly radius: number;
}

/**
 * A drawn shape as geometry asks for it. `origin` is a whole-micrometre corner; everything else is a difference from
 * it, so that moving a mark by whole micrometres changes no digit.
 */
export interface Outline {
  readonly origin: PointUm;
  readonly capsules: readonly Capsule[];
  readonly ellipse: { readonly semi: readonly [number, number]; readonly cos: number; readonly sin: number } | null;
  /** Corners of a filled polygon, relative to `origin`; empty otherwise. */
  readonly filled: readonly (readonly [number, number])[];
}

const dot = (a: readonly [number, number]): Capsule => ({ from: a, to: a, radius: 0 });

/** Neighbouring points that repeat count once, last = first too for a closed outline. */
export function distinctPoints(points: readonly PointUm[], closed: boolean): PointUm[] {
  const kept = points.filter((point, at) => at === 0 || point[0] !== points[at - 1]?.[0] || point[1] !== points[at - 1]?.[1]);
  const [first, last] = [kept[0], kept.at(-1)];
  if (closed && kept.length > 1 && first && last && first[0] === last[0] && first[1] === last[1]) kept.pop();
  return kept;
}

/** cos and sin of an angle in degrees, exact at quarter turns. */
export function turn(angleDeg: number): { readonly cos: number; readonly sin: number } {
  const whole = ((angleDeg % 360) + 360) % 360;
  if (whole % 90 === 0) {
    const quarter = whole / 90;
    return { cos: [1, 0, -1, 0][quarter] ?? 1, sin: [0, 1, 0, -1][quarter] ?? 0 };
  }
  const radians = (whole * Math.PI) / 180;
  return { cos: Math.cos(radians), sin: Math.sin(radians) };
}

/** Geometry of a drawn shape. The faults of its form were asked before. */
export function outlineOf(shape: DrawnShape): Outline {
  if (shape.kind === 'circle') {
    return { origin: shape.center, capsules: [{ ...dot([0, 0]), radius: shape.diameter / 2 }], ellipse: null, filled: [] };
  }
  if (shape.kind === 'ellipse') {
    const semi = [shape.axes[0] / 2, shape.axes[1] / 2] as const;
    return { origin: shape.center, capsules: [], ellipse: { semi, ...turn(shape.angle ?? 0) }, filled: [] };
  }
  const points = distinctPoints(shape.points, shape.kind === 'polygon');
  const origin = points[0] ?? [0, 0];
  const places = points.map(([x, y]) => [x - origin[0], y - origin[1]] as const);
  const radius = shape.kind === 'polyline' ? shape.width / 2 : 0;
  const ends = shape.kind === 'polygon' ? [...places.slice(1), places[0] ?? ([0, 0] as const)] : places.slice(1);
  const capsules = ends.map((to, at) => ({ from: places[at] ?? to, to, radius }));
  return { origin, capsules, ellipse: null, filled: shape.kind === 'polygon' ? places : [] };
}

/** A filled polygon (a zone) as an outline. */
export function outlineOfPolygon(points: readonly PointUm[]): Outline {
  return outlineOf({ kind: 'polygon', points });
}

/** Largest extent of the outline in a direction (cos, sin), from a place given relative to its origin. */
export function support(outline: Outline, cos: number, sin: number, dx: number, dy: number): number {
  let most = -Infinity;
  for (const { from, to, radius } of outline.capsules) {
    most = Math.max(most, (from[0] + dx) * cos + (from[1] + dy) * sin + radius, (to[0] + dx) * cos + (to[1] + dy) * sin + radius);
  }
  if (outline.ellipse) {
    const { semi, cos: c, sin: s } = outline.ellipse;
    const along = semi[0] * (cos * c + sin * s);
    const across = semi[1] * (sin * c - cos * s);
    most = Math.max(most, dx * cos + dy * sin + Math.hypot(along, across));
  }
  return most;
}

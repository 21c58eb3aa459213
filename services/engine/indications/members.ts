import type { Criteria, Indication, IndicationClass, IndicationRuleSet, Observations, PointUm, Zone } from '../evaluate/types';
import { multiply, rationalOf, roundHalfEven, type Rational } from '../quantity/decimal';
import { calipersOf } from './caliper';
import { roundArea, type Nanometres } from './exact-length';
import { distinctPoints, outlineOf, outlineOfPolygon, type DrawnShape, type Outline } from './outline';
import { separation } from './separation';

/** An indication with everything the rules ask of it. */
export interface Member {
  readonly indication: Indication;
  readonly id: string;
  readonly outline: Outline | null;
  readonly length: Nanometres | null;
  readonly width: Nanometres | null;
  /** Whole µm²; null for a mark without a scale. */
  readonly area: number | null;
  /** Centroid relative to `outline.origin`, µm. */
  readonly centroid: readonly [number, number];
  readonly class: IndicationClass | null;
  readonly zones: readonly string[];
  readonly relevant: boolean;
}

/** Linear or rounded by the plan's ratio (rule I4); null where the plan has no ratio. */
export function classOf(linear: Criteria['linear'], length: Nanometres, width: Nanometres): IndicationClass | null {
  if (!linear) return null;
  const edge = roundHalfEven(multiply(rationalOf(linear.ratio), { n: BigInt(width), d: 1n }), 0).n;
  const long = BigInt(length);
  return long > edge || (linear.at === 'at-or-above' && long === edge) ? 'linear' : 'rounded';
}

function polygonMoments(points: readonly PointUm[]): { area: number; centroid: readonly [number, number] } {
  const corners = distinctPoints(points, true);
  const [ox, oy] = corners[0] ?? [0, 0];
  let [twice, sx, sy] = [0, 0, 0];
  corners.forEach((a, at) => {
    const b = corners[(at + 1) % corners.length] ?? a;
    const [ax, ay, bx, by] = [a[0] - ox, a[1] - oy, b[0] - ox, b[1] - oy];
    const cross = ax * by - bx * ay;
    twice += cross;
    sx += (ax + bx) * cross;
    sy += (ay + by) * cross;
  });
  return { area: Math.abs(twice) / 2, centroid: twice === 0 ? [0, 0] : [sx / (3 * twice), sy / (3 * twice)] };
}

function lineMoments(points: readonly PointUm[], width: number): { area: number; centroid: readonly [number, number] } {
  const places = distinctPoints(points, false);
  const [ox, oy] = places[0] ?? [0, 0];
  let [total, sx, sy] = [0, 0, 0];
  places.slice(1).forEach((b, at) => {
    const a = places[at] ?? b;
    const length = Math.hypot(b[0] - a[0], b[1] - a[1]);
    total += length;
    sx += length * ((a[0] - ox + b[0] - ox) / 2);
    sy += length * ((a[1] - oy + b[1] - oy) / 2);
  });
  return { area: total * width, centroid: total === 0 ? [0, 0] : [sx / total, sy / total] };
}

function momentsOf(shape: DrawnShape): { area: number; centroid: readonly [number, number] } {
  if (shape.kind === 'circle') return { area: (Math.PI * shape.diameter * shape.diameter) / 4, centroid: [0, 0] };
  if (shape.kind === 'ellipse') return { area: (Math.PI * shape.axes[0] * shape.axes[1]) / 4, centroid: [0, 0] };
  return shape.kind === 'polygon' ? polygonMoments(shape.points) : lineMoments(shape.points, shape.width);
}

function zonesTouched(outline: Outline, view: string, zones: readonly (readonly [Zone, Outline])[]): string[] {
  return zones.filter(([zone, area]) => zone.view === view && separation(outline, area) === 0).map(([zone]) => zone.id);
}

function memberOf(indication: Indication, criteria: Criteria, zones: readonly (readonly [Zone, Outline])[]): Member {
  const base = { indication, id: indication.id, relevant: indication.relevant?.is !== false };
  const { shape } = indication;
  if (shape === null)
    return { ...base, outline: null, length: null, width: null, area: null, centroid: [0, 0], class: null, zones: [] };
  if (shape.kind === 'entered') {
    const [length, width] = [shape.length * 1000, shape.width * 1000];
    const area = roundArea((Math.PI * shape.length * shape.width) / 4);
    return {
      ...base,
      outline: null,
      length,
      width,
      area,
      centroid: [0, 0],
      class: classOf(criteria.linear, length, width),
      zones: [shape.zone],
    };
  }
  const outline = outlineOf(shape);
  const { length, width } = calipersOf(shape);
  const { area, centroid } = momentsOf(shape);
  return {
    ...base,
    outline,
    length,
    width,
    area: roundArea(area),
    centroid,
    class: classOf(criteria.linear, length, width),
    zones: zonesTouched(outline, indication.view, zones),
  };
}

/** Every indication with its sizes, class and zones, sorted by id. */
export function membersOf(criteria: Criteria, observations: Observations): Member[] {
  const zones = (criteria.zones ?? []).map((zone) => [zone, outlineOfPolygon(zone.polygon)] as const);
  const sorted = [...(observations.indications ?? [])].sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0));
  return sorted.map((indication) => memberOf(indication, criteria, zones));
}

/** Does a set's list of types or methods hold a word? */
export function holds(list: readonly string[], word: string): boolean {
  return list.includes('*') || list.includes(word);
}

/** Is the indication of a method, a type and (for one without a scale) a view that the set speaks of? */
export function isCovered(member: Member, set: IndicationRuleSet, views: ReadonlyMap<string, string>): boolean {
  const { method, type, view } = member.indication;
  if (!holds(set.methods, method) || !holds(set.types, type)) return false;
  if (member.indication.shape === null) return set.zones.some((zone) => views.get(zone) === view);
  return member.zones.some((zone) => set.zones.includes(zone));
}

/** A limit in the drawing's length unit as exact nanometres. */
export function nanometresOf(limit: string, unit: Criteria['lengthUnit']): Rational {
  return multiply(rationalOf(limit), unit === 'in' ? { n: 25_400_000n, d: 1n } : { n: 1_000_000n, d: 1n });
}

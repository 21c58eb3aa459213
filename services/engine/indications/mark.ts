import type { Criteria, Indication, IndicationClass } from '../evaluate/types';
import { rationalOf } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { fromTo, measuresOf, outlineOf, polygonOutline } from './geometry/outline';
import type { Outline, Place } from './geometry/outline';
import { boxGap } from './geometry/points';
import { separationOf } from './geometry/separation';
import { nmOf, timesNm, wholeUm2 } from './rounding';

/** When a length counts as linear against a width: the plan says both, there is no default. */
export interface LinearRule {
  readonly ratio: Rational;
  readonly at: 'above' | 'at-or-above';
}

/** An indication as measured: lengths in whole nanometres, area in whole µm². */
export interface Mark {
  /** Position among the marks sorted by id. */
  readonly index: number;
  readonly indication: Indication;
  readonly relevant: boolean;
  /** Null when entered without a picture, or without a scale. */
  readonly drawn: { readonly outline: Outline; readonly centroid: Place } | null;
  /** Entered with nothing else within the largest distance its zone's rules use. */
  readonly apart: boolean;
  /** Null without a scale, as all the sizes then are. */
  readonly sizes: { readonly lengthNm: number; readonly widthNm: number; readonly areaUm2: number } | null;
  readonly class: IndicationClass | null;
  /** Ids of the zones it touches, in criteria order. */
  readonly zones: readonly string[];
}

export function linearRuleOf(criteria: Criteria): LinearRule | null {
  return criteria.linear ? { ratio: rationalOf(criteria.linear.ratio), at: criteria.linear.at } : null;
}

/** Whether a length stands above (at or above) ratio × width, both in whole nanometres. */
export function isLinear(lengthNm: number, widthNm: number, linear: LinearRule): boolean {
  const edge = timesNm(linear.ratio, widthNm);
  return linear.at === 'above' ? lengthNm > edge : lengthNm >= edge;
}

function sizesOf(shape: Indication['shape']): Mark['sizes'] {
  if (shape === null) return null;
  if (shape.kind === 'entered') {
    const { length, width } = shape;
    return { lengthNm: length * 1000, widthNm: width * 1000, areaUm2: wholeUm2((Math.PI / 4) * length * width) };
  }
  const measures = measuresOf(shape);
  return { lengthNm: nmOf(measures.length), widthNm: nmOf(measures.width), areaUm2: wholeUm2(measures.area) };
}

interface DrawnZone {
  readonly id: string;
  readonly view: string;
  readonly outline: Outline;
}

export function drawnZonesOf(criteria: Criteria): readonly DrawnZone[] {
  return (criteria.zones ?? []).map(({ id, view, polygon }) => ({ id, view, outline: polygonOutline(polygon) }));
}

function touches(one: Outline, other: Outline): boolean {
  return nmOf(boxGap(one.box, other.box)) === 0 && nmOf(separationOf(one, other)) === 0;
}

/** Measures one indication and finds its zones. */
export function markOf(indication: Indication, index: number, zones: readonly DrawnZone[], linear: LinearRule | null): Mark {
  const { shape, view } = indication;
  const sizes = sizesOf(shape);
  const drawn = shape && shape.kind !== 'entered' ? { outline: outlineOf(shape), centroid: measuresOf(shape).centroid } : null;
  const touched = drawn
    ? zones.filter((zone) => zone.view === view && touches(drawn.outline, zone.outline)).map((zone) => zone.id)
    : [];
  return {
    index,
    indication,
    relevant: indication.relevant?.is !== false,
    drawn,
    apart: shape?.kind === 'entered' && shape.apart === true,
    sizes,
    class: sizes && linear ? (isLinear(sizes.lengthNm, sizes.widthNm, linear) ? 'linear' : 'rounded') : null,
    zones: shape?.kind === 'entered' ? [shape.zone] : touched,
  };
}

/** All indications measured, sorted by id. */
export function marksOf(criteria: Criteria, indications: readonly Indication[]): readonly Mark[] {
  const zones = drawnZonesOf(criteria);
  const linear = linearRuleOf(criteria);
  return [...indications]
    .sort((a, b) => (a.id < b.id ? -1 : a.id > b.id ? 1 : 0))
    .map((indication, index) => markOf(indication, index, zones, linear));
}

/** From one drawn mark's centroid to another's, µm; zero for what has no place. */
export function centroidStep(from: Mark, to: Mark): { x: number; y: number } {
  return from.drawn && to.drawn ? fromTo(from.drawn.centroid, to.drawn.centroid) : { x: 0, y: 0 };
}

import type { IndicationClass, IndicationRuleSet, Zone } from '../evaluate/types';
import { growthOf } from './growth';
import type { Growth } from './growth';
import { groupsOf } from './grouping';
import type { Group, GroupingTerms } from './grouping';
import { isLinear } from './mark';
import type { Mark } from './mark';
import type { LengthUnit } from './rounding';
import type { Separations } from './separations';

/** One indication in one zone, as one rule set sees it by one method. */
export interface Member {
  readonly mark: Mark;
  /** Null for a mark without a scale. */
  readonly group: Group | null;
  /** Its group is at or above the recordable size as things stand. */
  readonly judged: boolean;
  /** As `judged`, or could become so once what is not known is known. */
  readonly maybeJudged: boolean;
  /** The largest its group could become, nm; its present length where nothing waits. */
  readonly upperNm: number;
  readonly couldBe: (wanted: IndicationClass) => boolean;
  /** Entered without a place and not said to be apart, while another judged member is in the zone. */
  readonly unplaced: boolean;
}

/** What the rules of one set look at in one zone by one method. */
export interface Scene {
  readonly unit: LengthUnit;
  readonly terms: GroupingTerms;
  readonly separations: Separations;
  readonly members: readonly Member[];
  /** Marks without a scale that the set covers on the zone's view. */
  readonly scaleless: boolean;
  /** Groups of the zone may grow by an indication without a place. */
  readonly growing: boolean;
}

/** Marks of one method on one view that a rule set covers, and their groups. */
export interface Covered {
  readonly marks: readonly Mark[];
  readonly groups: readonly Group[];
  readonly growth: Growth;
}

function names(list: readonly string[], name: string): boolean {
  return list.includes('*') || list.includes(name);
}

/** Whether a set covers a mark: by method, type, view and zone; without a scale there is no zone to ask. */
export function covers(set: IndicationRuleSet, mark: Mark, zones: readonly Zone[]): boolean {
  const { method, type } = mark.indication;
  if (!names(set.methods, method) || !names(set.types, type)) return false;
  if (mark.sizes) return mark.zones.some((id) => set.zones.includes(id));
  return zones.some((zone) => set.zones.includes(zone.id) && zone.view === mark.indication.view);
}

/** Groups what a set covers by one method on one view. */
export function coveredOf(marks: readonly Mark[], terms: GroupingTerms, separations: Separations): Covered {
  return { marks, groups: groupsOf(marks, terms, separations), growth: growthOf(marks, terms, separations) };
}

function placeless(mark: Mark): boolean {
  return mark.sizes !== null && mark.drawn === null && !mark.apart;
}

/** What the rules look at in one zone. */
export function sceneOf(zone: Zone, covered: Covered, terms: GroupingTerms, unit: LengthUnit, separations: Separations): Scene {
  const standing = covered.groups.flatMap((group) =>
    group.members.filter((mark) => mark.zones.includes(zone.id)).map((mark) => ({ mark, group })),
  );
  const judged = standing.filter(({ group }) => group.judged).map(({ mark }) => mark);
  const isUnplaced = (mark: Mark) => placeless(mark) && judged.some((other) => other !== mark);
  const loose = standing.map(({ mark }) => mark).filter(isUnplaced);
  const without = covered.marks.filter((mark) => mark.sizes === null);
  const growing = terms.distance !== null && loose.length > 0;
  const upper = terms.distance === null ? null : covered.growth(loose, without.length > 0);
  const looseWidths = loose.map((mark) => mark.sizes?.widthNm ?? 0);
  const members = standing.map(({ mark, group }): Member => {
    const upperNm = Math.max(group.lengthNm, upper?.(mark) ?? 0);
    const grows = upperNm > group.lengthNm;
    const narrowest = Math.min(...group.members.map((member) => member.sizes?.widthNm ?? 0), ...looseWidths);
    const couldBe = (wanted: IndicationClass) =>
      group.classes.has(wanted) ||
      (grows &&
        (wanted === 'rounded' || terms.linear === null || upperNm === Infinity || isLinear(upperNm, narrowest, terms.linear)));
    const maybeJudged = upperNm >= terms.recordableNm;
    return { mark, group, judged: group.judged, maybeJudged, upperNm, couldBe, unplaced: loose.includes(mark) };
  });
  const scaleless = without.map((mark): Member => ({
    mark,
    group: null,
    judged: false,
    maybeJudged: true,
    upperNm: Infinity,
    couldBe: () => true,
    unplaced: false,
  }));
  return { unit, terms, separations, members: [...members, ...scaleless], scaleless: scaleless.length > 0, growing };
}

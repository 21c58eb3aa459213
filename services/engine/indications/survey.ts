import type { Criteria, IndicationRule, IndicationRuleSet, Observations, Zone } from '../evaluate/types';
import type { Group, GroupingTerms } from './grouping';
import { mergeDistanceOf } from './grouping';
import { linearRuleOf, marksOf } from './mark';
import type { Mark } from './mark';
import { lengthLimit } from './rounding';
import type { LengthUnit } from './rounding';
import { coveredOf, covers, sceneOf } from './scene';
import type { Covered, Scene } from './scene';
import { separationsTable } from './separations';
import type { Separations } from './separations';

/** A rule of a set with its position; the crack row that the engine adds has −1. */
export interface PlacedRule {
  readonly index: number;
  readonly rule: IndicationRule;
}

/** One rule set with its zones and what it covers, by method and view. */
export interface SurveyedSet {
  readonly set: IndicationRuleSet;
  readonly rules: readonly PlacedRule[];
  readonly zones: readonly Zone[];
  /** Of the set's methods those that were carried out. */
  readonly methods: readonly string[];
  readonly groups: readonly Group[];
  /** What its rules look at in one of its zones, one scene for each of `methods`. */
  readonly scenesOf: (zone: Zone) => readonly Scene[];
}

export interface Survey {
  readonly unit: LengthUnit;
  readonly marks: readonly Mark[];
  readonly sets: readonly SurveyedSet[];
}

/** The rules of a set, before them the row that rejects cracks unless the drawing's words allow them. */
export function rulesOf(set: IndicationRuleSet): readonly PlacedRule[] {
  const own = (set.rules ?? []).map((rule, index) => ({ index, rule }));
  const seesCracks = set.types.includes('crack') || set.types.includes('*');
  const allowed = set.cracksAllowed !== undefined && set.cracksAllowed !== null;
  return seesCracks && !allowed ? [{ index: -1, rule: { kind: 'not-allowed', types: ['crack'] } }, ...own] : own;
}

function surveySet(
  set: IndicationRuleSet,
  criteria: Criteria,
  observations: Observations,
  marks: readonly Mark[],
  separations: Separations,
): SurveyedSet {
  const unit = criteria.lengthUnit ?? 'mm';
  const zones = set.zones.flatMap((id) => (criteria.zones ?? []).filter((zone) => zone.id === id));
  const carriedOut = [...new Set(observations.methods ?? [])];
  const methods = carriedOut.filter((method) => set.methods.includes('*') || set.methods.includes(method));
  const terms: GroupingTerms = {
    distance: set.merge ? mergeDistanceOf(set.merge, unit) : null,
    recordableNm: set.recordable ? lengthLimit(set.recordable, unit).ceil : 0,
    linear: linearRuleOf(criteria),
  };
  const relevant = marks.filter((mark) => mark.relevant && covers(set, mark, zones));
  const covered = new Map<string, ReadonlyMap<string, Covered>>();
  for (const method of methods) {
    const views = new Map<string, Covered>();
    for (const view of new Set(zones.map((zone) => zone.view))) {
      const seen = relevant.filter(({ indication }) => indication.method === method && indication.view === view);
      views.set(view, coveredOf(seen, terms, separations));
    }
    covered.set(method, views);
  }
  const known = new Map<Zone, readonly Scene[]>();
  const scenesOf = (zone: Zone): readonly Scene[] => {
    const scenes =
      known.get(zone) ??
      methods.flatMap((method) => {
        const view = covered.get(method)?.get(zone.view);
        return view ? [sceneOf(zone, view, terms, unit, separations)] : [];
      });
    known.set(zone, scenes);
    return scenes;
  };
  return {
    set,
    rules: rulesOf(set),
    zones,
    methods,
    groups: [...covered.values()].flatMap((views) => [...views.values()].flatMap((view) => view.groups)),
    scenesOf,
  };
}

/** Measures every indication and groups what each rule set covers. The body has passed its form checks. */
export function surveyOf(criteria: Criteria, observations: Observations): Survey {
  const marks = marksOf(criteria, observations.indications ?? []);
  const separations = separationsTable();
  return {
    unit: criteria.lengthUnit ?? 'mm',
    marks,
    sets: (criteria.indicationRules ?? []).map((set) => surveySet(set, criteria, observations, marks, separations)),
  };
}

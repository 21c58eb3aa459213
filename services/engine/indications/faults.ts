import type { Fault } from '../evaluate/fault';
import type { Criteria, Indication, IndicationRuleSet, Observations, Zone } from '../evaluate/types';
import {
  decimalAboveZero,
  fault,
  filledText,
  isObject,
  listAt,
  listOf,
  noRepeats,
  objectOf,
  oneOf,
  optional,
  required,
  requiredOrNull,
  textAt,
  truth,
  valueAt,
  whole,
  wordName,
} from '../form/check';
import { ruleSetForm, usesClass } from './forms/rule-form';
import { shapeForm, simplePolygon } from './forms/shape-form';
import { drawnZonesOf, markOf } from './mark';
import { alignmentTooLong } from './rules/places';
import { covers } from './scene';
import { rulesOf, surveyOf } from './survey';

const linearForm = objectOf({ ratio: required(decimalAboveZero), at: required(oneOf('above', 'at-or-above')) });
const zoneForm = objectOf({ id: required(filledText), view: required(filledText), polygon: required(simplePolygon) });
const indicationForm = objectOf({
  id: required(filledText),
  method: required(wordName),
  type: required(wordName),
  view: required(filledText),
  shape: requiredOrNull(shapeForm),
  severity: optional(
    objectOf({
      category: required(filledText),
      level: required(whole(0, Number.MAX_SAFE_INTEGER)),
      reference: optional(filledText),
      medium: optional(filledText),
      plate: optional(filledText),
    }),
  ),
  relevant: optional(objectOf({ is: required(truth), reason: optional(filledText) })),
});

/** Checks each item of a list and answers the sound ones with their positions. */
function soundItems(
  list: unknown,
  form: (value: unknown, path: string, faults: Fault[]) => boolean,
  path: string,
  faults: Fault[],
): readonly { readonly item: unknown; readonly index: number }[] {
  if (list === undefined) return [];
  if (!Array.isArray(list)) {
    fault(faults, path, 'must be a list');
    return [];
  }
  return (list as readonly unknown[]).flatMap((item, index) => (form(item, `${path}.${index}`, faults) ? [{ item, index }] : []));
}

function zoneNameFaults(criteria: unknown, faults: Fault[]): void {
  const known = new Set(listAt(criteria, 'zones').map((zone) => textAt(zone, 'id')));
  listAt(criteria, 'indicationRules').forEach((set, index) => {
    const seen = new Set<unknown>();
    listAt(set, 'zones').forEach((id, place) => {
      const path = `criteria.indicationRules.${index}.zones.${place}`;
      if (typeof id !== 'string' || id.trim() === '') return;
      if (!known.has(id)) fault(faults, path, 'is no zone of the criteria');
      else if (seen.has(id)) fault(faults, path, 'is named twice');
      seen.add(id);
    });
  });
}

function unitAndLinearFaults(criteria: unknown, faults: Fault[]): void {
  const unit = valueAt(criteria, 'lengthUnit');
  const sets = listAt(criteria, 'indicationRules');
  if (unit !== undefined) oneOf('mm', 'in')(unit, 'criteria.lengthUnit', faults);
  else if (sets.length > 0) fault(faults, 'criteria.lengthUnit', 'is required with a rule set');
  const linear = valueAt(criteria, 'linear');
  if (linear !== undefined) linearForm(linear, 'criteria.linear', faults);
  else if (sets.some(usesClass)) fault(faults, 'criteria.linear', 'is required where a rule names a class');
}

interface Sound {
  readonly zones: readonly Zone[];
  readonly sets: readonly IndicationRuleSet[];
}

function criteriaFaults(criteria: unknown, faults: Fault[]): Sound {
  unitAndLinearFaults(criteria, faults);
  const zones = soundItems(valueAt(criteria, 'zones'), zoneForm, 'criteria.zones', faults);
  noRepeats(listAt(criteria, 'zones'), 'id', 'criteria.zones', faults);
  const sets = soundItems(valueAt(criteria, 'indicationRules'), ruleSetForm, 'criteria.indicationRules', faults);
  noRepeats(listAt(criteria, 'indicationRules'), 'id', 'criteria.indicationRules', faults);
  zoneNameFaults(criteria, faults);
  return { zones: zones.map(({ item }) => item as Zone), sets: sets.map(({ item }) => item as IndicationRuleSet) };
}

function methodFaults(observations: unknown, faults: Fault[]): void {
  const methods = valueAt(observations, 'methods');
  const good = methods === undefined || listOf(wordName)(methods, 'observations.methods', faults);
  if (!good) return;
  const carriedOut = new Set(listAt(observations, 'methods'));
  listAt(observations, 'indications').forEach((item, index) => {
    const method = textAt(item, 'method');
    if (method === undefined || carriedOut.has(method) || !wordName(method, '', [])) return;
    fault(faults, `observations.indications.${index}.method`, 'was not carried out');
  });
}

function enteredZoneFaults(criteria: unknown, observations: unknown, faults: Fault[]): void {
  const views = new Map(listAt(criteria, 'zones').map((zone) => [textAt(zone, 'id'), textAt(zone, 'view')] as const));
  listAt(observations, 'indications').forEach((item, index) => {
    const shape = valueAt(item, 'shape');
    const zone = textAt(shape, 'zone');
    if (textAt(shape, 'kind') !== 'entered' || zone === undefined || zone.trim() === '') return;
    const path = `observations.indications.${index}`;
    const view = textAt(item, 'view');
    if (!views.has(zone)) fault(faults, `${path}.shape.zone`, 'is no zone of the criteria');
    else if (view !== undefined && views.get(zone) !== undefined && views.get(zone) !== view) {
      fault(faults, `${path}.view`, 'is not the view of its zone');
    }
  });
}

/** A type that a covering set does not allow cannot be called not relevant, and nothing can without a reason. */
function relevanceFaults(indication: unknown, index: number, sound: Sound, isSound: boolean, faults: Fault[]): void {
  const relevant = valueAt(indication, 'relevant');
  if (valueAt(relevant, 'is') !== false) return;
  const path = `observations.indications.${index}.relevant`;
  if (valueAt(relevant, 'reason') === undefined) fault(faults, `${path}.reason`, 'is required for what is not relevant');
  if (!isSound) return;
  const { type } = indication as Indication;
  const mark = markOf(indication as Indication, 0, drawnZonesOf({ zones: sound.zones }), null);
  const forbidding = sound.sets.find(
    (set) =>
      covers(set, mark, sound.zones) &&
      rulesOf(set).some(({ rule }) => rule.kind === 'not-allowed' && (rule.types?.includes(type) || rule.types?.includes('*'))),
  );
  if (forbidding) fault(faults, path, `rule set ${forbidding.id} does not allow ${type}: it cannot be called not relevant`);
}

function alignmentFaults(criteria: Criteria, observations: Observations, faults: Fault[]): void {
  const aligns = (criteria.indicationRules ?? []).some((set) => set.rules?.some((rule) => rule.kind === 'alignment'));
  if (!aligns || (observations.indications ?? []).length <= 200) return;
  surveyOf(criteria, observations).sets.forEach((surveyed, at) => {
    for (const { rule, index } of surveyed.rules) {
      if (rule.kind !== 'alignment') continue;
      const tooLong = surveyed.zones.some((zone) => surveyed.scenesOf(zone).some((scene) => alignmentTooLong(rule, scene)));
      if (!tooLong) continue;
      const path = `criteria.indicationRules.${at}.rules.${index}`;
      fault(faults, path, 'alignment among more than 200 indications that hang together by its gap takes too long');
    }
  });
}

/**
 * Adds every fault of form and meaning of the length unit, linear, zones, rule sets, methods carried out and indications, in one
 * pass. Either part may be anything; what is absent is not looked at.
 */
export function indicationFaults(criteria: unknown, observations: unknown, faults: Fault[]): void {
  const sound = criteriaFaults(criteria, faults);
  methodFaults(observations, faults);
  const list = valueAt(observations, 'indications');
  const items = soundItems(list, indicationForm, 'observations.indications', faults);
  noRepeats(listAt(observations, 'indications'), 'id', 'observations.indications', faults);
  enteredZoneFaults(criteria, observations, faults);
  const soundAt = new Set(items.map(({ index }) => index));
  listAt(observations, 'indications').forEach((item, index) => relevanceFaults(item, index, sound, soundAt.has(index), faults));
  if (faults.length > 0 || !isObject(criteria) || !isObject(observations)) return;
  alignmentFaults(criteria as Criteria, observations as Observations, faults);
}

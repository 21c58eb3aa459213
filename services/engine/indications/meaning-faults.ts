import type { Fault } from '../evaluate/fault';
import type { PointUm } from '../evaluate/types';
import { fault, listAt, textAt, valueAt } from '../form/check';
import { distinctPoints } from './outline';
import { bordersMeet } from './simple-polygon';

function texts(value: unknown, key: string): string[] {
  return listAt(value, key).filter((one): one is string => typeof one === 'string');
}

function usesClass(set: unknown): boolean {
  return listAt(set, 'rules').some((rule) => valueAt(rule, 'class') !== undefined || valueAt(rule, 'classes') !== undefined);
}

function isCorner(value: unknown): value is PointUm {
  return (
    Array.isArray(value) && value.length === 2 && value.every((one) => Number.isInteger(one) && Math.abs(one as number) <= 1e8)
  );
}

function zoneFaults(criteria: unknown, faults: Fault[]): void {
  listAt(criteria, 'zones').forEach((zone, at) => {
    const corners = listAt(zone, 'polygon');
    if (corners.length < 3 || !corners.every(isCorner)) return;
    const distinct = distinctPoints(corners, true);
    const path = `criteria.zones.${String(at)}.polygon`;
    if (new Set(distinct.map(String)).size < 3) fault(faults, path, 'must have at least 3 different corners');
    else if (bordersMeet(distinct)) fault(faults, path, 'must not cross or touch itself');
  });
}

function ruleSetFaults(criteria: unknown, faults: Fault[]): void {
  const sets = listAt(criteria, 'indicationRules');
  if (sets.length > 0 && valueAt(criteria, 'lengthUnit') === undefined)
    fault(faults, 'criteria.lengthUnit', 'is required with a rule set');
  if (sets.some(usesClass) && valueAt(criteria, 'linear') === undefined)
    fault(faults, 'criteria.linear', 'is required where a rule uses a class');
  const zones = new Set(listAt(criteria, 'zones').map((zone) => textAt(zone, 'id')));
  sets.forEach((set, at) => {
    texts(set, 'zones').forEach((zone, place) => {
      if (!zones.has(zone))
        fault(faults, `criteria.indicationRules.${String(at)}.zones.${String(place)}`, 'is no zone of the criteria');
    });
  });
}

function indicationMeaning(criteria: unknown, observations: unknown, faults: Fault[]): void {
  const methods = new Set(texts(observations, 'methods'));
  const zones = new Map(listAt(criteria, 'zones').map((zone) => [textAt(zone, 'id'), textAt(zone, 'view')]));
  listAt(observations, 'indications').forEach((indication, at) => {
    const path = `observations.indications.${String(at)}`;
    const method = textAt(indication, 'method');
    if (method !== undefined && !methods.has(method)) fault(faults, `${path}.method`, 'is not among the methods carried out');
    const shape = valueAt(indication, 'shape');
    if (textAt(shape, 'kind') === 'entered') {
      const zone = textAt(shape, 'zone');
      if (zone !== undefined && !zones.has(zone)) fault(faults, `${path}.shape.zone`, 'is no zone of the criteria');
      else if (zone !== undefined && zones.get(zone) !== textAt(indication, 'view'))
        fault(faults, `${path}.view`, 'is not the view of the zone');
    }
    const relevant = valueAt(indication, 'relevant');
    if (valueAt(relevant, 'is') === false && valueAt(relevant, 'reason') === undefined)
      fault(faults, `${path}.relevant.reason`, 'is required when not relevant');
  });
}

/** Faults that need more than one place: zones that cross themselves, names that lead nowhere, what a class or length needs. */
export function meaningFaults(criteria: unknown, observations: unknown, faults: Fault[]): void {
  zoneFaults(criteria, faults);
  ruleSetFaults(criteria, faults);
  indicationMeaning(criteria, observations, faults);
}

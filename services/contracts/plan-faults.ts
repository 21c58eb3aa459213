import type { Fault } from '../engine/evaluate/fault';
import { planContent, type PlanContent } from './plan-content';
import { criteriaFaults } from '../engine/evaluate/evaluate';
import { derivedEntryFaults } from '../engine/methods/derived-entry-faults';

function numbersOf(list: unknown, key: string): Set<string> {
  if (!Array.isArray(list)) return new Set();
  return new Set(
    list
      .map((row: unknown) => (row as Record<string, unknown> | null)?.[key])
      .filter((value): value is string => typeof value === 'string'),
  );
}

function duplicates(values: readonly string[]): Set<string> {
  return new Set(values.filter((value, place) => values.indexOf(value) !== place));
}

/** References of the route that lead nowhere, and names used twice. */
function routeFaults(content: PlanContent): Fault[] {
  const faults: Fault[] = [];
  const known = {
    characteristics: numbersOf(content.criteria.characteristics, 'number'),
    attributes: numbersOf(content.criteria.attributes, 'number'),
    process: numbersOf(content.criteria.process, 'number'),
    indicationRules: numbersOf(content.criteria.indicationRules, 'id'),
    views: new Set(content.views.map(({ name }) => name)),
  };
  const keys = duplicates(content.route.map((row) => keyOfRequirement(row)));
  const used = {
    characteristics: new Set<string>(),
    attributes: new Set<string>(),
    process: new Set<string>(),
    indicationRules: new Set<string>(),
  };
  if (content.route.length === 0)
    faults.push({ path: 'route', message: 'has no operation: a part of this plan would be releasable at once' });
  content.route.forEach((row, place) => {
    if (keys.has(keyOfRequirement(row))) faults.push({ path: `route.${String(place)}.key`, message: 'is used twice' });
    for (const list of ['characteristics', 'attributes', 'process', 'indicationRules', 'views'] as const) {
      row[list].forEach((value, index) => {
        if (!known[list].has(value))
          faults.push({ path: `route.${String(place)}.${list}.${String(index)}`, message: `${value} is not in the plan` });
        if (list !== 'views') used[list].add(value);
      });
    }
  });
  for (const list of ['characteristics', 'attributes', 'process', 'indicationRules'] as const) {
    [...known[list]].forEach((value, index) => {
      if (!used[list].has(value))
        faults.push({ path: `criteria.${list}.${String(index)}`, message: `${value} is asked by no operation of the route` });
    });
  }
  return faults;
}

/** Zones must lie on a view of the plan. */
function viewFaults(content: PlanContent): Fault[] {
  const names = new Set(content.views.map(({ name }) => name));
  const zones = Array.isArray(content.criteria.zones) ? content.criteria.zones : [];
  return zones.flatMap((zone: unknown, place) => {
    const view = (zone as { view?: unknown } | null)?.view;
    return typeof view === 'string' && !names.has(view)
      ? [{ path: `criteria.zones.${String(place)}.view`, message: `${view} is not a view of the plan` }]
      : [];
  });
}

/** Rework must reopen operations that are in the route. */
function reworkFaults(content: PlanContent): Fault[] {
  const keys = new Set(content.route.map(keyOfRequirement));
  return content.rework.flatMap((kind, place) =>
    kind.reopens.flatMap((key, index) =>
      keys.has(key)
        ? []
        : [{ path: `rework.${String(place)}.reopens.${String(index)}`, message: `${key} is not an operation of the route` }],
    ),
  );
}

/** The key of a requirement: as given, else its operation number. */
export function keyOfRequirement(row: { readonly key?: string | undefined; readonly operation: string }): string {
  return row.key ?? `op-${row.operation}`;
}

/** As `planFaults`, for what is being typed: faults of form (a key that is no key, a place without a title) come first. */
export function typedPlanFaults(content: PlanContent): Fault[] {
  const parsed = planContent.safeParse(content);
  const form = parsed.success ? [] : parsed.error.issues.map(({ path, message }) => ({ path: path.join('.'), message }));
  return [...form, ...planFaults(content).filter(({ path }) => !form.some((one) => one.path === path))];
}

/** Derived characteristics against the plan's criteria and the engine's list of quantities. */
function derivedFaults(content: PlanContent): Fault[] {
  const rows = Array.isArray(content.criteria.characteristics) ? content.criteria.characteristics : [];
  const characteristics = rows.map((row: unknown) => {
    const { number, unit } = (row ?? {}) as { number?: unknown; unit?: unknown };
    return { number: String(number), unit: String(unit) };
  });
  return derivedEntryFaults(content.derived ?? [], characteristics);
}

/** Everything that stands against checking or approving a plan, in one pass: form and meaning of criteria, route, views, rework, derived quantities. */
export function planFaults(content: PlanContent): Fault[] {
  return [
    ...criteriaFaults(content.criteria),
    ...routeFaults(content),
    ...viewFaults(content),
    ...reworkFaults(content),
    ...derivedFaults(content),
  ];
}

import type { TechniqueContent } from '@/services/contracts/techniques';
import { compare, rationalOf } from '@/services/engine/quantity/decimal';
import { unitOf } from '@/services/engine/quantity/units';
import type { FieldError } from '@/services/http/problem';

interface Limits {
  readonly unit: string;
  readonly lower: string | null;
  readonly upper: string | null;
}

function limitFaults(path: string, { unit, lower, upper }: Limits): FieldError[] {
  return [
    ...(unitOf(unit) ? [] : [{ path: `${path}.unit`, message: `${unit} is not a known unit` }]),
    ...(lower === null && upper === null ? [{ path: `${path}.lower`, message: 'a limit below or above is needed' }] : []),
    ...(lower !== null && upper !== null && compare(rationalOf(lower), rationalOf(upper)) > 0
      ? [{ path: `${path}.upper`, message: 'is below the lower limit' }]
      : []),
  ];
}

function twice(path: string, key: string, names: readonly string[]): FieldError[] {
  return names.flatMap((name, place) =>
    names.indexOf(name) < place ? [{ path: `content.${path}.${String(place)}.${key}`, message: 'is named twice' }] : [],
  );
}

/** Everything that stands against checking a technique, in one pass. */
export function techniqueFaults({ parameters, windows, checks, views }: TechniqueContent): FieldError[] {
  return [
    ...(parameters.some(({ essential }) => essential)
      ? []
      : [
          {
            path: 'content.parameters',
            message: 'no essential parameter is named: nothing would say when a new issue is needed',
          },
        ]),
    ...twice(
      'parameters',
      'name',
      parameters.map(({ name }) => name),
    ),
    ...windows.flatMap((window, place) => limitFaults(`content.windows.${String(place)}`, window)),
    ...twice(
      'windows',
      'title',
      windows.map(({ title }) => title),
    ),
    ...views.flatMap((view, place) =>
      views.indexOf(view) < place ? [{ path: `content.views.${String(place)}`, message: 'is named twice' }] : [],
    ),
    ...checks.flatMap(({ window }, place) => (window ? limitFaults(`content.checks.${String(place)}.window`, window) : [])),
    ...twice(
      'checks',
      'title',
      checks.map(({ scope, title }) => `${scope}: ${title}`),
    ),
  ];
}

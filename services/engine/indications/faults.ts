import type { Fault } from '../evaluate/fault';
import type { IndicationRule } from '../evaluate/types';
import {
  anyText,
  decimalAboveZero,
  decimalNotNegative,
  fault,
  filledText,
  isObject,
  joinPath,
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
  wordNameOrAll,
  type Check,
} from '../form/check';
import { compare, rationalOf } from '../quantity/decimal';
import { meaningFaults } from './meaning-faults';
import { shapeForm } from './shape-form';

/** Rule kinds that are in the contract but not judged yet: refused by name, never approximated. */
export const unbuiltRuleKinds: readonly string[] = ['max-count-in-window', 'alignment'];

const kinds: readonly IndicationRule['kind'][] = [
  'not-allowed',
  'max-size',
  'size-bands',
  'max-count',
  'max-count-in-window',
  'min-separation',
  'max-total-length',
  'max-total-area',
  'alignment',
  'max-severity',
];

const className = oneOf('linear', 'rounded');
const filter = { kind: required(anyText), class: optional(className), types: optional(listOf(wordNameOrAll, 1)) };
const count = whole(0, 1_000_000);
const window = objectOf({ shape: required(oneOf('circle', 'square')), size: required(decimalAboveZero) });

const bands: Check = (value, path, faults) => {
  const band = objectOf({ to: required(decimalNotNegative), count: requiredOrNull(count) });
  if (!listOf(band, 1)(value, path, faults)) return false;
  const edges = (value as { to: string }[]).map(({ to }) => rationalOf(to));
  let good = true;
  edges.forEach((edge, at) => {
    const before = edges[at - 1];
    if (before && compare(edge, before) <= 0)
      good = fault(faults, joinPath(joinPath(path, at), 'to'), 'must rise strictly from band to band');
  });
  return good;
};

const forms: Readonly<Record<IndicationRule['kind'], Check>> = {
  'not-allowed': objectOf({
    kind: required(anyText),
    types: optional(listOf(wordNameOrAll, 1)),
    classes: optional(listOf(className, 1)),
  }),
  'max-size': objectOf({ ...filter, limit: required(decimalNotNegative) }),
  'size-bands': objectOf({ ...filter, counting: required(oneOf('each-band', 'this-band-and-above')), bands: required(bands) }),
  'max-count': objectOf({ ...filter, limit: required(count) }),
  'max-count-in-window': objectOf({ ...filter, window: required(window), limit: required(count) }),
  'min-separation': objectOf({ ...filter, limit: required(decimalNotNegative) }),
  'max-total-length': objectOf({ ...filter, limit: required(decimalNotNegative), window: optional(window) }),
  'max-total-area': objectOf({ ...filter, limit: required(decimalNotNegative), window: optional(window) }),
  alignment: objectOf({
    ...filter,
    count: required(whole(2, 1_000_000)),
    stripWidth: required(decimalAboveZero),
    gap: required(decimalAboveZero),
  }),
  'max-severity': objectOf({
    ...filter,
    category: required(filledText),
    reference: optional(filledText),
    medium: optional(filledText),
    plate: optional(filledText),
    limit: required(count),
    requiredFor: optional(listOf(wordName, 1)),
  }),
};

const rule: Check = (value, path, faults) => {
  if (!isObject(value)) return fault(faults, path, 'must be an object');
  const kind = textAt(value, 'kind');
  const known = kinds.find((one) => one === kind);
  if (!known)
    return fault(faults, joinPath(path, 'kind'), kind === undefined ? 'is required' : `must be one of ${kinds.join(', ')}`);
  if (unbuiltRuleKinds.includes(known)) return fault(faults, joinPath(path, 'kind'), `${known} is not judged by this engine yet`);
  if (known.startsWith('max-total') && valueAt(value, 'window') !== undefined) {
    return fault(faults, joinPath(path, 'window'), `${known} in a window is not judged by this engine yet`);
  }
  const good = forms[known](value, path, faults);
  if (known === 'not-allowed' && good && valueAt(value, 'types') === undefined && valueAt(value, 'classes') === undefined) {
    return fault(faults, joinPath(path, 'types'), 'types or classes must be named');
  }
  return good;
};

const merge: Check = (value, path, faults) => {
  if (isObject(value) && valueAt(value, 'within') !== undefined)
    return objectOf({ within: required(decimalAboveZero) })(value, path, faults);
  return objectOf({ factor: required(decimalAboveZero), of: required(oneOf('larger', 'smaller')) })(value, path, faults);
};

const ruleSet = objectOf({
  id: required(filledText),
  clause: optional(anyText),
  zones: required(listOf(filledText, 1)),
  methods: required(listOf(wordNameOrAll, 1)),
  types: required(listOf(wordNameOrAll, 1)),
  cracksAllowed: optional(filledText),
  recordable: optional(decimalNotNegative),
  merge: optional(merge),
  rules: optional(listOf(rule)),
});

const corner: Check = (value, path, faults) => {
  const good =
    Array.isArray(value) && value.length === 2 && value.every((one) => Number.isInteger(one) && Math.abs(one as number) <= 1e8);
  return good ? true : fault(faults, path, 'must be two whole numbers of micrometres');
};

const zone = objectOf({ id: required(filledText), view: required(filledText), polygon: required(listOf(corner, 3)) });
const severity = objectOf({
  category: required(filledText),
  level: required(count),
  reference: optional(filledText),
  medium: optional(filledText),
  plate: optional(filledText),
});

const indication = objectOf({
  id: required(filledText),
  method: required(wordName),
  type: required(wordName),
  view: required(filledText),
  shape: requiredOrNull(shapeForm),
  severity: optional(severity),
  relevant: optional(objectOf({ is: required(truth), reason: optional(filledText) })),
});

const linear = objectOf({ ratio: required(decimalAboveZero), at: required(oneOf('above', 'at-or-above')) });

function each(source: unknown, key: string, root: string, check: Check, faults: Fault[]): void {
  const value = valueAt(source, key);
  if (value !== undefined) listOf(check)(value, joinPath(root, key), faults);
  noRepeats(listAt(source, key), 'id', joinPath(root, key), faults);
}

/** Faults of form and meaning in everything that indications are judged by; adds all it finds. Tolerates any value. */
export function indicationFaults(criteria: unknown, observations: unknown, faults: Fault[]): void {
  const unit = valueAt(criteria, 'lengthUnit');
  if (unit !== undefined) oneOf('mm', 'in')(unit, 'criteria.lengthUnit', faults);
  const ratio = valueAt(criteria, 'linear');
  if (ratio !== undefined) linear(ratio, 'criteria.linear', faults);
  each(criteria, 'zones', 'criteria', zone, faults);
  each(criteria, 'indicationRules', 'criteria', ruleSet, faults);
  const methods = valueAt(observations, 'methods');
  if (methods !== undefined) listOf(wordName)(methods, 'observations.methods', faults);
  each(observations, 'indications', 'observations', indication, faults);
  meaningFaults(criteria, observations, faults);
}

import type { Fault } from '../../evaluate/fault';
import type { IndicationRule } from '../../evaluate/types';
import {
  anyText,
  decimalAboveZero,
  decimalNotNegative,
  fault,
  filledText,
  joinPath,
  listAt,
  listOf,
  objectOf,
  oneOf,
  optional,
  required,
  textAt,
  valueAt,
  whole,
  wordNameOrAll,
} from '../../form/check';
import type { Check, Field } from '../../form/check';
import { isDecimalText } from '../../quantity/decimal';
import { isBelow } from '../rounding';

const count = whole(0, Number.MAX_SAFE_INTEGER);
const names = listOf(wordNameOrAll, 1);
const className = oneOf('linear', 'rounded');
const window = objectOf({ shape: required(oneOf('circle', 'square')), size: required(decimalAboveZero) });
const band = objectOf({ to: required(decimalNotNegative), count: optional(count) });

/** Strictly rising edges. */
const bands: Check = (value, path, faults) => {
  let good = listOf(band, 1)(value, path, faults);
  if (!Array.isArray(value)) return good;
  const edges = (value as readonly unknown[]).map((item) => textAt(item, 'to') ?? '');
  edges.forEach((edge, index) => {
    const before = edges[index - 1] ?? '';
    if (!isDecimalText(edge) || !isDecimalText(before) || isBelow(before, edge)) return;
    good = fault(faults, `${path}.${index}.to`, 'must be above the band before');
  });
  return good;
};

const filters = { class: optional(className), types: optional(names) };

const fieldsOf: Readonly<Record<IndicationRule['kind'], Readonly<Record<string, Field>>>> = {
  'not-allowed': { types: optional(names), classes: optional(listOf(className, 1)) },
  'max-size': { ...filters, limit: required(decimalNotNegative) },
  'size-bands': { ...filters, counting: required(oneOf('each-band', 'this-band-and-above')), bands: required(bands) },
  'max-count': { ...filters, limit: required(count) },
  'max-count-in-window': { ...filters, window: required(window), limit: required(count) },
  'min-separation': { ...filters, limit: required(decimalNotNegative) },
  'max-total-length': { ...filters, limit: required(decimalNotNegative), window: optional(window) },
  'max-total-area': { ...filters, limit: required(decimalNotNegative), window: optional(window) },
  alignment: {
    ...filters,
    count: required(whole(2, Number.MAX_SAFE_INTEGER)),
    stripWidth: required(decimalAboveZero),
    gap: required(decimalAboveZero),
  },
  'max-severity': {
    ...filters,
    category: required(filledText),
    reference: optional(filledText),
    medium: optional(filledText),
    plate: optional(filledText),
    limit: required(count),
    requiredFor: optional(names),
  },
};

const kind = required(oneOf(...Object.keys(fieldsOf)));

/** One rule; a kind that is not one of these is refused by name. */
const ruleForm: Check = (value, path, faults) => {
  const name = textAt(value, 'kind');
  if (name === undefined || !Object.hasOwn(fieldsOf, name)) {
    const keys = Object.values(fieldsOf).flatMap((fields) => Object.keys(fields));
    const known = Object.fromEntries(keys.map((key) => [key, optional(() => true)]));
    return objectOf({ ...known, kind })(value, path, faults);
  }
  const good = objectOf({ kind, ...fieldsOf[name as IndicationRule['kind']] })(value, path, faults);
  if (name !== 'not-allowed' || valueAt(value, 'types') !== undefined || valueAt(value, 'classes') !== undefined) return good;
  return fault(faults, joinPath(path, 'types'), 'types or classes are required');
};

const elsewhere: Check = (_value, path, faults) => fault(faults, path, 'goes not with within');

/** A fixed distance, or a factor of the larger or smaller of two lengths. */
const merge: Check = (value, path, faults: Fault[]) =>
  valueAt(value, 'within') === undefined
    ? objectOf({
        within: optional(decimalAboveZero),
        factor: required(decimalAboveZero),
        of: required(oneOf('larger', 'smaller')),
      })(value, path, faults)
    : objectOf({ within: required(decimalAboveZero), factor: optional(elsewhere), of: optional(elsewhere) })(value, path, faults);

/** One rule set, by itself. */
export const ruleSetForm: Check = objectOf({
  id: required(filledText),
  clause: optional(anyText),
  zones: required(listOf(filledText, 1)),
  methods: required(names),
  types: required(names),
  cracksAllowed: optional(filledText),
  recordable: optional(decimalNotNegative),
  merge: optional(merge),
  rules: optional(listOf(ruleForm)),
});

/** Whether some rule of a set names a class, so that the plan must say what is linear. */
export function usesClass(set: unknown): boolean {
  return listAt(set, 'rules').some((rule) => valueAt(rule, 'class') !== undefined || valueAt(rule, 'classes') !== undefined);
}

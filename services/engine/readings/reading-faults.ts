import type { Fault } from '../evaluate/fault';
import type { Characteristic, Reading } from '../evaluate/types';
import {
  anyText,
  decimal,
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
  textAt,
  valueAt,
} from '../form/check';
import type { Check } from '../form/check';
import { compare, isDecimalText, multiply, rationalOf } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { unitOf } from '../quantity/units';
import { leavesNoZone, scaleOf } from './reading-scale';

const unit: Check = (value, path, faults) =>
  typeof value === 'string' && unitOf(value) !== undefined ? true : fault(faults, path, 'is not a unit of the list');

const riskShare: Check = (value, path, faults) => {
  if (!decimal(value, path, faults)) return false;
  const r = rationalOf(value as string);
  return r.n > 0n && 2n * r.n < r.d ? true : fault(faults, path, 'must be greater than 0 and less than 0.5');
};

const decisionRule = required(oneOf('simple', 'guarded', 'risk'));
const decisionForms: Readonly<Record<string, Check>> = {
  simple: objectOf({ rule: decisionRule, capability: optional(decimalAboveZero) }),
  guarded: objectOf({ rule: decisionRule, form: required(oneOf('binary', 'non-binary')), g: optional(decimalNotNegative) }),
  risk: objectOf({ rule: decisionRule, r: required(riskShare) }),
};
const anything: Check = () => true;
const ruleless = objectOf({
  rule: decisionRule,
  capability: optional(anything),
  form: optional(anything),
  g: optional(anything),
  r: optional(anything),
});

const decision: Check = (value, path, faults) => {
  const rule = textAt(value, 'rule');
  const form = rule !== undefined && Object.hasOwn(decisionForms, rule) ? decisionForms[rule] : undefined;
  return (form ?? ruleless)(value, path, faults);
};

const windowFields = {
  number: required(filledText),
  title: optional(anyText),
  unit: required(unit),
  lower: optional(decimal),
  upper: optional(decimal),
};
const characteristicForm = objectOf({
  ...windowFields,
  nominal: optional(decimal),
  rounding: optional(oneOf('absolute', 'rounded')),
  uncertaintyMax: optional(decimalAboveZero),
  decision: required(decision),
});
const uncertaintyForm = objectOf({ expanded: required(decimalAboveZero), k: required(decimalAboveZero), unit: optional(unit) });
const readingForm = objectOf({
  characteristic: required(filledText),
  value: required(decimal),
  unit: required(unit),
  uncertainty: optional(uncertaintyForm),
  void: optional(objectOf({ reason: required(filledText) })),
});
const attributeForm = objectOf({
  number: required(filledText),
  result: required(oneOf('conforming', 'nonconforming', 'not-inspected')),
  reason: optional(filledText),
});

function decimalAt(item: unknown, key: string): Rational | null {
  const text = textAt(item, key);
  return text !== undefined && isDecimalText(text) ? rationalOf(text) : null;
}

function limitFaults(item: unknown, path: string, faults: Fault[]): void {
  if (!isObject(item)) return;
  if (valueAt(item, 'lower') === undefined && valueAt(item, 'upper') === undefined) {
    fault(faults, joinPath(path, 'lower'), 'at least one of lower and upper is required');
  }
  const lower = decimalAt(item, 'lower');
  const upper = decimalAt(item, 'upper');
  if (lower !== null && upper !== null && compare(lower, upper) > 0)
    fault(faults, joinPath(path, 'lower'), 'must not be above upper');
}

function characteristicFaults(item: unknown, path: string, faults: Fault[]): void {
  limitFaults(item, path, faults);
  const rule = valueAt(item, 'decision');
  const name = textAt(rule, 'rule');
  if (valueAt(item, 'rounding') === 'rounded' && name !== undefined && name !== 'simple') {
    fault(faults, joinPath(path, 'rounding'), 'rounding before comparison goes only with the rule simple');
  }
  const oneSided = isObject(item) && (valueAt(item, 'lower') === undefined || valueAt(item, 'upper') === undefined);
  if (name === 'simple' && oneSided && valueAt(rule, 'capability') !== undefined) {
    fault(faults, `${path}.decision.capability`, 'a capability needs both limits');
  }
}

/** Faults of form and meaning of characteristics, attributes and process windows. */
export function windowFaults(criteria: unknown, faults: Fault[]): void {
  const lists = [
    ['characteristics', characteristicForm],
    ['attributes', objectOf({ number: required(filledText), title: optional(anyText) })],
    ['process', objectOf(windowFields)],
  ] as const;
  for (const [key, form] of lists) {
    const list = valueAt(criteria, key);
    const path = `criteria.${key}`;
    if (list !== undefined) listOf(form)(list, path, faults);
    noRepeats(listAt(criteria, key), 'number', path, faults);
  }
  listAt(criteria, 'characteristics').forEach((item, index) =>
    characteristicFaults(item, `criteria.characteristics.${index}`, faults),
  );
  listAt(criteria, 'process').forEach((item, index) => limitFaults(item, `criteria.process.${index}`, faults));
}

/** The items of a criteria list by their number. */
function byNumber(criteria: unknown, key: string): ReadonlyMap<string, unknown> {
  return new Map(
    listAt(criteria, key).flatMap((item) =>
      textAt(item, 'number') === undefined ? [] : [[textAt(item, 'number') ?? '', item] as const],
    ),
  );
}

function knownNumber(known: ReadonlyMap<string, unknown>, number: string | undefined, path: string, faults: Fault[]): void {
  if (number !== undefined && number.trim() !== '' && !known.has(number)) fault(faults, path, 'is not a number of the criteria');
}

function quantityFault(item: unknown, criterion: unknown, path: string, faults: Fault[]): void {
  const wanted = unitOf(textAt(criterion, 'unit') ?? '');
  const given = unitOf(textAt(item, 'unit') ?? '');
  if (wanted && given && wanted.quantity !== given.quantity)
    fault(faults, joinPath(path, 'unit'), `is no unit of ${wanted.quantity}`);
}

function readingFaults(criteria: unknown, observations: unknown, zoneless: boolean, faults: Fault[]): void {
  const known = byNumber(criteria, 'characteristics');
  const quiet: Fault[] = [];
  const good = new Map<unknown, boolean>();
  for (const item of known.values()) good.set(item, characteristicForm(item, '', quiet));
  listAt(observations, 'readings').forEach((item, index) => {
    const path = `observations.readings.${index}`;
    const criterion = known.get(textAt(item, 'characteristic') ?? '');
    knownNumber(known, textAt(item, 'characteristic'), joinPath(path, 'characteristic'), faults);
    quantityFault(item, criterion, path, faults);
    quantityFault(valueAt(item, 'uncertainty'), criterion, joinPath(path, 'uncertainty'), faults);
    if (!zoneless || !good.get(criterion) || valueAt(item, 'void') !== undefined || !readingForm(item, '', quiet)) return;
    const scale = scaleOf(criterion as Characteristic, item as Reading);
    if (scale && ordered(scale.lower, scale.upper) && leavesNoZone(scale.lower, scale.upper, scale.guard)) {
      fault(faults, joinPath(path, 'uncertainty'), 'the guard bands leave no acceptance zone between the limits');
    }
  });
}

function ordered(lower: Rational | null, upper: Rational | null): boolean {
  return lower === null || upper === null || compare(lower, upper) <= 0;
}

/** Faults of form and meaning of readings, attribute results and process values; R3 is asked when `zoneless`. */
export function observedFaults(criteria: unknown, observations: unknown, zoneless: boolean, faults: Fault[]): void {
  const lists = [
    ['readings', readingForm],
    ['attributes', attributeForm],
    ['process', objectOf({ number: required(filledText), value: required(decimal), unit: required(unit) })],
  ] as const;
  for (const [key, form] of lists) {
    const list = valueAt(observations, key);
    if (list !== undefined) listOf(form)(list, `observations.${key}`, faults);
  }
  readingFaults(criteria, observations, zoneless, faults);
  for (const key of ['attributes', 'process'] as const) {
    const known = byNumber(criteria, key);
    const path = `observations.${key}`;
    noRepeats(listAt(observations, key), 'number', path, faults);
    listAt(observations, key).forEach((item, index) => {
      knownNumber(known, textAt(item, 'number'), `${path}.${index}.number`, faults);
      if (key === 'process') quantityFault(item, known.get(textAt(item, 'number') ?? ''), joinPath(path, index), faults);
      else if (valueAt(item, 'result') === 'not-inspected' && valueAt(item, 'reason') === undefined) {
        fault(faults, `${path}.${index}.reason`, 'is required for what was not inspected');
      }
    });
  }
}

/** R3 at approval of a plan: the largest uncertainty allowed must leave a zone. */
export function uncertaintyMaxFaults(criteria: unknown, faults: Fault[]): void {
  listAt(criteria, 'characteristics').forEach((item, index) => {
    if (!characteristicForm(item, '', [])) return;
    const { decision: rule, lower, upper, uncertaintyMax } = item as Characteristic;
    if (rule.rule !== 'guarded' || !lower || !upper || !uncertaintyMax || !ordered(rationalOf(lower), rationalOf(upper))) return;
    const guard = multiply(rationalOf(rule.g ?? '1'), rationalOf(uncertaintyMax));
    if (leavesNoZone(rationalOf(lower), rationalOf(upper), guard)) {
      fault(
        faults,
        `criteria.characteristics.${index}.uncertaintyMax`,
        'the guard bands leave no acceptance zone between the limits',
      );
    }
  });
}

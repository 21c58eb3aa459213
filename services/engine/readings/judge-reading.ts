import type { Characteristic, Reading, ReadingRow, Verdict } from '../evaluate/types';
import { add, compare, decimalText, placesOf, rationalOf, roundHalfEven, subtract } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { sentence } from '../sentences/sentence';
import type { SentenceParameters } from '../sentences/sentence';
import { conformanceOf, reportedProbability } from './conformance-probability';
import type { Conformance } from './conformance-probability';
import { isCapable, leavesNoZone } from './reading-scale';
import type { ReadingScale } from './reading-scale';

const LIMIT_PLACES = 12;
const ZERO_GUARD: Rational = { n: 0n, d: 1n };
type Finding = readonly [verdict: Verdict, code: string];

/** Whether lower ≤ value ≤ upper, each end moved inwards by `by`; a value equal to a limit is within. */
function within(scale: ReadingScale, value: Rational, by: Rational): boolean {
  if (scale.lower !== null && compare(value, add(scale.lower, by)) < 0) return false;
  return scale.upper === null || compare(value, subtract(scale.upper, by)) <= 0;
}

/** ASTM E29 rounding: to each limit's own last place, for that limit. */
function withinRounded(characteristic: Characteristic, scale: ReadingScale): boolean {
  const at = (limit: string): Rational => roundHalfEven(scale.value, placesOf(limit));
  const { lower, upper } = characteristic;
  if (typeof lower === 'string' && compare(at(lower), rationalOf(lower)) < 0) return false;
  return typeof upper !== 'string' || compare(at(upper), rationalOf(upper)) <= 0;
}

function findSimple(characteristic: Characteristic, scale: ReadingScale): Finding {
  const decision = characteristic.decision;
  const capability = decision.rule === 'simple' ? (decision.capability ?? null) : null;
  if (capability !== null && scale.lower !== null && scale.upper !== null) {
    if (scale.expanded === null) return ['not-evaluable', 'reading-without-uncertainty'];
    if (!isCapable(scale.lower, scale.upper, scale.expanded, rationalOf(capability))) {
      return ['indeterminate', 'reading-capability-missed'];
    }
  }
  const good =
    characteristic.rounding === 'rounded' ? withinRounded(characteristic, scale) : within(scale, scale.value, ZERO_GUARD);
  return good ? ['accept', 'reading-accepted'] : ['reject', 'reading-outside'];
}

function findGuarded(form: 'binary' | 'non-binary', scale: ReadingScale): Finding {
  const guard = scale.guard;
  if (guard === null) return ['not-evaluable', 'reading-without-uncertainty'];
  if (leavesNoZone(scale.lower, scale.upper, guard)) return ['not-evaluable', 'reading-no-zone'];
  if (within(scale, scale.value, guard)) return ['accept', 'reading-accepted-guarded'];
  if (form === 'binary') return ['reject', 'reading-rejected-guarded'];
  if (!within(scale, scale.value, { n: -guard.n, d: guard.d })) return ['reject', 'reading-proved-outside'];
  return ['indeterminate', within(scale, scale.value, ZERO_GUARD) ? 'reading-unsure-inside' : 'reading-unsure-outside'];
}

function findRisk(r: string, conformance: Conformance | null): Finding {
  if (conformance === null) return ['not-evaluable', 'reading-without-uncertainty'];
  const risk = Number(r);
  if (conformance.outside <= risk) return ['accept', 'reading-accepted-risk'];
  return conformance.inside <= risk ? ['reject', 'reading-rejected-risk'] : ['indeterminate', 'reading-unsure-risk'];
}

function find(characteristic: Characteristic, scale: ReadingScale, conformance: Conformance | null): Finding {
  const decision = characteristic.decision;
  if (decision.rule === 'guarded') return findGuarded(decision.form, scale);
  return decision.rule === 'risk' ? findRisk(decision.r, conformance) : findSimple(characteristic, scale);
}

function parametersOf(
  characteristic: Characteristic,
  reading: Reading,
  scale: ReadingScale,
  probability: number | null,
): SentenceParameters {
  const decision = characteristic.decision;
  const parameters: Record<string, string | number> = {
    value: decimalText(scale.value, LIMIT_PLACES),
    unit: characteristic.unit,
  };
  if (scale.guard !== null) parameters['guard'] = decimalText(scale.guard, LIMIT_PLACES);
  if (scale.expanded !== null) parameters['uncertainty'] = decimalText(scale.expanded, LIMIT_PLACES);
  if (probability !== null) parameters['probability'] = probability;
  if (decision.rule === 'risk') parameters['risk'] = decision.r;
  if (decision.rule === 'simple' && decision.capability) parameters['capability'] = decision.capability;
  if (reading.void) parameters['reason'] = reading.void.reason;
  return parameters;
}

/** The row of one reading. Total: a guard band that leaves no zone makes it not evaluable, with its sentence. */
export function judgeReading(characteristic: Characteristic, reading: Reading, scale: ReadingScale): ReadingRow {
  const conformance = scale.u === null ? null : conformanceOf(scale.value, scale.u, scale.lower, scale.upper);
  const probability = conformance === null ? null : reportedProbability(conformance.inside);
  const [verdict, code]: Finding = reading.void ? ['not-evaluable', 'reading-void'] : find(characteristic, scale, conformance);
  const rule = characteristic.decision.rule;
  const shift = rule === 'simple' ? ZERO_GUARD : scale.guard;
  const text = (limit: Rational | null, move: typeof add): string | null =>
    limit === null || shift === null ? null : decimalText(move(limit, shift), LIMIT_PLACES);
  return {
    characteristic: characteristic.number,
    verdict,
    inside: within(scale, scale.value, ZERO_GUARD),
    lower: characteristic.lower ?? null,
    upper: characteristic.upper ?? null,
    acceptLower: text(scale.lower, add),
    acceptUpper: text(scale.upper, subtract),
    conformanceProbability: probability,
    sentence: sentence(code, parametersOf(characteristic, reading, scale, probability)),
  };
}

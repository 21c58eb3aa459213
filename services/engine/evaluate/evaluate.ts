import { fault, isObject, valueAt } from '../form/check';
import { indicationFaults } from '../indications/faults';
import { judgeIndications } from '../indications/judge';
import { judgeObserved } from '../readings/judge-observed';
import { observedFaults, uncertaintyMaxFaults, windowFaults } from '../readings/reading-faults';
import { digestOf } from '../record/canonical';
import { sentence } from '../sentences/sentence';
import type { Fault } from './fault';
import { missingOf } from './missing';
import type { Criteria, Evaluation, JudgedVerdict, Observations, RuleRow, Verdict } from './types';

/** Approved like a technique; one that changes any stored verdict is a new version. */
export const ENGINE_VERSION = '1.0.0';

export interface EvaluateOptions {
  /** What a guard band does that leaves no acceptance zone: a fault of the call, or (on the bench) a row that says so. */
  readonly zoneless?: 'fault' | 'not-evaluable';
}

export type Evaluated =
  { readonly ok: true; readonly answer: Evaluation } | { readonly ok: false; readonly faults: readonly Fault[] };

const CRITERIA_KEYS = ['lengthUnit', 'linear', 'characteristics', 'attributes', 'process', 'zones', 'indicationRules'];
const OBSERVATION_KEYS = ['methods', 'readings', 'attributes', 'process', 'indications'];

function partFaults(value: unknown, path: string, keys: readonly string[], faults: Fault[]): void {
  if (value === undefined || value === null) fault(faults, path, 'is required');
  else if (!isObject(value)) fault(faults, path, 'must be an object');
  else for (const key of Object.keys(value)) if (!keys.includes(key)) fault(faults, `${path}.${key}`, 'is not a known key');
}

/** Every fault of form and meaning of criteria alone, R3 asked of `uncertaintyMax`: what keeps a plan from approval. */
export function criteriaFaults(criteria: unknown): Fault[] {
  const faults: Fault[] = [];
  partFaults(criteria, 'criteria', CRITERIA_KEYS, faults);
  windowFaults(criteria, faults);
  uncertaintyMaxFaults(criteria, faults);
  indicationFaults(criteria, {}, faults);
  return faults;
}

function bodyFaults(body: unknown, zoneless: boolean): Fault[] {
  const faults: Fault[] = [];
  if (!isObject(body)) {
    fault(faults, '', 'must be an object');
    return faults;
  }
  for (const key of Object.keys(body)) if (key !== 'criteria' && key !== 'observations') fault(faults, key, 'is not a known key');
  const criteria = valueAt(body, 'criteria');
  const observations = valueAt(body, 'observations');
  partFaults(criteria, 'criteria', CRITERIA_KEYS, faults);
  partFaults(observations, 'observations', OBSERVATION_KEYS, faults);
  windowFaults(criteria, faults);
  observedFaults(criteria, observations, zoneless, faults);
  indicationFaults(criteria, observations, faults);
  return faults;
}

const RANK = { accept: 0, indeterminate: 1, reject: 2 } as const;

/** The worst of the verdicts that judge something; null when none does. */
export function worstOf(verdicts: readonly Verdict[]): JudgedVerdict | null {
  let worst: JudgedVerdict | null = null;
  for (const verdict of verdicts) {
    if (verdict !== 'not-evaluable' && (worst === null || RANK[verdict] > RANK[worst])) worst = verdict;
  }
  return worst;
}

function voided<Row extends { readonly verdict: Verdict }>(rows: readonly Row[], numbers: string): Row[] {
  return rows.map((row) => ({ ...row, verdict: 'not-evaluable', sentence: sentence('process-voids', { numbers }) }));
}

function judge(criteria: Criteria, observations: Observations): Evaluation {
  const observed = judgeObserved(criteria, observations);
  const outside = observed.process.filter((row) => row.verdict === 'reject').map((row) => row.number);
  const isVoid = outside.length > 0;
  const judged = judgeIndications(criteria, observations, { processOutside: isVoid });
  const numbers = outside.join(', ');
  const readings = isVoid ? voided(observed.readings, numbers) : observed.readings;
  const attributes = isVoid ? voided(observed.attributes, numbers) : observed.attributes;
  const rules: readonly RuleRow[] = isVoid ? voided(judged.rules, numbers) : judged.rules;
  const standing = [...readings.filter((_, index) => !observed.voidReadings.has(index)), ...attributes, ...rules].map(
    (row) => row.verdict,
  );
  const silent = judged.unjudged.map((): Verdict => 'indeterminate');
  const verdictSoFar = isVoid ? null : worstOf([...standing, ...silent]);
  const missing = missingOf(criteria, observations);
  const open = missing.length > 0 || standing.includes('not-evaluable');
  return {
    engine: ENGINE_VERSION,
    criteriaDigest: digestOf(criteria),
    inputDigest: digestOf(observations),
    verdict: open || verdictSoFar === null ? 'not-evaluable' : verdictSoFar,
    verdictSoFar,
    complete: missing.length === 0,
    missing,
    readings,
    attributes,
    process: observed.process,
    indications: judged.indications,
    rules,
    unjudged: judged.unjudged,
  };
}

/** Judges a body `{criteria, observations}` as received, or answers every fault of it in one pass. Never throws on JSON. */
export function evaluate(body: unknown, options: EvaluateOptions = {}): Evaluated {
  const faults = bodyFaults(body, options.zoneless !== 'not-evaluable');
  if (faults.length > 0) return { ok: false, faults };
  const answer = judge(valueAt(body, 'criteria') as Criteria, valueAt(body, 'observations') as Observations);
  return { ok: true, answer };
}

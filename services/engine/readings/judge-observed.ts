import type {
  AttributeResult,
  AttributeRow,
  Criteria,
  Observations,
  ProcessRow,
  ProcessValue,
  ProcessWindow,
  Reading,
  ReadingRow,
} from '../evaluate/types';
import { compare, decimalText, rationalOf } from '../quantity/decimal';
import { convertValue, unitOf } from '../quantity/units';
import { sentence } from '../sentences/sentence';
import type { SentenceParameters } from '../sentences/sentence';
import { judgeReading } from './judge-reading';
import { scaleOf } from './reading-scale';

export interface Observed {
  readonly readings: readonly ReadingRow[];
  /** Places in `readings` of the rows of readings marked void. */
  readonly voidReadings: ReadonlySet<number>;
  readonly attributes: readonly AttributeRow[];
  readonly process: readonly ProcessRow[];
}

const ATTRIBUTE_VERDICTS = { conforming: 'accept', nonconforming: 'reject', 'not-inspected': 'not-evaluable' } as const;

function judgeAttribute(given: AttributeResult): AttributeRow {
  const parameters: SentenceParameters = given.reason ? { reason: given.reason } : {};
  const verdict = ATTRIBUTE_VERDICTS[given.result];
  return { number: given.number, result: given.result, verdict, sentence: sentence(`attribute-${given.result}`, parameters) };
}

function judgeProcess(window: ProcessWindow, given: ProcessValue): ProcessRow[] {
  const to = unitOf(window.unit);
  const from = unitOf(given.unit);
  if (!to || !from) return [];
  const value = convertValue(rationalOf(given.value), from, to);
  const below = typeof window.lower === 'string' && compare(value, rationalOf(window.lower)) < 0;
  const above = typeof window.upper === 'string' && compare(value, rationalOf(window.upper)) > 0;
  const parameters = { value: decimalText(value, 12), unit: window.unit };
  return [
    below || above
      ? { number: window.number, verdict: 'reject', sentence: sentence('process-outside', parameters) }
      : { number: window.number, verdict: 'accept', sentence: sentence('process-inside', parameters) },
  ];
}

/** Rows of readings, attributes and process values in criteria order, several readings of one characteristic as given. */
export function judgeObserved(criteria: Criteria, observations: Observations): Observed {
  const byCharacteristic = new Map<string, Reading[]>();
  for (const reading of observations.readings ?? []) {
    const others = byCharacteristic.get(reading.characteristic);
    if (others) others.push(reading);
    else byCharacteristic.set(reading.characteristic, [reading]);
  }
  const readings: ReadingRow[] = [];
  const voidReadings = new Set<number>();
  for (const characteristic of criteria.characteristics ?? []) {
    for (const reading of byCharacteristic.get(characteristic.number) ?? []) {
      const scale = scaleOf(characteristic, reading);
      if (scale === null) continue;
      if (reading.void) voidReadings.add(readings.length);
      readings.push(judgeReading(characteristic, reading, scale));
    }
  }
  const results = new Map((observations.attributes ?? []).map((one) => [one.number, one]));
  const values = new Map((observations.process ?? []).map((one) => [one.number, one]));
  return {
    readings,
    voidReadings,
    attributes: (criteria.attributes ?? []).flatMap(({ number }) => {
      const given = results.get(number);
      return given ? [judgeAttribute(given)] : [];
    }),
    process: (criteria.process ?? []).flatMap((window) => {
      const given = values.get(window.number);
      return given ? judgeProcess(window, given) : [];
    }),
  };
}

import { compare, ratio } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { notAboveZero } from '../bounds';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

type Row = readonly [source: string, upToMm: number | null, classA: number, classB: number];

// Least normalised SNR for steel, copper and nickel alloys: table 3 of ISO 17636-2:2013, from memory, written for welds. A plan
// for castings names EN 12681-2 or its own figure; this table is the suggestion beside the field, never a limit by itself.
const LEAST: readonly Row[] = [
  ['X <= 50 kV', null, 100, 150],
  ['50-150 kV', null, 70, 120],
  ['150-250 kV', null, 70, 100],
  ['250-350 kV', 50, 70, 100],
  ['250-350 kV', null, 70, 70],
  ['350-1000 kV', 50, 70, 100],
  ['350-1000 kV', null, 70, 70],
  ['Yb-169, Tm-170', 5, 70, 120],
  ['Yb-169, Tm-170', null, 70, 100],
  ['Ir-192, Se-75', 50, 70, 100],
  ['Ir-192, Se-75', null, 70, 70],
  ['Co-60', 100, 70, 100],
  ['Co-60', null, 70, 70],
];

/** The least normalised SNR of a source and penetrated thickness. Refuses a source that is not in the table. */
export function leastNormalisedSignalToNoise(source: string, penetratedMm: Rational, testingClass: 'A' | 'B'): Derived<number> {
  const bad = notAboveZero({ penetratedMm });
  if (bad) return bad;
  const row = LEAST.find(([name, upTo]) => name === source && (upTo === null || compare(penetratedMm, ratio(BigInt(upTo))) <= 0));
  return row ? derived(row[testingClass === 'A' ? 2 : 3]) : refused('not-in-table', { source });
}

import { decimalText } from '../quantity/decimal';
import type { Rational } from '../quantity/decimal';
import { refused } from './derived';
import type { DerivedFault } from './derived';

type Refusal = { readonly ok: false; readonly fault: DerivedFault };

/** The first of the named numbers that is not above zero, as a refusal; null when all are. */
export function notAboveZero(named: Readonly<Record<string, Rational>>): Refusal | null {
  const found = Object.entries(named).find(([, value]) => value.n <= 0n);
  return found ? refused('not-above-zero', { input: found[0], value: decimalText(found[1], 12) }) : null;
}

/** The first of the named numbers that is below zero, as a refusal; null when none is. */
export function belowZero(named: Readonly<Record<string, Rational>>): Refusal | null {
  const found = Object.entries(named).find(([, value]) => value.n < 0n);
  return found ? refused('below-zero', { input: found[0], value: decimalText(found[1], 12) }) : null;
}

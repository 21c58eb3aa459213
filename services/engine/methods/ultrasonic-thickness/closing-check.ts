import { compare, subtract } from '../../quantity/decimal';
import type { Rational } from '../../quantity/decimal';
import { absolute } from '../../quantity/roots';
import { derived, refused } from '../derived';
import type { Derived } from '../derived';

/** One step of a block check. All in one unit. */
export interface BlockStep {
  readonly nominalMm: Rational;
  readonly readMm: Rational;
  readonly toleranceMm: Rational;
}

/** Whether every step was read within its tolerance; equal is within. No step is no check. */
export function isGoodCheck(steps: readonly BlockStep[]): boolean {
  return (
    steps.length > 0 && steps.every((step) => compare(absolute(subtract(step.readMm, step.nominalMm)), step.toleranceMm) <= 0)
  );
}

/** What happened at the instrument; `order` is its place in the sequence of the work. */
export type InstrumentEvent =
  | { readonly kind: 'check'; readonly order: number; readonly good: boolean }
  | { readonly kind: 'reading'; readonly order: number; readonly id: string };

export interface ReadingStanding {
  readonly id: string;
  /** `good`: between two good checks. `void`: a failed check before or after it, or none before it. `open`: not yet closed. */
  readonly standing: 'good' | 'void' | 'open';
  readonly reason: 'closing-check-failed' | 'no-good-check-before' | 'no-closing-check' | null;
}

/**
 * How each reading stands by the block checks around it: a failed check voids every reading since the last good one, and
 * readings count only between two good checks. Answers in the order of the work, whatever the order given.
 * Refuses two events at one place. Source: ASTM E797 (calibration is verified, and readings since the last good one repeated).
 */
export function readingStandings(events: readonly InstrumentEvent[]): Derived<readonly ReadingStanding[]> {
  const ordered = [...events].sort((a, b) => a.order - b.order);
  const twice = ordered.find((event, place) => event.order === ordered[place + 1]?.order);
  if (twice) return refused('order-used-twice', { order: twice.order });
  const standings: ReadingStanding[] = [];
  let waiting: string[] = [];
  let opened = false;
  for (const event of ordered) {
    if (event.kind === 'reading') {
      if (opened) waiting.push(event.id);
      else standings.push({ id: event.id, standing: 'void', reason: 'no-good-check-before' });
      continue;
    }
    for (const id of waiting)
      standings.push(
        event.good ? { id, standing: 'good', reason: null } : { id, standing: 'void', reason: 'closing-check-failed' },
      );
    waiting = [];
    opened = event.good;
  }
  for (const id of waiting) standings.push({ id, standing: 'open', reason: 'no-closing-check' });
  return derived(standings);
}

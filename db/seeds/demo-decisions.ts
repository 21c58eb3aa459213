import type { Shop } from './demo-inspections';
import type { DemoParts } from './demo-lots';
import type { Cast } from './demo-people';
import type { Rejected } from './demo-story';

export interface DecisionContext {
  readonly people: Cast;
  readonly parts: DemoParts;
  readonly shop: Shop;
  readonly rejected: Rejected;
  readonly orderLines: Readonly<Record<string, string>>;
  readonly heats: Readonly<Record<string, string>>;
}

/** Dispositions, holds, releases and a withdrawn certificate. */
export async function seedDecisions(_context: DecisionContext): Promise<void> {
  await Promise.resolve();
}

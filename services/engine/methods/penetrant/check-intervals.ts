/** How often a check of the penetrant line is repeated. Days are the longest calendar gap that still counts as that interval. */
export type CheckInterval = 'each-shift' | 'daily' | 'weekly' | 'monthly' | 'quarterly' | 'semiannual';

const LONGEST_DAYS: Readonly<Record<CheckInterval, number>> = {
  'each-shift': 1,
  daily: 1,
  weekly: 7,
  monthly: 31,
  quarterly: 92,
  semiannual: 184,
};

export interface LineCheck {
  readonly check: string;
  readonly interval: CheckInterval;
  readonly longestDays: number;
  readonly source: string;
  readonly known: 'read' | 'memory';
}

const ROWS: readonly (readonly [check: string, interval: CheckInterval, known?: 'read'])[] = [
  ['system performance (known-defect star-crack panel)', 'daily'],
  ['penetrant contamination (visual)', 'daily'],
  ['penetrant brightness', 'quarterly'],
  ['penetrant water content (method A water based excluded)', 'monthly'],
  ['penetrant removability (method A)', 'monthly'],
  ['penetrant sensitivity', 'weekly'],
  ['emulsifier removability (B)', 'weekly'],
  ['emulsifier water content (B)', 'monthly'],
  ['hydrophilic remover concentration (D)', 'weekly'],
  ['dry developer condition', 'daily'],
  ['aqueous developer contamination / wetting', 'daily'],
  ['aqueous developer concentration', 'weekly'],
  ['water wash pressure', 'each-shift'],
  ['water wash temperature', 'each-shift'],
  ['UV-A lamp intensity', 'daily', 'read'],
  ['UV-A lamp condition (filter, housing, reflector)', 'daily'],
  ['ambient white light of booth', 'weekly'],
  ['examination area cleanliness', 'daily'],
  ['drying oven calibration', 'quarterly'],
  ['UV-A / white light meter calibration', 'semiannual'],
  ['pressure gauges / thermometers calibration', 'semiannual'],
];

/**
 * Check intervals of ASTM E1417 table 1, mostly from memory: what is offered when a line's checks are set up. The interval that
 * counts is the one of the edition, or of the plant's procedure, that the technique invokes.
 */
export const E1417_CHECKS: readonly LineCheck[] = ROWS.map(([check, interval, known]) => ({
  check,
  interval,
  longestDays: LONGEST_DAYS[interval],
  source: 'ASTM E1417 table 1',
  known: known ?? 'memory',
}));

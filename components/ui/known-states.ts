import type { GlyphName } from './glyph';
import type { Tone } from './tones';

/** Every state the product names, with its shape and tone; the words are in messages.ts under the same names. */
export const knownStates = {
  // requirements, as the ring draws them
  open: { glyph: 'thin', tone: 'soft' },
  'in-work': { glyph: 'half', tone: 'accent' },
  met: { glyph: 'full', tone: 'accept' },
  'met-by-sample': { glyph: 'full', tone: 'accept' },
  'met-by-ancestor': { glyph: 'full', tone: 'accept' },
  'met-by-outside-certificate': { glyph: 'full', tone: 'accept' },
  waived: { glyph: 'full', tone: 'accept' },
  rejected: { glyph: 'notched', tone: 'reject' },
  'awaiting-decision': { glyph: 'detached', tone: 'unsure' },
  'to-be-repeated': { glyph: 'ticked', tone: 'unsure' },
  // parts
  position: { glyph: 'dotted', tone: 'soft' },
  serialised: { glyph: 'ring', tone: 'plain' },
  'in-process': { glyph: 'half-disc', tone: 'accent' },
  finished: { glyph: 'target', tone: 'accept' },
  released: { glyph: 'closed', tone: 'accept' },
  shipped: { glyph: 'leaving', tone: 'accept' },
  returned: { glyph: 'back', tone: 'unsure' },
  scrapped: { glyph: 'cross', tone: 'reject' },
  destroyed: { glyph: 'cross-solid', tone: 'reject' },
  consumed: { glyph: 'dot', tone: 'soft' },
  held: { glyph: 'hatch', tone: 'held' },
  // records and papers
  draft: { glyph: 'dotted', tone: 'soft' },
  checked: { glyph: 'half-disc', tone: 'accent' },
  approved: { glyph: 'closed', tone: 'accept' },
  signed: { glyph: 'closed', tone: 'accept' },
  'withdrawn-for-error': { glyph: 'cross', tone: 'reject' },
  superseded: { glyph: 'back', tone: 'soft' },
  voided: { glyph: 'cross', tone: 'soft' },
  withdrawn: { glyph: 'cross', tone: 'reject' },
  acknowledged: { glyph: 'target', tone: 'accept' },
  // things that wait, run or lapse
  dispositioned: { glyph: 'half-disc', tone: 'accent' },
  'awaiting-follow-up': { glyph: 'back', tone: 'unsure' },
  closed: { glyph: 'closed', tone: 'accept' },
  queued: { glyph: 'dotted', tone: 'soft' },
  running: { glyph: 'half-disc', tone: 'accent' },
  failed: { glyph: 'cross', tone: 'reject' },
  valid: { glyph: 'closed', tone: 'accept' },
  'due-soon': { glyph: 'half-disc', tone: 'unsure' },
  expired: { glyph: 'cross', tone: 'reject' },
  'not-yet-valid': { glyph: 'dotted', tone: 'soft' },
  'out-of-service': { glyph: 'cross', tone: 'soft' },
  planned: { glyph: 'dotted', tone: 'soft' },
  gathering: { glyph: 'half-disc', tone: 'accent' },
  ready: { glyph: 'target', tone: 'accept' },
  despatched: { glyph: 'leaving', tone: 'accept' },
  received: { glyph: 'closed', tone: 'accept' },
  requested: { glyph: 'dotted', tone: 'unsure' },
  granted: { glyph: 'closed', tone: 'accept' },
  refused: { glyph: 'cross', tone: 'reject' },
  referred: { glyph: 'leaving', tone: 'unsure' },
  rework: { glyph: 'back', tone: 'unsure' },
  active: { glyph: 'closed', tone: 'accept' },
  disabled: { glyph: 'cross', tone: 'soft' },
} as const satisfies Record<string, { glyph: GlyphName; tone: Tone }>;

export type KnownState = keyof typeof knownStates;

export function isKnownState(name: string): name is KnownState {
  return Object.hasOwn(knownStates, name);
}

import type { Decision } from './findings';

const did: Readonly<Record<Decision, string>> = {
  're-interpretation': 'order a second evaluation under the same limits',
  rework: 'order rework back to the drawing',
  repair: 'order a repair',
  'use-as-is': 'accept as it is',
  scrap: 'scrap the part; it is never releasable again',
  void: 'void the inspection; it stays on record and is repeated',
  refer: 'refer the part to the customer',
};

/** The sentence a reviewer signs; shown before, stored as shown. */
export function dispositionSentence(about: {
  readonly name: string;
  readonly finding: string;
  readonly serial: string;
  readonly decision: Decision;
  readonly repeat: readonly string[];
}): string {
  const repeat = about.repeat.length > 0 ? ` Operations to be repeated: ${about.repeat.join(', ')}.` : '';
  return `I, ${about.name}, decide finding ${about.finding} on serial ${about.serial}: ${did[about.decision]}.${repeat}`;
}

import type { EntryKind } from './entry-values';

export interface RuleField {
  readonly key: string;
  /** Name of its word in the messages of plans, under `ruleFields`. */
  readonly word:
    | 'types'
    | 'classes'
    | 'class'
    | 'limit'
    | 'count'
    | 'counting'
    | 'windowShape'
    | 'windowSize'
    | 'stripWidth'
    | 'gap'
    | 'category'
    | 'reference'
    | 'medium'
    | 'plate'
    | 'level'
    | 'requiredFor';
  readonly kind: EntryKind;
}

const types: RuleField = { key: 'types', word: 'types', kind: 'words' };
const filters: readonly RuleField[] = [{ key: 'class', word: 'class', kind: 'choice' }, types];
const limit: RuleField = { key: 'limit', word: 'limit', kind: 'decimal' };
const count: RuleField = { key: 'limit', word: 'count', kind: 'whole' };
const window: readonly RuleField[] = [
  { key: 'window.shape', word: 'windowShape', kind: 'choice' },
  { key: 'window.size', word: 'windowSize', kind: 'decimal' },
];

/** The entries of each kind of rule, in the order they are read. The engine names whatever is wrong with them. */
export const ruleFields = {
  'not-allowed': [types, { key: 'classes', word: 'classes', kind: 'marks' }],
  'max-size': [...filters, limit],
  'size-bands': [...filters, { key: 'counting', word: 'counting', kind: 'choice' }],
  'max-count': [...filters, count],
  'max-count-in-window': [...filters, ...window, count],
  'min-separation': [...filters, limit],
  'max-total-length': [...filters, limit, ...window],
  'max-total-area': [...filters, limit, ...window],
  alignment: [
    ...filters,
    { key: 'count', word: 'count', kind: 'whole' },
    { key: 'stripWidth', word: 'stripWidth', kind: 'decimal' },
    { key: 'gap', word: 'gap', kind: 'decimal' },
  ],
  'max-severity': [
    ...filters,
    { key: 'category', word: 'category', kind: 'text' },
    { key: 'reference', word: 'reference', kind: 'text' },
    { key: 'medium', word: 'medium', kind: 'text' },
    { key: 'plate', word: 'plate', kind: 'text' },
    { key: 'limit', word: 'level', kind: 'whole' },
    { key: 'requiredFor', word: 'requiredFor', kind: 'words' },
  ],
} as const satisfies Record<string, readonly RuleField[]>;

export type RuleKind = keyof typeof ruleFields;
export const ruleKinds = Object.keys(ruleFields) as RuleKind[];

/** The choices of a field that has a closed list. */
export const ruleChoices = {
  class: ['rounded', 'linear'],
  classes: ['rounded', 'linear'],
  counting: ['each-band', 'this-band-and-above'],
  'window.shape': ['circle', 'square'],
} as const;

/** What a state means, before any colour: the palette decides how it looks. */
export type Tone = 'plain' | 'soft' | 'accent' | 'accept' | 'reject' | 'unsure' | 'held';

/** Text in the tone. */
export const toneText: Record<Tone, string> = {
  plain: 'text-ink',
  soft: 'text-ink-soft',
  accent: 'text-accent',
  accept: 'text-accept',
  reject: 'text-reject',
  unsure: 'text-unsure',
  held: 'text-held',
};

/** A quiet ground in the tone, for what is marked as a whole. */
export const toneWash: Record<Tone, string> = {
  plain: 'bg-raised',
  soft: 'bg-sunken',
  accent: 'bg-accent-wash',
  accept: 'bg-accept-wash',
  reject: 'bg-reject-wash',
  unsure: 'bg-unsure-wash',
  held: 'bg-held-wash',
};

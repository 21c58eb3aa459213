/** Sentences under names, in as many levels as a feature likes. ICU message syntax. */
export interface MessageTree {
  readonly [name: string]: string | MessageTree;
}

type SameNames<T> = { readonly [K in keyof T]: T[K] extends string ? string : SameNames<T[K]> };

/**
 * The messages of one feature in both languages. A French sentence that is missing or too many does not type-check.
 * Written in `components/<feature>/messages.ts`, and named once in `namespaces.ts`.
 */
export function defineMessages<const English extends MessageTree>(both: { en: English; fr: SameNames<English> }) {
  return both;
}

import { derivedEntrySentences } from './derived-entries';
import { derivedRefusalSentences } from './derived-refusals';
import { indicationSentences } from './indications';
import { readingSentences } from './readings';

export type Language = 'en' | 'fr';
export type SentenceParameters = Readonly<Record<string, string | number | boolean | null>>;

/** One sentence a person can read: its code and parameters are what is stored, the text is English. */
export interface Sentence {
  readonly code: string;
  readonly parameters: SentenceParameters;
  readonly text: string;
}

/** Sentences of one area by code; `{name}` stands for a parameter. */
export type SentenceCatalogue = Readonly<Record<string, Readonly<Record<Language, string>>>>;

const SENTENCES: SentenceCatalogue = {
  ...readingSentences,
  ...indicationSentences,
  ...derivedEntrySentences,
  ...derivedRefusalSentences,
};

/** Writes a sentence in a language; an unknown code is written as itself, a missing parameter as its name. */
export function renderSentence(code: string, parameters: SentenceParameters, language: Language): string {
  const pattern = Object.hasOwn(SENTENCES, code) ? SENTENCES[code]?.[language] : undefined;
  if (pattern === undefined) return code;
  return pattern.replace(/\{(\w+)\}/g, (hole: string, name: string) =>
    Object.hasOwn(parameters, name) ? String(parameters[name] ?? '–') : hole,
  );
}

/** A sentence with its English text. */
export function sentence(code: string, parameters: SentenceParameters = {}): Sentence {
  return { code, parameters, text: renderSentence(code, parameters, 'en') };
}

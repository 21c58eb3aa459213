import * as namespaces from './namespaces';
import type { Locale } from './locales';

type Namespaces = typeof namespaces;
export type Namespace = keyof Namespaces;
/** The names are checked by the compiler; the sentences stay plain strings, their parameters are checked by a test. */
type Words<T> = { readonly [K in keyof T]: T[K] extends string ? string : Words<T[K]> };
export type Messages = { [N in Namespace]: Words<Namespaces[N]['en']> };

function inLanguage(locale: Locale): Messages {
  return Object.fromEntries(Object.entries(namespaces).map(([name, both]) => [name, both[locale]])) as unknown as Messages;
}

/** Every sentence of the product, by language, namespace and name. */
export const catalogue: Record<Locale, Messages> = { en: inLanguage('en'), fr: inLanguage('fr') };

declare module 'use-intl' {
  interface AppConfig {
    Locale: Locale;
    Messages: Messages;
  }
}

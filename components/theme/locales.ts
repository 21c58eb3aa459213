/** The languages of the product, in the order they are offered. */
export const locales = ['en', 'fr'] as const;
export type Locale = (typeof locales)[number];

/** The cookie that keeps a workstation's language. */
export const localeCookie = 'ringtrue-locale';

function known(name: string | undefined): Locale | undefined {
  return locales.find((locale) => locale === name);
}

/** The language chosen at this workstation, else the first of ours in Accept-Language by weight (RFC 9110, 12.5.4), else English. */
export function localeFrom(chosen: string | undefined, acceptLanguage: string | null): Locale {
  const wanted = (acceptLanguage ?? '')
    .split(',')
    .map((part) => {
      const [range = '', ...parameters] = part.trim().split(';');
      const weight = parameters.map((text) => /^\s*q=([\d.]+)\s*$/.exec(text)?.[1]).find((text) => text !== undefined);
      return { language: range.trim().split('-')[0]?.toLowerCase(), weight: weight === undefined ? 1 : Number(weight) };
    })
    .filter(({ language, weight }) => weight > 0 && known(language) !== undefined)
    .sort((a, b) => b.weight - a.weight);
  return known(chosen) ?? known(wanted[0]?.language) ?? 'en';
}

import { createTranslator } from 'use-intl/core';
import { catalogue } from './catalogue';
import type { Namespace } from './catalogue';
import type { Locale } from './locales';

/** For the server: `const t = messagesFor(locale)('parts'); t('title')`. */
export function messagesFor(locale: Locale) {
  return <N extends Namespace>(namespace: N) =>
    createTranslator({ locale, messages: catalogue[locale], namespace, timeZone: 'UTC' });
}

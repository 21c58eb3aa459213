'use client';

import { useRouter } from 'next/navigation';
import { useEffect, useState } from 'react';
import { keepChoice } from '@/components/theme/keep-choice';
import { localeCookie, locales } from '@/components/theme/locales';
import type { Locale } from '@/components/theme/locales';
import { paletteCookie, paletteNames } from '@/components/theme/palettes';
import type { PaletteName } from '@/components/theme/palettes';
import { useMessages } from '@/components/theme/use-messages';
import { useWorkstation } from '@/components/theme/workstation';

const choice = 'flex min-h-10 items-center gap-3 rounded px-2 hover:bg-accent-wash';

/** Palette and language of this workstation; kept by cookie, so that the next page is already right. */
export function WorkstationSettings() {
  const t = useMessages('shell');
  const router = useRouter();
  const { locale, palette } = useWorkstation();
  const [shown, setShown] = useState(palette);
  const [spoken, setSpoken] = useState(locale);
  useEffect(() => {
    document.documentElement.dataset['palette'] = shown;
  }, [shown]);
  const paint = (name: PaletteName) => {
    keepChoice(paletteCookie, name);
    setShown(name);
    router.refresh();
  };
  const speak = (name: Locale) => {
    keepChoice(localeCookie, name);
    setSpoken(name);
    router.refresh();
  };
  return (
    <>
      <fieldset>
        <legend className="px-2 text-sm font-semibold text-ink-soft">{t('palette')}</legend>
        {paletteNames.map((name) => (
          <label key={name} className={choice}>
            <input type="radio" name="palette" checked={shown === name} onChange={() => paint(name)} className="size-5" />
            <span className="py-0.5 leading-snug">
              {t(`palettes.${name}`)} <span className="block text-sm text-ink-soft">{t(`paletteHints.${name}`)}</span>
            </span>
          </label>
        ))}
      </fieldset>
      <fieldset className="mt-2">
        <legend className="px-2 text-sm font-semibold text-ink-soft">{t('language')}</legend>
        {locales.map((name) => (
          <label key={name} className={choice}>
            <input type="radio" name="language" checked={spoken === name} onChange={() => speak(name)} className="size-5" />
            <span lang={name}>{t(`languages.${name}`)}</span>
          </label>
        ))}
      </fieldset>
    </>
  );
}

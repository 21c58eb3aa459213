import 'server-only';

import { cookies, headers } from 'next/headers';
import { localeCookie, localeFrom } from './locales';
import { paletteCookie, paletteFrom } from './palettes';
import type { WorkstationValue } from './workstation';

/** Language, palette and nonce of the request being rendered. */
export async function requestWorkstation(): Promise<WorkstationValue> {
  const [jar, head] = await Promise.all([cookies(), headers()]);
  return {
    locale: localeFrom(jar.get(localeCookie)?.value, head.get('accept-language')),
    palette: paletteFrom(jar.get(paletteCookie)?.value),
    nonce: head.get('x-nonce') ?? undefined,
  };
}

'use client';

import { createContext, useContext } from 'react';
import type { ReactNode } from 'react';
import { IntlProvider } from 'use-intl';
import { catalogue } from './catalogue';
import type { Locale } from './locales';
import type { PaletteName } from './palettes';

export interface Plant {
  name: string;
  /** IANA name; times are shown in it. */
  timeZone: string;
}

export interface WorkstationValue {
  locale: Locale;
  palette: PaletteName;
  /** The nonce of this response's Content-Security-Policy, for styles made in the browser. */
  nonce: string | undefined;
}

const Workstation = createContext<WorkstationValue>({ locale: 'en', palette: 'floor', nonce: undefined });
const PlantContext = createContext<Plant>({ name: '', timeZone: 'UTC' });

/** Language, palette and nonce for everything below; the root layout renders it once. */
export function WorkstationProvider({ children, ...value }: WorkstationValue & { children: ReactNode }) {
  return (
    <Workstation.Provider value={value}>
      <IntlProvider locale={value.locale} messages={catalogue[value.locale]} timeZone="UTC">
        {children}
      </IntlProvider>
    </Workstation.Provider>
  );
}

/** The plant whose clock is on the wall; the shell renders it from the session. */
export function PlantProvider({ plant, children }: { plant: Plant; children: ReactNode }) {
  return <PlantContext.Provider value={plant}>{children}</PlantContext.Provider>;
}

export function useWorkstation(): WorkstationValue {
  return useContext(Workstation);
}

export function usePlant(): Plant {
  return useContext(PlantContext);
}

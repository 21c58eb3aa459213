'use client';

import Link from 'next/link';
import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { PlantProvider } from '@/components/theme/workstation';
import type { Plant } from '@/components/theme/workstation';
import { Mark } from '@/components/ui/mark';
import { Menu } from './menu';
import { WorkstationSettings } from './workstation-settings';

export interface PublicFrameProps {
  plant: Plant;
  children: ReactNode;
}

/** The frame of pages for anyone: sign-in and verification. */
export function PublicFrame({ plant, children }: PublicFrameProps) {
  const t = useMessages('shell');
  return (
    <PlantProvider plant={plant}>
      <a
        href="#page"
        className="absolute -top-20 left-4 z-50 rounded bg-accent px-4 py-2 font-semibold text-on-accent focus:top-2"
      >
        {t('skip')}
      </a>
      <header data-print="hide" className="flex h-14 items-center justify-between border-b border-line-strong bg-raised px-4">
        <Link href="/sign-in" className="flex items-center gap-2 text-accent">
          <Mark />
          <span className="text-xl font-bold tracking-tight text-ink">Ringtrue</span>
          <span className="ml-2 border-l border-line-strong pl-4 text-ink-soft max-sm:hidden">{plant.name}</span>
        </Link>
        <Menu button={t('settings')}>
          <WorkstationSettings />
        </Menu>
      </header>
      <main id="page" tabIndex={-1} className="mx-auto max-w-5xl p-6 outline-none">
        {children}
      </main>
    </PlantProvider>
  );
}

'use client';

import Link from 'next/link';
import { usePathname } from 'next/navigation';
import { useEffect, useState } from 'react';
import type { ReactNode } from 'react';
import { PlantProvider } from '@/components/theme/workstation';
import type { Plant } from '@/components/theme/workstation';
import { useMessages } from '@/components/theme/use-messages';
import { PageScanner } from '@/components/scanner/page-scanner';
import { Glyph } from '@/components/ui/glyph';
import { Mark } from '@/components/ui/mark';
import { KeyList } from './key-list';
import { isBench } from './navigation';
import { Rail } from './rail';
import { SerialSearch } from './serial-search';
import { UserMenu } from './user-menu';
import type { ShellUser } from './user-menu';

export interface ShellProps {
  user: ShellUser;
  /** Name and clock of the plant; without it times are shown in UTC. */
  plant?: Plant;
  children: ReactNode;
}

const noPlant: Plant = { name: '', timeZone: 'UTC' };

/** The frame of every signed-in page: top bar, pages by role, the page. On a bench or a narrow screen the pages are behind the menu. */
export function Shell({ user, plant = noPlant, children }: ShellProps) {
  const t = useMessages('shell');
  const path = usePathname();
  const [open, setOpen] = useState(false);
  const bench = isBench(path);
  useEffect(() => {
    const close = (event: KeyboardEvent) => {
      if (event.key === 'Escape') setOpen(false);
    };
    document.addEventListener('keydown', close);
    return () => document.removeEventListener('keydown', close);
  }, []);
  return (
    <PlantProvider plant={plant}>
      <PageScanner>
        <a
          href="#page"
          className="absolute -top-20 left-4 z-50 rounded bg-accent px-4 py-2 font-semibold text-on-accent focus:top-2"
        >
          {t('skip')}
        </a>
        <div className="flex h-dvh flex-col print:h-auto">
          <header data-print="hide" className="flex h-14 shrink-0 items-center gap-4 border-b border-line-strong bg-raised px-4">
            <button
              type="button"
              aria-expanded={open}
              aria-controls="pages"
              onClick={() => setOpen(!open)}
              className={`flex min-h-10 items-center gap-2 rounded border border-line-strong px-3 hover:bg-accent-wash ${bench ? '' : 'min-[1200px]:hidden'}`}
            >
              <Glyph name="menu" />
              {t('menu')}
            </button>
            <Link href="/" className="flex items-center gap-2 text-accent">
              <Mark />
              <span className="text-xl font-bold tracking-tight text-ink">Ringtrue</span>
            </Link>
            {plant.name !== '' && (
              <span className="border-l border-line-strong pl-4 text-ink-soft max-lg:hidden">{plant.name}</span>
            )}
            <div className="ml-auto flex min-w-0 flex-1 items-center justify-end gap-2">
              {user.role !== 'customer-quality' && <SerialSearch />}
              <KeyList />
              <UserMenu user={user} />
            </div>
          </header>
          <div className="relative flex min-h-0 flex-1 print:block">
            <div
              id="pages"
              data-print="hide"
              className={`w-52 shrink-0 overflow-y-auto border-r border-line bg-surface ${open ? 'absolute inset-y-0 left-0 z-20 border-line-strong' : 'hidden'} ${bench ? '' : 'min-[1200px]:static min-[1200px]:block min-[1200px]:border-line'}`}
            >
              <Rail role={user.role} onGo={() => setOpen(false)} />
            </div>
            <main
              id="page"
              tabIndex={-1}
              className={`min-w-0 flex-1 overflow-y-auto outline-none print:overflow-visible print:p-0 ${bench ? 'p-3' : 'p-6'}`}
            >
              {children}
            </main>
          </div>
        </div>
      </PageScanner>
    </PlantProvider>
  );
}

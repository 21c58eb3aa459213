'use client';

import { usePathname, useRouter } from 'next/navigation';
import { createContext, useContext, useEffect, useMemo, useRef, useState } from 'react';
import type { ReactNode } from 'react';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { usualPrefix, type Here } from '@/services/contracts/workstations';
import { readScan } from '@/services/contracts/scan-text';
import { BadgeDialog } from './badge-dialog';
import { isBadge, keepPlace } from './badge-text';
import { useScanner, type ScannerEvents } from './use-scanner';

interface Listening {
  /** The page that is open takes the scans; answers how to stop. */
  readonly listen: (events: ScannerEvents) => () => void;
  readonly switchPerson: () => void;
  readonly here: Here | undefined;
  /** This browser has just become a workstation. */
  readonly renewHere: () => Promise<unknown>;
}

const nobody: Listening = {
  listen: () => () => undefined,
  switchPerson: () => undefined,
  here: undefined,
  renewHere: () => Promise.resolve(),
};
const ScannerContext = createContext<Listening>(nobody);

export function usePageScanner(): Listening {
  return useContext(ScannerContext);
}

/** Takes the scans of the page while it is open. */
export function useScans(events: ScannerEvents): void {
  const { listen } = usePageScanner();
  const latest = useRef(events);
  useEffect(() => {
    latest.current = events;
  });
  const takesBadges = events.onBadge !== undefined;
  useEffect(
    () =>
      listen({
        onScan: (text) => latest.current.onScan(text),
        onBroken: () => latest.current.onBroken?.(),
        ...(takesBadges ? { onBadge: (text: string) => latest.current.onBadge?.(text) } : {}),
      }),
    [listen, takesBadges],
  );
}

const serialOf = (text: string) => readScan(text)?.serial ?? text;

/**
 * Scans go where they belong: a badge to the change of persons, anything else to the page that listens; on a page that
 * does not, a serial is looked up, and at a bench the person is asked first.
 */
export function PageScanner({ children }: { children: ReactNode }) {
  const t = useMessages('scanner');
  const router = useRouter();
  const path = usePathname();
  const { answer: here, renew } = useAnswer<Here>('/api/workstations/here', 60_000);
  const page = useRef<ScannerEvents | null>(null);
  const [badge, setBadge] = useState<string | null>(null);
  const [asked, setAsked] = useState<string | null>(null);
  const person = here?.person;
  useEffect(() => {
    if (person !== undefined) keepPlace(person, path);
  }, [person, path]);
  const open = (text: string) => router.push(`/parts?serial=${encodeURIComponent(serialOf(text))}`);
  useScanner(here?.scanPrefix ?? usualPrefix, {
    onScan: (text) => {
      if (isBadge(text)) {
        if (page.current?.onBadge) page.current.onBadge(text);
        else setBadge(text);
      } else if (page.current) page.current.onScan(text);
      else if (path.startsWith('/inspections/')) setAsked(text);
      else open(text);
    },
    onBroken: () => page.current?.onBroken?.(),
  });
  const value = useMemo<Listening>(
    () => ({
      listen: (events) => {
        page.current = events;
        return () => {
          if (page.current === events) page.current = null;
        };
      },
      switchPerson: () => setBadge(''),
      here,
      renewHere: () => renew(),
    }),
    [here, renew],
  );
  return (
    <ScannerContext.Provider value={value}>
      {children}
      {badge !== null ? <BadgeDialog badge={badge} here={here} onClose={() => setBadge(null)} /> : null}
      <Dialog open={asked !== null} onClose={() => setAsked(null)} title={t('leaveTitle', { serial: serialOf(asked ?? '') })}>
        <p>{t('leave')}</p>
        <div className="mt-4 flex gap-3">
          <Button
            kind="primary"
            size="capture"
            onClick={() => {
              if (asked !== null) open(asked);
              setAsked(null);
            }}
          >
            {t('leaveGo', { serial: serialOf(asked ?? '') })}
          </Button>
          <Button size="capture" onClick={() => setAsked(null)}>
            {t('stay')}
          </Button>
        </div>
      </Dialog>
    </ScannerContext.Provider>
  );
}

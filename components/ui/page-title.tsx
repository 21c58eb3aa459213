'use client';

import { createContext, useContext, useEffect, useState, type ReactNode } from 'react';

const Naming = createContext<(title: string | undefined) => void>(() => undefined);

/** Holds the window's title for the pages inside. */
export function TitleKeeper({ children }: { readonly children: ReactNode }) {
  const [own, setOwn] = useState<string>();
  return (
    <Naming value={setOwn}>
      <title>{own === undefined ? 'Ringtrue' : `${own} · Ringtrue`}</title>
      {children}
    </Naming>
  );
}

/** Names the page in the window's title, first what is its own: tabs side by side are told apart by their beginnings. */
export function PageTitle({ title }: { readonly title: string }) {
  const name = useContext(Naming);
  useEffect(() => {
    name(title);
    return () => name(undefined);
  }, [name, title]);
  return null;
}

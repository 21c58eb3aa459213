'use client';

import { useEffect, useRef } from 'react';
import type { ReactNode } from 'react';
import { Glyph } from '@/components/ui/glyph';

export interface MenuProps {
  /** What the button shows. */
  button: ReactNode;
  children: ReactNode;
}

/** A disclosure that closes with Escape and by a press elsewhere. */
export function Menu({ button, children }: MenuProps) {
  const element = useRef<HTMLDetailsElement>(null);
  useEffect(() => {
    const close = (event: Event) => {
      const details = element.current;
      if (!details?.open) return;
      if (event instanceof KeyboardEvent) {
        if (event.key !== 'Escape') return;
        details.open = false;
        details.querySelector('summary')?.focus();
      } else if (event.target instanceof Node && !details.contains(event.target)) {
        details.open = false;
      }
    };
    document.addEventListener('keydown', close);
    document.addEventListener('pointerdown', close);
    return () => {
      document.removeEventListener('keydown', close);
      document.removeEventListener('pointerdown', close);
    };
  }, []);
  return (
    <details ref={element} className="relative">
      <summary className="flex min-h-10 list-none items-center gap-2 rounded border border-transparent px-3 hover:border-line-strong [&::-webkit-details-marker]:hidden">
        {button}
        <Glyph name="down" pixels={12} />
      </summary>
      <div className="absolute right-0 z-30 mt-1 w-72 rounded border border-line-strong bg-raised p-3">{children}</div>
    </details>
  );
}

'use client';

import { useId, useRef, useState } from 'react';
import type { KeyboardEvent, ReactNode } from 'react';

export interface TabsProps {
  label: string;
  tabs: readonly { key: string; title: ReactNode; content: ReactNode }[];
  /** The tab open at first; the first one unless told. */
  opened?: string;
  onOpen?: (key: string) => void;
}

/** Tabs after the WAI-ARIA pattern: arrows move, Home and End jump, one stop for Tab. */
export function Tabs({ label, tabs, opened, onOpen }: TabsProps) {
  const [open, setOpen] = useState(opened ?? tabs[0]?.key);
  const id = useId();
  const list = useRef<HTMLDivElement>(null);
  const show = (key: string) => {
    setOpen(key);
    onOpen?.(key);
  };
  const move = (event: KeyboardEvent) => {
    const at = tabs.findIndex(({ key }) => key === open);
    const steps: Record<string, number> = { ArrowRight: at + 1, ArrowLeft: at - 1, Home: 0, End: tabs.length - 1 };
    const target = steps[event.key];
    if (target === undefined) return;
    event.preventDefault();
    const next = (target + tabs.length) % tabs.length;
    const key = tabs[next]?.key;
    if (key === undefined) return;
    show(key);
    list.current?.querySelectorAll<HTMLElement>('[role=tab]')[next]?.focus();
  };
  return (
    <div>
      <div
        ref={list}
        role="tablist"
        aria-label={label}
        onKeyDown={move}
        className="flex gap-1 overflow-x-auto border-b border-line-strong px-1 pt-1"
      >
        {tabs.map(({ key, title }) => (
          <button
            key={key}
            type="button"
            role="tab"
            id={`${id}-tab-${key}`}
            aria-controls={`${id}-panel-${key}`}
            aria-selected={key === open}
            tabIndex={key === open ? 0 : -1}
            onClick={() => show(key)}
            className="control min-h-10 border-b-4 border-transparent px-4 whitespace-nowrap text-ink-soft hover:text-accent aria-selected:border-accent aria-selected:font-semibold aria-selected:text-accent"
          >
            {title}
          </button>
        ))}
      </div>
      {tabs.map(({ key, content }) => (
        <div
          key={key}
          role="tabpanel"
          id={`${id}-panel-${key}`}
          aria-labelledby={`${id}-tab-${key}`}
          hidden={key !== open}
          tabIndex={0}
          className="py-4"
        >
          {content}
        </div>
      ))}
    </div>
  );
}

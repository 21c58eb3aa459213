'use client';

import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { PageTitle } from '@/components/ui/page-title';
import { labelPoint, largeProfile, ringShapes } from '@/components/ui/ring-geometry';

const ticks = Array.from({ length: 120 }, (_, index) => index * 3);
const twelve = Array.from({ length: 12 }, (_, index) => ({ state: index === 0 ? ('in-work' as const) : ('met' as const) }));

function tick(deg: number): string {
  const from = labelPoint(deg, 50);
  const to = labelPoint(deg, deg % 30 === 0 ? 56 : deg % 15 === 0 ? 54 : 52.5);
  return `M${from.x} ${from.y}L${to.x} ${to.y}`;
}

// In a dark room a surface this large would be a lamp: there it is hardly lighter than the ground.
const standing = 'fill-accent [html[data-palette=booth]_&]:fill-line [html[data-palette=reading-room]_&]:fill-line';
const closing = 'fill-accept [html[data-palette=booth]_&]:fill-line-strong';

export interface ThresholdProps {
  title: string;
  children: ReactNode;
}

/** Where one comes in: the ring on its dial, with one segment still to close, beside the form. */
export function Threshold({ title, children }: ThresholdProps) {
  const t = useMessages('shell');
  return (
    <div className="grid items-center gap-x-16 gap-y-8 py-6 md:grid-cols-[minmax(0,1fr)_24rem] md:py-14">
      <div className="flex flex-col items-center gap-6 max-md:order-2 max-md:hidden">
        <svg viewBox="-8 -8 116 116" aria-hidden className="w-full max-w-md">
          <path d={ticks.map(tick).join('')} className="stroke-line-strong" strokeWidth="0.4" fill="none" />
          {ringShapes(twelve, largeProfile).map(({ path, form }) => (
            <path key={path} d={path} className={form === 'half' ? closing : standing} />
          ))}
        </svg>
        <p className="max-w-sm text-center text-lg text-ink-soft text-balance">{t('saying')}</p>
      </div>
      <section className="rounded border border-line-strong bg-raised p-6">
        <PageTitle title={title} />
        <h1 className="text-2xl font-bold">{title}</h1>
        <div aria-hidden className="graduated mt-2 mb-5" />
        {children}
      </section>
    </div>
  );
}

'use client';

import type { ReactNode } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from './glyph';

export interface CautionProps {
  /** What can hurt, in a few words. */
  title?: string;
  children: ReactNode;
}

/** Stands beside the fields where the work can hurt someone; never a pop-up. */
export function Caution({ title, children }: CautionProps) {
  const t = useMessages('ui');
  return (
    <div role="note" aria-label={title ?? t('caution')} className="flex rounded border border-caution bg-caution-wash">
      <div aria-hidden className="hatched w-2.5 shrink-0 text-caution" />
      <div className="px-3 py-2">
        <p className="flex items-center gap-2 font-semibold text-caution">
          <Glyph name="caution" />
          {title ?? t('caution')}
        </p>
        <div className="text-sm text-ink">{children}</div>
      </div>
    </div>
  );
}

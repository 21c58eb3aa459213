'use client';

import { useMessages } from '@/components/theme/use-messages';

export interface SkeletonProps {
  /** Lines to keep free for what is coming. */
  lines?: number;
}

/** Keeps the place of what is being fetched. It does not move, and says in words that it waits. */
export function Skeleton({ lines = 3 }: SkeletonProps) {
  const t = useMessages('ui');
  return (
    <div role="status" className="flex flex-col gap-3 py-1">
      <span className="sr-only">{t('loading')}</span>
      {Array.from({ length: lines }, (_, line) => (
        <span key={line} aria-hidden className="h-4 rounded bg-line" style={{ width: `${[92, 78, 85, 64][line % 4]}%` }} />
      ))}
    </div>
  );
}

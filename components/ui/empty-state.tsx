import type { ReactNode } from 'react';

export interface EmptyStateProps {
  title: string;
  /** What to do next. */
  children?: ReactNode;
  actions?: ReactNode;
}

/** Nothing here yet, and what to do about it: a ring with all still to come. */
export function EmptyState({ title, children, actions }: EmptyStateProps) {
  return (
    <div className="flex items-center gap-6 px-6 py-8">
      <svg viewBox="0 0 64 64" width="64" height="64" aria-hidden className="shrink-0 text-line-strong">
        <circle cx="32" cy="32" r="26" fill="none" stroke="currentColor" strokeWidth="2" strokeDasharray="12.8 3.54" />
      </svg>
      <div>
        <p className="text-lg font-semibold">{title}</p>
        {children !== undefined && <div className="max-w-prose text-ink-soft">{children}</div>}
        {actions !== undefined && <div className="mt-3 flex flex-wrap gap-2">{actions}</div>}
      </div>
    </div>
  );
}

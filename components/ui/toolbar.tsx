import type { ReactNode } from 'react';

export interface ToolbarProps {
  label: string;
  children: ReactNode;
  /** Stands at the far end. */
  end?: ReactNode;
}

/** Filters and tools above a list or picture. */
export function Toolbar({ label, children, end }: ToolbarProps) {
  return (
    <div role="group" aria-label={label} data-print="hide" className="mb-3 flex flex-wrap items-end gap-x-3 gap-y-2">
      {children}
      {end !== undefined && <div className="ml-auto flex flex-wrap items-end gap-2">{end}</div>}
    </div>
  );
}

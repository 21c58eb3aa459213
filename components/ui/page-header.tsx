import type { ReactNode } from 'react';
import { PageTitle } from './page-title';

export interface PageHeaderProps {
  title: ReactNode;
  /** A serial, number or other code: set in mono beside the title. */
  code?: string;
  subtitle?: ReactNode;
  /** A ring (small or summed) that stands before the title. */
  ring?: ReactNode;
  actions?: ReactNode;
}

/** The head of a page on the graduated edge of a rule. */
export function PageHeader({ title, code, subtitle, ring, actions }: PageHeaderProps) {
  return (
    <header className="mb-5">
      {typeof title === 'string' ? <PageTitle title={code === undefined ? title : `${title} ${code}`} /> : null}
      <div className="flex flex-wrap items-end justify-between gap-x-6 gap-y-3 pb-3">
        <div className="flex min-w-0 items-center gap-4">
          {ring}
          <div className="min-w-0">
            <h1 className="text-2xl leading-tight font-bold">
              {title}
              {code !== undefined && <span className="ml-3 font-mono font-semibold break-all">{code}</span>}
            </h1>
            {subtitle !== undefined && <p className="mt-1 text-ink-soft">{subtitle}</p>}
          </div>
        </div>
        {actions !== undefined && (
          <div data-print="hide" className="flex flex-wrap items-center gap-2">
            {actions}
          </div>
        )}
      </div>
      <div aria-hidden className="graduated" />
    </header>
  );
}

import type { ReactNode } from 'react';

export interface PanelProps {
  title?: ReactNode;
  /** One line under the title. */
  subtitle?: ReactNode;
  actions?: ReactNode;
  /** 2 unless the panel stands inside another. */
  level?: 2 | 3;
  /** Removes the inner margin, for a table or picture that fills the panel. */
  flush?: boolean;
  id?: string;
  children?: ReactNode;
}

/** A sheet on the bench: raised ground, hairline, heading with its actions. */
export function Panel({ title, subtitle, actions, level = 2, flush = false, id, children }: PanelProps) {
  const Heading = level === 2 ? 'h2' : 'h3';
  return (
    <section id={id} className="rounded border border-line bg-raised">
      {(title !== undefined || actions !== undefined) && (
        <header className="flex min-h-12 flex-wrap items-center justify-between gap-x-4 gap-y-2 border-b border-line px-4 py-2">
          <div>
            {title !== undefined && <Heading className="text-lg leading-snug font-semibold">{title}</Heading>}
            {subtitle !== undefined && <p className="text-sm text-ink-soft">{subtitle}</p>}
          </div>
          {actions !== undefined && <div className="flex flex-wrap items-center gap-2">{actions}</div>}
        </header>
      )}
      {children !== undefined && <div className={flush ? 'overflow-x-auto' : 'p-4'}>{children}</div>}
    </section>
  );
}

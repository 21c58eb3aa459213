import type { ReactNode } from 'react';

export interface DefinitionListProps {
  items: readonly { term: ReactNode; value: ReactNode; key?: string }[];
  /** Columns of pairs on a wide screen. */
  columns?: 1 | 2 | 3;
}

const widths = { 1: '', 2: 'md:grid-cols-2', 3: 'md:grid-cols-2 xl:grid-cols-3' } as const;

/** Terms and what they are, on hairlines. */
export function DefinitionList({ items, columns = 1 }: DefinitionListProps) {
  return (
    <dl className={`grid gap-x-8 ${widths[columns]}`}>
      {items.map(({ term, value, key }, index) => (
        <div key={key ?? index} className="flex items-baseline gap-4 border-b border-line py-1.5">
          <dt className="w-2/5 max-w-48 shrink-0 text-ink-soft">{term}</dt>
          <dd className="min-w-0 flex-1 break-words">{value}</dd>
        </div>
      ))}
    </dl>
  );
}

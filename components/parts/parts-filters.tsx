'use client';

import type { ReactNode } from 'react';
import type { useUrlFilters } from '@/components/grids/use-url-filters';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { partState } from '@/services/contracts/common';
import type { Customer } from '@/services/contracts/orders';
import type { Drawing } from '@/services/contracts/plans';

export const partsFilterNames = ['serial', 'state', 'partNumber', 'customer', 'cluster', 'held', 'findings'] as const;
type Filters = ReturnType<typeof useUrlFilters<(typeof partsFilterNames)[number]>>;

function Choice({ label, value, onChoose, children }: ChoiceProps) {
  return (
    <label className="flex flex-col gap-1">
      <span className="font-semibold">{label}</span>
      <select className="field" value={value} onChange={(event) => onChoose(event.target.value)}>
        {children}
      </select>
    </label>
  );
}

interface ChoiceProps {
  readonly label: string;
  readonly value: string;
  readonly onChoose: (value: string) => void;
  readonly children: ReactNode;
}

/** What the list of parts can be narrowed by; all of it is in the address. */
export function PartsFilters({ filters, set, reset, filtered }: Pick<Filters, 'filters' | 'set' | 'reset' | 'filtered'>) {
  const t = useMessages('parts');
  const stateWord = useMessages('ui');
  const customers = useAnswer<{ items: Customer[] }>('/api/customers?limit=200').answer?.items ?? [];
  const drawings = useAnswer<{ items: Drawing[] }>('/api/drawings?limit=200').answer?.items ?? [];
  return (
    <div className="flex flex-wrap items-end gap-4">
      <label className="flex flex-col gap-1">
        <span className="font-semibold">{t('find')}</span>
        <input
          className="field w-44 font-mono"
          value={filters.serial}
          onChange={(event) => set({ serial: event.target.value })}
        />
      </label>
      <Choice label={t('state')} value={filters.state} onChoose={(state) => set({ state })}>
        <option value="">{t('allStates')}</option>
        {partState.options.map((state) => (
          <option key={state} value={state}>
            {stateWord(`state.${state}`)}
          </option>
        ))}
      </Choice>
      <Choice label={t('partNumber')} value={filters.partNumber} onChoose={(partNumber) => set({ partNumber })}>
        <option value="">{t('allNumbers')}</option>
        {drawings.map(({ number }) => (
          <option key={number}>{number}</option>
        ))}
      </Choice>
      <Choice label={t('customer')} value={filters.customer} onChoose={(customer) => set({ customer })}>
        <option value="">{t('allCustomers')}</option>
        {customers.map(({ code, name }) => (
          <option key={code} value={code}>
            {name}
          </option>
        ))}
      </Choice>
      <label className="flex flex-col gap-1">
        <span className="font-semibold">{t('findCluster')}</span>
        <input
          className="field w-36 font-mono"
          value={filters.cluster}
          onChange={(event) => set({ cluster: event.target.value })}
        />
      </label>
      <label className="flex items-center gap-2 py-2">
        <input
          type="checkbox"
          checked={filters.findings === 'open'}
          onChange={(event) => set({ findings: event.target.checked ? 'open' : '' })}
        />
        {t('onlyFindings')}
      </label>
      <label className="flex items-center gap-2 py-2">
        <input
          type="checkbox"
          checked={filters.held === 'true'}
          onChange={(event) => set({ held: event.target.checked ? 'true' : '' })}
        />
        {t('onlyHeld')}
      </label>
      {filtered ? <Button onClick={reset}>{t('clear')}</Button> : null}
    </div>
  );
}

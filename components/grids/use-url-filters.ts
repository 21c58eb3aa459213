'use client';

import { usePathname, useRouter, useSearchParams } from 'next/navigation';
import { useMemo } from 'react';

/**
 * Filters that live in the address, so that a view can be sent to a colleague.
 * `query` is ready to be put behind a '?' (empty filters left out); `set` replaces the address without a new entry in the history.
 */
export function useUrlFilters<Name extends string>(names: readonly Name[]) {
  const router = useRouter();
  const path = usePathname();
  const parameters = useSearchParams();
  const list = names.join(' ');
  const filters = useMemo(
    () => Object.fromEntries(list.split(' ').map((name) => [name, parameters.get(name) ?? ''])) as Record<Name, string>,
    [list, parameters],
  );
  const go = (changed: URLSearchParams) => {
    const text = changed.toString();
    router.replace(text === '' ? path : `${path}?${text}`, { scroll: false });
  };
  const set = (changes: Partial<Record<Name, string>>) => {
    const changed = new URLSearchParams(parameters);
    for (const [name, value] of Object.entries(changes) as [Name, string | undefined][]) {
      if (value === undefined || value === '') changed.delete(name);
      else changed.set(name, value);
    }
    go(changed);
  };
  const reset = () => {
    const kept = new URLSearchParams(parameters);
    for (const name of names) kept.delete(name);
    go(kept);
  };
  const query = new URLSearchParams(
    Object.entries(filters).filter((entry): entry is [string, string] => entry[1] !== ''),
  ).toString();
  return { filters, set, reset, query, filtered: query !== '' };
}

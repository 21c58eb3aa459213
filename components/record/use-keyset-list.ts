'use client';

import useSWRInfinite from 'swr/infinite';
import { sendJson } from '@/components/forms/send-json';
import { problemOf, type Problem } from '@/components/ui/problem';

interface Page<Row> {
  readonly items: readonly Row[];
  readonly next: string | null;
}

/** A keyset list that grows by a page when asked: what was read so far, and how to read on. */
export function useKeysetList<Row>(url: string): {
  readonly rows: readonly Row[] | undefined;
  readonly problem: Problem | undefined;
  readonly more: (() => void) | undefined;
  readonly busy: boolean;
  readonly renew: () => Promise<unknown>;
} {
  const { data, error, size, setSize, mutate, isValidating } = useSWRInfinite<Page<Row>, unknown>(
    (place: number, before: Page<Row> | null) => {
      if (place === 0) return url;
      if (before === null || before.next === null) return null;
      return `${url}${url.includes('?') ? '&' : '?'}after=${encodeURIComponent(before.next)}`;
    },
    (address: string) => sendJson<Page<Row>>(address, { method: 'GET' }),
    { revalidateFirstPage: false },
  );
  const last = data?.at(-1);
  return {
    rows: data?.flatMap(({ items }) => items),
    problem: error === undefined ? undefined : problemOf(error),
    more: last && last.next !== null ? () => void setSize(size + 1) : undefined,
    busy: isValidating,
    renew: () => mutate(),
  };
}

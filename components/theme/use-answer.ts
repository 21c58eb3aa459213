'use client';

import useSWR from 'swr';
import { sendJson } from '@/components/forms/send-json';
import { problemOf, type Problem } from '@/components/ui/problem';

export interface Asked<Answer> {
  readonly answer: Answer | undefined;
  readonly problem: Problem | undefined;
  /** Asks again, or puts an answer in place that a change just brought. */
  readonly renew: (answer?: Answer) => Promise<unknown>;
}

/** Reads a call of the API; null asks nothing. `everyMs` asks again while it is set. */
export function useAnswer<Answer>(url: string | null, everyMs = 0): Asked<Answer> {
  const { data, error, mutate } = useSWR<Answer, unknown>(
    url,
    (address: string) => sendJson<Answer>(address, { method: 'GET' }),
    { refreshInterval: everyMs },
  );
  return {
    answer: data,
    problem: error === undefined ? undefined : problemOf(error),
    // Without an answer the call is asked again and the present one stays on the page meanwhile.
    renew: (answer) => (answer === undefined ? mutate() : mutate(answer, false)),
  };
}

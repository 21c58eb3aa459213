'use client';

import { useState } from 'react';
import { useAnswer, type Asked } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';

interface KeysetPage<Row> {
  readonly items: Row[];
  readonly next: string | null;
}

export interface Trail<Row> extends Asked<KeysetPage<Row>> {
  readonly forward: (() => void) | undefined;
  readonly back: (() => void) | undefined;
}

/** A keyset-paged call read page by page; the way back is remembered. `address` carries its own query. */
export function usePageTrail<Row>(address: string): Trail<Row> {
  const [trail, setTrail] = useState<{ address: string; keys: readonly string[] }>({ address, keys: [] });
  // Another filter starts at the first page.
  const keys = trail.address === address ? trail.keys : [];
  const after = keys.at(-1);
  const asked = useAnswer<KeysetPage<Row>>(after === undefined ? address : `${address}&after=${after}`);
  const next = asked.answer?.next ?? null;
  return {
    ...asked,
    forward: next === null ? undefined : () => setTrail({ address, keys: [...keys, next] }),
    back: keys.length === 0 ? undefined : () => setTrail({ address, keys: keys.slice(0, -1) }),
  };
}

/** Turns the pages of a trail; nothing when there is one page. */
export function PageTurner({ forward, back }: Pick<Trail<unknown>, 'forward' | 'back'>) {
  const t = useMessages('accounts');
  if (!forward && !back) return null;
  return (
    <div className="flex gap-2 border-t border-line p-3">
      <Button disabled={!back} onClick={back}>
        {t('back')}
      </Button>
      <Button disabled={!forward} onClick={forward}>
        {t('more')}
      </Button>
    </div>
  );
}

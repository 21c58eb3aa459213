'use client';

import Link from 'next/link';
import { useMessages } from '@/components/theme/use-messages';
import type { Lot } from '@/services/contracts/parts';

type Ref = Lot['parents'][number];

function Branch({ title, lots, none }: { title: string; lots: readonly Ref[]; none: string }) {
  const t = useMessages('lots');
  return (
    <div className="min-w-0 flex-1">
      <h3 className="mb-1 font-semibold text-ink-soft">{title}</h3>
      {lots.length === 0 ? <p>{none}</p> : null}
      <ul className="max-h-72 overflow-y-auto border-l border-line-strong">
        {lots.map((one) => (
          <li key={one.id} className="flex items-baseline gap-2 py-1">
            <span aria-hidden className="w-4 border-b border-line-strong" />
            {t(`kinds.${one.kind}`)}
            <Link className="font-mono text-accent underline underline-offset-4" href={`/lots/${one.id}`}>
              {one.number}
            </Link>
          </li>
        ))}
      </ul>
    </div>
  );
}

/** What a lot came from, the lot, and what it went into; every name leads on, so the tree can be walked. */
export function LotTree({ lot }: { lot: Lot }) {
  const t = useMessages('lots');
  return (
    <div className="flex flex-wrap items-start gap-8">
      <Branch title={t('above')} lots={lot.parents} none={t('none')} />
      <div className="rounded border border-accent px-4 py-2">
        <p className="text-sm text-ink-soft">{t('here')}</p>
        <p>
          {t(`kinds.${lot.kind}`)} <span className="font-mono">{lot.number}</span>
        </p>
      </div>
      <Branch title={t('below')} lots={lot.children} none={t('none')} />
    </div>
  );
}

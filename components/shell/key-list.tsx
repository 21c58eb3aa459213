'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Dialog } from '@/components/ui/dialog';
import { KeyHint } from '@/components/ui/key-hint';
import { usePageKey } from './use-page-key';

/** The keys that work everywhere; `?` shows them. */
export function KeyList() {
  const t = useMessages('shell');
  const [open, setOpen] = useState(false);
  usePageKey('?', () => setOpen(true));
  const rows = [
    { keys: ['/'], does: t('keyList.search') },
    { keys: ['?'], does: t('keyList.keys') },
    { keys: ['Esc'], does: t('keyList.escape') },
    { keys: ['Enter'], does: t('keyList.row') },
    { keys: ['←', '↑', '↓', '→'], does: t('keyList.arrows') },
  ];
  return (
    <>
      <button
        type="button"
        onClick={() => setOpen(true)}
        aria-label={t('keys')}
        aria-keyshortcuts="?"
        className="grid min-h-10 min-w-10 place-items-center rounded font-semibold text-ink-soft hover:bg-accent-wash hover:text-accent pointer-coarse:hidden"
      >
        ?
      </button>
      <Dialog open={open} onClose={() => setOpen(false)} title={t('keys')}>
        <dl>
          {rows.map(({ keys, does }) => (
            <div key={does} className="flex items-center gap-4 border-b border-line py-2 last:border-b-0">
              <dt className="w-32 shrink-0">
                <KeyHint keys={keys} />
              </dt>
              <dd>{does}</dd>
            </div>
          ))}
        </dl>
      </Dialog>
    </>
  );
}

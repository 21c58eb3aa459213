'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';

/** A page that could not be made: what is safe, what to do, and the number under which the log knows it. */
export function BrokenPage({ digest, again }: { readonly digest: string | undefined; readonly again: () => void }) {
  const t = useMessages('shell');
  return (
    <main className="mx-auto max-w-3xl p-6">
      <PageHeader title={t('broken')} />
      <Notice
        kind="refusal"
        title={t('broken')}
        actions={
          <Button kind="primary" onClick={again}>
            {t('again')}
          </Button>
        }
      >
        {t('brokenHint', { number: digest ?? '–' })}
      </Notice>
    </main>
  );
}

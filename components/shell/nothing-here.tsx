'use client';

import { useMessages } from '@/components/theme/use-messages';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { PageHeader } from '@/components/ui/page-header';

/** The answer to an address that leads nowhere, or nowhere that this person may see: both read the same. */
export function NothingHere() {
  const t = useMessages('shell');
  return (
    <>
      <PageHeader title={t('missing')} />
      <EmptyState title={t('missingHint')} actions={<LinkButton href="/">{t('toToday')}</LinkButton>} />
    </>
  );
}

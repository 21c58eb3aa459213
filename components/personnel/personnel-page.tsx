'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { PageHeader } from '@/components/ui/page-header';
import { AuthorisationsPanel, type Reader } from './authorisations-panel';
import { PrepareForm, type PersonChoice } from './prepare-form';
import { VisionForm } from './vision-form';
import { VisionPanel } from './vision-panel';

export interface PersonnelPageProps {
  reader: Reader;
  people: readonly PersonChoice[];
  mayPrepare: boolean;
  mayRecord: boolean;
}

/** What a person's work counts as: authorisations and vision tests, and the forms of those who keep them. */
export function PersonnelPage({ reader, people, mayPrepare, mayRecord }: PersonnelPageProps) {
  const t = useMessages('personnel');
  const [open, setOpen] = useState<'prepare' | 'record'>();
  const [prepared, setPrepared] = useState(0);
  const [recorded, setRecorded] = useState(0);
  return (
    <>
      <PageHeader
        title={t('title')}
        subtitle={t('subtitle')}
        actions={
          <>
            {mayRecord ? <Button onClick={() => setOpen('record')}>{t('record')}</Button> : null}
            {mayPrepare ? (
              <Button kind="primary" onClick={() => setOpen('prepare')}>
                {t('prepare')}
              </Button>
            ) : null}
          </>
        }
      />
      <div className="flex flex-col gap-4">
        <AuthorisationsPanel reader={reader} turn={prepared} />
        <VisionPanel turn={recorded} />
      </div>
      <Dialog open={open !== undefined} onClose={() => setOpen(undefined)} title={t(open ?? 'prepare')}>
        {open === 'record' ? (
          <VisionForm people={people} onDone={() => setRecorded(recorded + 1)} />
        ) : (
          <PrepareForm people={people} onDone={() => setPrepared(prepared + 1)} />
        )}
      </Dialog>
    </>
  );
}

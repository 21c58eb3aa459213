'use client';

import Link from 'next/link';
import { useState } from 'react';
import { PageTurner, usePageTrail } from '@/components/accounts/page-trail';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { EmptyState } from '@/components/ui/empty-state';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import type { Drawing } from '@/services/contracts/plans';
import { NewDrawingForm } from './new-drawing-form';
import { StartIssue } from './start-issue';

function DrawingPanel({ drawing, mayPrepare }: { readonly drawing: Drawing; readonly mayPrepare: boolean }) {
  const t = useMessages('plans');
  return (
    <Panel title={`${drawing.number} ${drawing.title}`} subtitle={drawing.customer.name}>
      <ul className="flex flex-col gap-3">
        {drawing.revisions.map((revision) => (
          <li key={revision.id} className="flex flex-wrap items-center gap-x-6 gap-y-2">
            <strong className="min-w-32">{t('revision', { revision: revision.revision })}</strong>
            {revision.plans.map((plan) => (
              <span key={plan.id} className="flex items-center gap-2">
                <Link className="text-accent underline underline-offset-4" href={`/plans/${plan.id}`}>
                  {t('planIssue', { drawing: drawing.number, revision: revision.revision, issue: plan.issue })}
                </Link>
                <StateWord state={plan.state} />
              </span>
            ))}
            {revision.plans.length === 0 ? <span className="text-ink-soft">{t('noPlans')}</span> : null}
            {mayPrepare ? (
              <span className="ml-auto">
                <StartIssue drawing={drawing.number} revision={revision.revision} />
              </span>
            ) : null}
          </li>
        ))}
      </ul>
    </Panel>
  );
}

/** The customers' drawings with their revisions, and our numbered readings of them. */
export function DrawingsPage({ mayPrepare }: { readonly mayPrepare: boolean }) {
  const t = useMessages('plans');
  const trail = usePageTrail<Drawing>('/api/drawings?limit=50');
  const [entering, setEntering] = useState(false);
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={t('drawings')}
        subtitle={t('drawingsHint')}
        actions={mayPrepare ? <Button onClick={() => setEntering(true)}>{t('newDrawing')}</Button> : undefined}
      />
      <Dialog open={entering} onClose={() => setEntering(false)} title={t('newDrawing')}>
        <NewDrawingForm
          onDone={() => {
            setEntering(false);
            void trail.renew();
          }}
        />
      </Dialog>
      {trail.problem ? <ProblemNotice problem={trail.problem} /> : null}
      {trail.answer === undefined && !trail.problem ? <Skeleton lines={6} /> : null}
      {trail.answer?.items.length === 0 ? <EmptyState title={t('noDrawings')}>{t('noDrawingsHint')}</EmptyState> : null}
      {(trail.answer?.items ?? []).map((drawing) => (
        <DrawingPanel key={drawing.id} drawing={drawing} mayPrepare={mayPrepare} />
      ))}
      <PageTurner {...trail} />
    </div>
  );
}

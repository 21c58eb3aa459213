'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Notice } from '@/components/ui/notice';
import { VerdictMark } from '@/components/ui/verdict-mark';
import { When } from '@/components/ui/when';
import type { Draft } from './use-draft';

/** The verdict of the whole, what is missing and whether it is saved. */
export function VerdictBar({ draft, children }: { draft: Draft; children: React.ReactNode }) {
  const t = useMessages('inspections');
  const { judgement, saved, theirs } = draft;
  const missing = judgement.evaluation?.missing ?? [];
  const soFar = judgement.evaluation?.verdictSoFar;
  return (
    <footer className="flex flex-wrap items-center gap-x-6 gap-y-2 border-t border-line-strong bg-raised px-4 py-2">
      <div role="status" aria-live="polite" className="flex flex-wrap items-center gap-4">
        {soFar ? (
          <VerdictMark verdict={judgement.evaluation?.complete ? (judgement.evaluation.verdict ?? soFar) : soFar} size="large" />
        ) : (
          <span>{t('noVerdict')}</span>
        )}
        <span>
          {missing.length === 0
            ? t('nothingMissing')
            : `${t('missing', { count: missing.length })} – ${missing
                .slice(0, 6)
                .map(({ kind, number }) => `${kind} ${number}`)
                .join(', ')}`}
        </span>
      </div>
      <span data-saved={saved.kind} className={saved.kind === 'unsaved' ? 'text-reject' : 'text-ink-soft'}>
        {saved.kind === 'unsaved' ? t('unsaved', { reason: saved.problem.detail ?? saved.problem.title }) : t(saved.kind)}
      </span>
      {theirs ? (
        <Notice kind="unsure" title={t('conflict')}>
          <p>{t('conflictText', { name: theirs.changed.name, at: theirs.changed.at.slice(11, 16) })}</p>
          <When at={theirs.changed.at} />
          <div className="flex gap-2">
            <Button onClick={draft.takeTheirs}>{t('takeTheirs')}</Button>
            <Button onClick={draft.keepMine}>{t('keepMine')}</Button>
          </div>
        </Notice>
      ) : null}
      <div className="ms-auto">{children}</div>
    </footer>
  );
}

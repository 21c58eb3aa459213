'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Glyph } from '@/components/ui/glyph';
import { VerdictMark, type Verdict } from '@/components/ui/verdict-mark';
import { noAnswerType } from '@/components/ui/problem';
import type { Judgement } from '@/services/contracts/live-judgement';
import type { SavedState } from './draft-keeper';
import { useMissingWords } from './entry-words';
import type { MissingEntry } from './missing-entries';

/** The verdict of what is entered; an entry that cannot be judged leaves nothing accepted. */
export function verdictSoFar({ evaluation, faults }: Judgement): Verdict | undefined {
  if (!evaluation) return undefined;
  const verdict = evaluation.complete ? evaluation.verdict : (evaluation.verdictSoFar ?? undefined);
  return verdict === 'accept' && faults.length > 0 ? 'indeterminate' : verdict;
}

function Missing({ missing }: { missing: readonly MissingEntry[] }) {
  const t = useMessages('inspections');
  const words = useMissingWords();
  if (missing.length === 0) return <span>{t('nothingMissing')}</span>;
  return (
    <span className="flex min-w-0 flex-wrap items-center gap-x-2">
      <strong>{t('missing', { count: missing.length })}</strong>
      {missing.slice(0, 4).map((entry) => (
        <button
          key={`${entry.kind} ${entry.field}`}
          type="button"
          className="control text-accent underline underline-offset-4"
          onClick={() => {
            const field = document.getElementById(entry.field);
            field?.scrollIntoView({ block: 'center' });
            field?.focus();
          }}
        >
          {words(entry)}
        </button>
      ))}
      {missing.length > 4 ? <span className="text-ink-soft">{t('missingMore', { count: missing.length - 4 })}</span> : null}
    </span>
  );
}

function Saved({ saved }: { saved: SavedState }) {
  const t = useMessages('inspections');
  if (saved.kind !== 'unsaved') {
    return (
      <span data-saved={saved.kind} className="text-ink-soft">
        {t(saved.kind)}
      </span>
    );
  }
  const { problem, retrying } = saved;
  const reason =
    problem.type === noAnswerType
      ? t('noNetwork')
      : problem.status === 412
        ? t('conflict')
        : problem.status === 401
          ? t('sessionEnded')
          : (problem.detail ?? problem.title);
  return (
    <span data-saved="unsaved" role="alert" className="flex max-w-md items-start gap-2 text-sm text-reject">
      <Glyph name="caution" />
      <span>
        {t('unsaved', { reason })} {retrying ? t('retrying') : null}{' '}
        {problem.status === 401 ? (
          // Beside this page, so that what is entered here stays in sight.
          <a href="/sign-in?next=/account" target="_blank" className="control font-semibold underline underline-offset-4">
            {t('signInBeside')}
          </a>
        ) : null}
      </span>
    </span>
  );
}

export interface VerdictBarProps {
  readonly judgement: Judgement;
  readonly missing: readonly MissingEntry[];
  /** Absent for what can no longer change. */
  readonly saved?: SavedState;
  readonly children?: React.ReactNode;
}

/** Always at the foot of the bench: the verdict of the whole in words, what is missing, whether it is saved, and Sign. */
export function VerdictBar({ judgement, missing, saved, children }: VerdictBarProps) {
  const t = useMessages('inspections');
  const verdict = verdictSoFar(judgement);
  const complete = judgement.evaluation?.complete ?? false;
  return (
    <footer className="flex items-center gap-x-5 gap-y-1 border-t border-line-strong bg-raised px-3 py-1.5">
      <div role="status" aria-live="polite" className="flex min-w-0 flex-1 flex-wrap items-center gap-x-4 gap-y-1">
        {verdict ? (
          <VerdictMark verdict={verdict} size="large" {...(complete ? {} : { reason: t('soFar') })} />
        ) : (
          <span>{t('noVerdict')}</span>
        )}
        {judgement.faults.length > 0 ? (
          <strong className="text-reject">{t('faults', { count: judgement.faults.length })}</strong>
        ) : null}
        {saved && (missing.length > 0 || judgement.faults.length === 0) ? <Missing missing={missing} /> : null}
      </div>
      {saved ? <Saved saved={saved} /> : null}
      {children}
    </footer>
  );
}

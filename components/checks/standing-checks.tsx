'use client';

import { useMethodWords } from '@/components/personnel/method-words';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { Panel } from '@/components/ui/panel';
import { When } from '@/components/ui/when';
import type { CheckStanding } from '@/services/contracts/checks';
import { CheckState, useWindowWords } from './check-words';

function LastOne({ last }: { last: CheckStanding['last'] }) {
  const t = useMessages('checks');
  if (!last) return <>{t('neverRead')}</>;
  return (
    <>
      {last.value === null ? null : <span className="font-mono font-semibold">{`${last.value} ${last.unit ?? ''} · `}</span>}
      <When at={last.at} /> · {last.doneBy.name}
    </>
  );
}

function Standing({ row, onRecord }: { row: CheckStanding; onRecord: (() => void) | undefined }) {
  const t = useMessages('checks');
  const methodWords = useMethodWords();
  const windowWords = useWindowWords();
  const { scope, title, window, techniques, last, state, method } = row;
  return (
    <li className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-line px-4 py-3 last:border-b-0">
      <div className="min-w-64 flex-1">
        <p className="text-lg font-semibold">
          <span className="font-mono">{scope}</span> · {title}
        </p>
        <p className="text-ink-soft">
          {methodWords(method)}
          {window ? ` · ${windowWords(window)}` : ''}
          {techniques.length > 0 ? ` · ${t('askedBy', { techniques: techniques.join(', ') })}` : ''}
        </p>
      </div>
      <div className="w-96">
        <p className="font-semibold">
          <CheckState state={state} />
        </p>
        <p className="text-sm">
          {last?.result === 'good' ? (
            <>
              {t('validUntil')} <When at={last.validUntil} />
            </>
          ) : null}
        </p>
        <p className="text-sm text-ink-soft">
          <LastOne last={last} />
        </p>
      </div>
      {onRecord ? (
        <Button size="capture" kind="primary" aria-label={t('recordOf', { title, scope })} onClick={onRecord}>
          {t('record')}
        </Button>
      ) : null}
    </li>
  );
}

/** Every check as it stands now: what stops work first. */
export function StandingChecks({
  rows,
  onRecord,
}: {
  rows: readonly CheckStanding[];
  /** Absent for those who only read. */
  onRecord: ((row: CheckStanding) => void) | undefined;
}) {
  const t = useMessages('checks');
  return (
    <Panel title={t('standing')} subtitle={t('standingHint')} flush>
      {rows.length === 0 ? (
        <EmptyState title={t('none')}>{t('noneHint')}</EmptyState>
      ) : (
        <ul>
          {rows.map((row) => (
            <Standing key={`${row.scope} ${row.title}`} row={row} onRecord={onRecord ? () => onRecord(row) : undefined} />
          ))}
        </ul>
      )}
    </Panel>
  );
}

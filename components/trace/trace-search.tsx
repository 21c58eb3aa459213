'use client';

import Link from 'next/link';
import { useState, type ReactNode } from 'react';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { StateWord } from '@/components/ui/state-word';
import type { Lot, PartSummary } from '@/services/contracts/parts';

const most = 50;

interface SearchProps<Row> {
  readonly label: string;
  readonly button: string;
  readonly none: string;
  readonly url: (text: string) => string;
  readonly show: (row: Row) => ReactNode;
}

/** What is typed, and the candidates it resolves to. */
function Search<Row extends { readonly id: string }>({ label, button, none, url, show }: SearchProps<Row>) {
  const t = useMessages('trace');
  const [text, setText] = useState('');
  const [asked, setAsked] = useState('');
  const { answer, problem } = useAnswer<{ items: Row[]; next: string | null }>(asked === '' ? null : url(asked));
  return (
    <Panel>
      <form
        className="flex flex-wrap items-end gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          setAsked(text.trim());
        }}
      >
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{label}</span>
          <input className="field font-mono" value={text} onChange={(event) => setText(event.target.value)} />
        </label>
        <Button kind="primary" type="submit">
          {button}
        </Button>
      </form>
      <div role="status" className="mt-3 flex flex-col gap-2">
        {problem ? <ProblemNotice problem={problem} /> : null}
        {answer?.items.length === 0 ? <p>{none}</p> : null}
        <ul className="flex flex-col gap-2">
          {(answer?.items ?? []).map((one) => (
            <li key={one.id}>{show(one)}</li>
          ))}
        </ul>
        {answer?.next ? <p className="text-ink-soft">{t('first', { count: most })}</p> : null}
      </div>
    </Panel>
  );
}

const link = 'font-mono text-accent underline underline-offset-4';

/** A serial or a lot number resolves to candidates; each leads to its history. */
export function TraceSearch() {
  const t = useMessages('trace');
  const lotWords = useMessages('lots');
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <div className="grid items-start gap-4 lg:grid-cols-2">
        <Search<PartSummary>
          label={t('find')}
          button={t('search')}
          none={t('none')}
          url={(text) => `/api/parts?limit=${most}&serial=${encodeURIComponent(text)}`}
          show={(one) => (
            <>
              <Link href={`/trace/${one.id}`} className={link}>
                {one.serial}
              </Link>{' '}
              {one.partNumber} {one.revision}, {one.customer} <StateWord state={one.held ? 'held' : one.state} />
            </>
          )}
        />
        <Search<Pick<Lot, 'id' | 'kind' | 'number' | 'partCount'>>
          label={t('findLot')}
          button={t('searchLot')}
          none={t('noLot')}
          url={(text) => `/api/lots?limit=${most}&number=${encodeURIComponent(text)}`}
          show={(one) => (
            <>
              {lotWords(`kinds.${one.kind}`)}{' '}
              <Link href={`/lots/${one.id}`} className={link}>
                {one.number}
              </Link>
              , {lotWords('parts')} {one.partCount}
            </>
          )}
        />
      </div>
    </div>
  );
}

'use client';

import Link from 'next/link';
import { useState } from 'react';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { PageHeader } from '@/components/ui/page-header';
import type { PartSummary } from '@/services/contracts/parts';

/** A serial resolves to candidates; each leads to its history. */
export function TraceSearch() {
  const t = useMessages('trace');
  const [text, setText] = useState('');
  const [asked, setAsked] = useState('');
  const { answer } = useAnswer<{ items: PartSummary[] }>(
    asked === '' ? null : `/api/parts?limit=50&serial=${encodeURIComponent(asked)}`,
  );
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <form
        className="flex items-end gap-3"
        onSubmit={(event) => {
          event.preventDefault();
          setAsked(text.trim());
        }}
      >
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('find')}</span>
          <input className="field font-mono" value={text} onChange={(event) => setText(event.target.value)} />
        </label>
        <Button kind="primary" type="submit">
          {t('search')}
        </Button>
      </form>
      {answer?.items.length === 0 ? <p>{t('none')}</p> : null}
      <ul className="flex flex-col gap-2">
        {(answer?.items ?? []).map((one) => (
          <li key={one.id}>
            <Link href={`/trace/${one.id}`} className="font-mono text-accent underline underline-offset-4">
              {one.serial}
            </Link>{' '}
            {one.partNumber} {one.revision}, {one.customer}, {one.state}
          </li>
        ))}
      </ul>
    </div>
  );
}

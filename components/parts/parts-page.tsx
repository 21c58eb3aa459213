'use client';

import { DataGrid } from '@/components/grids/data-grid';
import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { LinkButton } from '@/components/ui/button';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import type { PartSummary } from '@/services/contracts/parts';
import { CsvButton } from './csv-button';
import { hrefOfPart, idOfPart, usePartColumns } from './part-columns';
import { PartsFilters, partsFilterNames } from './parts-filters';

/** A serial that only one part has is one step from its page. */
function OneHit({ serial }: { serial: string }) {
  const t = useMessages('parts');
  const { answer } = useAnswer<{ items: PartSummary[] }>(`/api/parts?limit=2&serial=${encodeURIComponent(serial)}`);
  const [only, other] = answer?.items ?? [];
  if (!only || other) return null;
  return (
    <Notice
      title={t('oneHit')}
      actions={
        <LinkButton kind="primary" href={hrefOfPart(only)}>
          {t('openOne', { serial: only.serial })}
        </LinkButton>
      }
    />
  );
}

/** Find parts: server-paged, with the filters in the address. */
export function PartsPage() {
  const t = useMessages('parts');
  const columns = usePartColumns(true);
  const { filters, set, reset, query, filtered } = useUrlFilters(partsFilterNames);
  const url = query === '' ? '/api/parts' : `/api/parts?${query}`;
  return (
    <div className="flex h-full flex-col gap-4">
      <PageHeader
        title={t('title')}
        subtitle={t('subtitle')}
        actions={<CsvButton label={t('csv')} name="parts.csv" url={url} columns={columns} />}
      />
      <PartsFilters filters={filters} set={set} reset={reset} filtered={filtered} />
      {filters.serial === '' ? null : <OneHit serial={filters.serial} />}
      <DataGrid
        label={t('title')}
        columns={columns}
        source={{ kind: 'keyset', url }}
        rowId={idOfPart}
        hrefOf={hrefOfPart}
        empty={<EmptyState title={t('empty')}>{t('emptyHint')}</EmptyState>}
        height="max(20rem, calc(100dvh - 19rem))"
      />
    </div>
  );
}

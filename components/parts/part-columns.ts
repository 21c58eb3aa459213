'use client';

import { useMemo } from 'react';
import type { GridColumn } from '@/components/grids/grid-columns';
import { useMessages } from '@/components/theme/use-messages';
import type { PartSummary } from '@/services/contracts/parts';

/** The columns in which parts are listed, here and below a lot. */
export function usePartColumns(sortable = false): GridColumn<PartSummary>[] {
  const t = useMessages('parts');
  return useMemo(
    () => [
      { key: 'serial', title: t('serial'), kind: 'serial', width: 150, sort: sortable, value: (row) => row.serial },
      {
        key: 'partNumber',
        title: t('partNumber'),
        kind: 'text',
        width: 170,
        value: (row) => `${row.partNumber} ${row.revision}`,
      },
      {
        key: 'ring',
        title: t('ring'),
        kind: 'ring',
        minWidth: 300,
        value: (row) => ({
          segments: row.ring,
          held: row.held,
          text:
            row.next === null
              ? t('done', { met: row.met, required: row.required })
              : t('next', { met: row.met, required: row.required, next: row.next }),
        }),
      },
      { key: 'state', title: t('state'), kind: 'state', width: 160, value: (row) => (row.held ? 'held' : row.state) },
      { key: 'cluster', title: t('cluster'), kind: 'text', width: 140, value: (row) => row.cluster },
      { key: 'customer', title: t('customer'), kind: 'text', width: 180, value: (row) => row.customer },
    ],
    [t, sortable],
  );
}

export const hrefOfPart = (row: PartSummary) => `/parts/${row.id}`;
export const idOfPart = (row: PartSummary) => row.id;

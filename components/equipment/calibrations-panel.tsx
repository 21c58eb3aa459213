'use client';

import { useMessages } from '@/components/theme/use-messages';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { Panel } from '@/components/ui/panel';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { Calibration } from '@/services/contracts/equipment';

const Day = ({ on }: { on: string }) => (
  <span className="whitespace-nowrap tabular-nums">
    <When at={on} />
  </span>
);

const range = ({ rangeLower, rangeUpper, rangeUnit }: Calibration) =>
  rangeUnit === null ? '–' : `${rangeLower ?? ''} … ${rangeUpper ?? ''} ${rangeUnit}`;

function AsFound({ row: { asFound, bias, rangeUnit } }: { row: Calibration }) {
  const t = useMessages('equipment');
  return (
    <>
      {asFound === 'not-taken' ? (
        t('found.not-taken')
      ) : (
        <StateWord state={asFound === 'good' ? 'valid' : 'failed'} word={t(`found.${asFound}`)} />
      )}
      {bias === null ? null : (
        <span className="block text-sm whitespace-nowrap text-ink-soft">
          {t('bias')} <span className="font-mono">{`${bias} ${rangeUnit ?? ''}`}</span>
        </span>
      )}
    </>
  );
}

function useColumns(): DataColumn<Calibration>[] {
  const t = useMessages('equipment');
  return [
    {
      key: 'function',
      title: t('function'),
      names: true,
      cell: (row) => (
        <>
          {row.function}
          <span className="block text-sm text-ink-soft">{row.current ? t('current') : t('earlier')}</span>
        </>
      ),
    },
    { key: 'range', title: t('range'), cell: (row) => <span className="font-mono whitespace-nowrap">{range(row)}</span> },
    { key: 'found', title: t('asFound'), cell: (row) => <AsFound row={row} /> },
    {
      key: 'left',
      title: t('asLeft'),
      cell: ({ asLeft }) => <StateWord state={asLeft === 'good' ? 'valid' : 'failed'} word={t(`left.${asLeft}`)} />,
    },
    { key: 'on', title: t('calibratedOn'), cell: (row) => <Day on={row.calibratedOn} /> },
    { key: 'due', title: t('due'), cell: (row) => <Day on={row.dueOn} /> },
    { key: 'certificate', title: t('certificate'), cell: (row) => <span className="font-mono">{row.certificate ?? '–'}</span> },
    { key: 'by', title: t('recordedBy'), cell: (row) => row.recordedBy?.name ?? '–' },
  ];
}

/** Every calibration on record, newest first; those that count now say so. */
export function CalibrationsPanel({ calibrations }: { calibrations: readonly Calibration[] }) {
  const t = useMessages('equipment');
  return (
    <Panel title={t('calibrations')} subtitle={t('calibrationsHint')} flush>
      <DataTable
        caption={t('calibrations')}
        rows={calibrations}
        rowKey={({ id }) => id}
        columns={useColumns()}
        empty={<EmptyState title={t('noCalibration')}>{t('noCalibrationHint')}</EmptyState>}
      />
    </Panel>
  );
}

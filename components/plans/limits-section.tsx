'use client';

import { useMessages } from '@/components/theme/use-messages';
import { Panel } from '@/components/ui/panel';
import { unitSymbols } from '@/services/engine/quantity/units';
import { DecisionField } from './decision-field';
import { RowsTable, type RowsColumn } from './rows-table';

const units = unitSymbols.map((symbol) => ({ value: symbol, text: symbol }));

/** Characteristics with their bands and decision rules, attributes, and windows of process values. */
export function LimitsSection() {
  const t = useMessages('plans');
  const number: RowsColumn = { key: 'number', title: t('number'), kind: 'text', width: 'min-w-20' };
  const title: RowsColumn = { key: 'title', title: t('title'), kind: 'text', width: 'min-w-60' };
  const unit: RowsColumn = { key: 'unit', title: t('unit'), kind: 'choice', options: units, width: 'min-w-28' };
  const lower: RowsColumn = { key: 'lower', title: t('lower'), kind: 'decimal', width: 'min-w-24' };
  const upper: RowsColumn = { key: 'upper', title: t('upper'), kind: 'decimal', width: 'min-w-24' };
  const rounding = (['absolute', 'rounded'] as const).map((value) => ({ value, text: t(`rounding.${value}`) }));
  return (
    <div className="flex flex-col gap-4">
      <Panel title={t('characteristics')} subtitle={t('characteristicsHint')}>
        <RowsTable
          path="criteria.characteristics"
          caption={t('characteristics')}
          nameKey="number"
          addLabel={t('addCharacteristic')}
          fresh={{ number: '', unit: 'mm', decision: { rule: 'guarded', form: 'non-binary', g: '1' } }}
          columns={[
            number,
            title,
            unit,
            { key: 'nominal', title: t('nominal'), kind: 'decimal', width: 'min-w-24' },
            lower,
            upper,
            { key: 'uncertaintyMax', title: t('uncertaintyMax'), kind: 'decimal', width: 'min-w-24' },
            { key: 'rounding', title: t('roundingTitle'), kind: 'choice', options: rounding, width: 'min-w-36' },
            {
              key: 'decision',
              title: t('decision'),
              kind: 'choice',
              width: 'min-w-64',
              cell: (row, name) => <DecisionField path={`${row}.decision`} name={name} />,
            },
          ]}
        />
      </Panel>
      <Panel title={t('attributes')}>
        <RowsTable
          path="criteria.attributes"
          caption={t('attributes')}
          nameKey="number"
          addLabel={t('addAttribute')}
          fresh={{ number: '' }}
          columns={[number, title]}
        />
      </Panel>
      <Panel title={t('process')} subtitle={t('processHint')}>
        <RowsTable
          path="criteria.process"
          caption={t('process')}
          nameKey="number"
          addLabel={t('addProcess')}
          fresh={{ number: '', unit: 'min' }}
          columns={[number, title, unit, lower, upper]}
        />
      </Panel>
    </div>
  );
}

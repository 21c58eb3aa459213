'use client';

import { useMessages } from '@/components/theme/use-messages';
import { DataTable, type DataColumn } from '@/components/ui/data-table';
import { Panel } from '@/components/ui/panel';
import type { TechniqueContent } from '@/services/contracts/techniques';

type Parameter = TechniqueContent['parameters'][number];
type Window = TechniqueContent['windows'][number];
type Check = TechniqueContent['checks'][number];

function limitsOf(window: Omit<Window, 'title'> | null): string {
  if (!window) return '–';
  return `${window.lower ?? ''} … ${window.upper ?? ''} ${window.unit}`.trim();
}

function Parameters({ rows }: { rows: readonly Parameter[] }) {
  const t = useMessages('techniques');
  const columns: DataColumn<Parameter>[] = [
    { key: 'name', title: t('parameter'), names: true, cell: ({ name }) => name },
    { key: 'value', title: t('value'), cell: ({ value, unit }) => <span className="font-mono">{`${value} ${unit ?? ''}`}</span> },
    {
      key: 'essential',
      title: t('essential'),
      cell: ({ essential }) =>
        essential ? <strong>{t('essential')}</strong> : <span className="text-ink-soft">{t('notEssential')}</span>,
    },
  ];
  return (
    <Panel title={t('parameters')} subtitle={t('parametersHint')} flush>
      <DataTable
        caption={t('parameters')}
        rows={rows}
        rowKey={({ name }) => name}
        columns={columns}
        empty={<p className="px-4 py-3 text-ink-soft">{t('empty')}</p>}
      />
    </Panel>
  );
}

function Windows({ rows }: { rows: readonly Window[] }) {
  const t = useMessages('techniques');
  const columns: DataColumn<Window>[] = [
    { key: 'title', title: t('window'), names: true, cell: ({ title }) => title },
    {
      key: 'limits',
      title: t('limits'),
      align: 'end',
      cell: (row) => <span className="font-mono whitespace-nowrap">{limitsOf(row)}</span>,
    },
  ];
  return (
    <Panel title={t('windows')} flush>
      <DataTable caption={t('windows')} rows={rows} rowKey={({ title }) => title} columns={columns} />
    </Panel>
  );
}

function Checks({ rows }: { rows: readonly Check[] }) {
  const t = useMessages('techniques');
  const columns: DataColumn<Check>[] = [
    { key: 'scope', title: t('scope'), names: true, cell: ({ scope }) => <span className="font-mono">{scope}</span> },
    { key: 'title', title: t('check'), cell: ({ title }) => title },
    { key: 'kind', title: t('kind'), cell: ({ kind }) => t(`kinds.${kind}`) },
    { key: 'hours', title: t('hours'), align: 'end', cell: ({ validHours }) => validHours },
    {
      key: 'window',
      title: t('limits'),
      align: 'end',
      cell: ({ window }) => <span className="font-mono whitespace-nowrap">{limitsOf(window)}</span>,
    },
  ];
  return (
    <Panel title={t('checks')} flush>
      <DataTable caption={t('checks')} rows={rows} rowKey={({ scope, title }) => `${scope} ${title}`} columns={columns} />
    </Panel>
  );
}

/** What a technique says: parameters, windows, views, checks and indicator. */
export function TechniqueContentView({ content }: { content: TechniqueContent }) {
  const t = useMessages('techniques');
  return (
    <>
      <Parameters rows={content.parameters} />
      {content.windows.length > 0 ? <Windows rows={content.windows} /> : null}
      {content.checks.length > 0 ? <Checks rows={content.checks} /> : null}
      <div className="grid gap-4 md:grid-cols-2">
        <Panel title={t('views')}>{content.views.length === 0 ? t('empty') : content.views.join(', ')}</Panel>
        <Panel title={t('indicator')}>
          <span className="font-mono">{content.indicator ?? t('noIndicator')}</span>
        </Panel>
      </div>
    </>
  );
}

'use client';

import { useUrlFilters } from '@/components/grids/use-url-filters';
import { useMessages } from '@/components/theme/use-messages';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Toolbar } from '@/components/ui/toolbar';
import { SuspectListsTable } from './suspect-lists-table';

/** Suspect lists; those that wait for a decision are shown first. */
export function SuspectsPage() {
  const t = useMessages('suspects');
  const { filters, set } = useUrlFilters(['show'] as const);
  return (
    <>
      <PageHeader title={t('title')} subtitle={t('subtitle')} />
      <Toolbar label={t('show')}>
        <label className="flex flex-col gap-1">
          <span className="font-semibold">{t('show')}</span>
          <select className="field" value={filters.show} onChange={(event) => set({ show: event.target.value })}>
            <option value="">{t('onlyOpen')}</option>
            <option value="all">{t('all')}</option>
          </select>
        </label>
      </Toolbar>
      <Panel flush>
        <SuspectListsTable query={filters.show === 'all' ? '' : 'open=true'} />
      </Panel>
    </>
  );
}

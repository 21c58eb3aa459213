'use client';

import { useState } from 'react';
import { HoldDialog } from '@/components/holds/hold-dialog';
import { sendJson } from '@/components/forms/send-json';
import { DataGrid } from '@/components/grids/data-grid';
import { hrefOfPart, idOfPart, usePartColumns } from '@/components/parts/part-columns';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { DefinitionList } from '@/components/ui/definition-list';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { SumRing } from '@/components/ui/ring';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { LotStory } from '@/services/contracts/parts';
import { LotTree } from './lot-tree';
import { SerialsForm } from './serials-form';
import { SplitDialog } from './split-dialog';

interface Props {
  readonly id: string;
  readonly mayEnter: boolean;
  readonly mayHold: boolean;
}

function Facts({ lot }: { lot: LotStory }) {
  const t = useMessages('lots');
  return (
    <Panel title={t('facts')}>
      <DefinitionList
        items={[
          { term: t('quantity'), value: lot.quantity },
          { term: t('parts'), value: lot.partCount },
          { term: t('created'), value: <When at={lot.createdAt} /> },
          ...Object.entries(lot.attributes).map(([term, value]) => ({ key: term, term, value })),
        ]}
      />
    </Panel>
  );
}

/** One lot: what it came from, what it went into, and every part downstream. */
export function LotPage({ id, mayEnter, mayHold }: Props) {
  const t = useMessages('lots');
  const { answer: lot, problem, renew } = useAnswer<LotStory>(`/api/lots/${id}`);
  const columns = usePartColumns();
  const [changes, setChanges] = useState(0);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!lot) return <Skeleton lines={8} />;
  const changed = () => {
    setChanges(changes + 1);
    // Put in place only when it is there: without an answer the page, and what it just told, would vanish meanwhile.
    sendJson<LotStory>(`/api/lots/${id}`, { method: 'GET' }).then(renew, () => renew());
  };
  const name = `${t(`kinds.${lot.kind}`)} ${lot.number}`;
  return (
    <div className="flex flex-col gap-4">
      <PageHeader
        title={t(`kinds.${lot.kind}`)}
        code={lot.number}
        subtitle={t('progress')}
        ring={<SumRing counts={lot.progress} held={lot.held} pixels={64} />}
        actions={
          <>
            {mayEnter && lot.quantity > 1 ? <SplitDialog lot={lot} onSplit={changed} /> : null}
            {mayHold ? <HoldDialog target={{ kind: 'lot', id, name }} onPlaced={changed} /> : null}
          </>
        }
      />
      {lot.holds.map((hold) => (
        <Notice key={hold.id} kind="held" title={`${hold.number}, ${hold.target}`}>
          {hold.reason} (<When at={hold.placedAt} />)
        </Notice>
      ))}
      <div className="grid gap-4 lg:grid-cols-[minmax(0,3fr)_minmax(0,2fr)]">
        <Panel title={t('walk')}>
          <LotTree lot={lot} />
        </Panel>
        <Facts lot={lot} />
      </div>
      <h2 className="text-lg font-semibold">{t('parts')}</h2>
      <DataGrid
        key={changes}
        label={t('parts')}
        columns={columns}
        source={{ kind: 'keyset', url: `/api/lots/${id}/parts` }}
        rowId={idOfPart}
        hrefOf={hrefOfPart}
        height="24rem"
        empty={<EmptyState title={t('noDownstream')} />}
      />
      {mayEnter && lot.kind === 'cluster' ? (
        <Panel title={t('serials')}>
          <SerialsForm cluster={lot.id} onGiven={changed} />
        </Panel>
      ) : null}
    </div>
  );
}

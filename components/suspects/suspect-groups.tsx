'use client';

import { useState } from 'react';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { Dialog } from '@/components/ui/dialog';
import { Panel } from '@/components/ui/panel';
import { StateWord } from '@/components/ui/state-word';
import { When } from '@/components/ui/when';
import type { SuspectGroup, SuspectList } from '@/services/contracts/suspects';
import { CloseGroupForm } from './close-group-form';
import { DecisionState } from './suspect-lists-table';

function Group({ group, onDecide }: { group: SuspectGroup; onDecide: (() => void) | undefined }) {
  const t = useMessages('suspects');
  const { drawing, operation, title, gone, parts, inspections, state, closing } = group;
  const where = gone ? t('groupGone') : t('groupHere');
  return (
    <li className="flex flex-wrap items-center gap-x-6 gap-y-2 border-b border-line px-4 py-3 last:border-b-0">
      <div className="min-w-64 flex-1">
        <p className="font-semibold">
          <span className="font-mono">{drawing}</span> · {operation} {title}
        </p>
        <p className="text-ink-soft">{t('groupCount', { parts, inspections })}</p>
      </div>
      <StateWord state={gone ? 'shipped' : 'held'} word={where} tone={gone ? 'reject' : 'held'} />
      {closing ? (
        <div className="min-w-64 flex-1">
          <p className="font-semibold">{t(`closedAs.${closing.how}`)}</p>
          <p>{closing.reason}</p>
          <p className="text-sm text-ink-soft">
            {closing.by.name}, <When at={closing.at} />
          </p>
        </div>
      ) : (
        <DecisionState state={state} />
      )}
      {onDecide ? (
        <Button kind="primary" aria-label={t('decideOn', { drawing, operation, where })} onClick={onDecide}>
          {t('decide')}
        </Button>
      ) : null}
    </li>
  );
}

/** The groups of a list, each with its decision or the way to it. */
export function SuspectGroups({
  list,
  mayClose,
  onChanged,
}: {
  list: SuspectList;
  mayClose: boolean;
  onChanged: (list: SuspectList) => void;
}) {
  const t = useMessages('suspects');
  const [deciding, setDeciding] = useState<SuspectGroup>();
  const name = deciding ? `${deciding.drawing}, ${deciding.operation} ${deciding.title}` : '';
  return (
    <Panel title={t('groups')} subtitle={t('groupsHint')} flush>
      <ul>
        {list.groups.map((group) => (
          <Group
            key={group.id}
            group={group}
            onDecide={mayClose && group.state === 'open' ? () => setDeciding(group) : undefined}
          />
        ))}
      </ul>
      <Dialog open={deciding !== undefined} onClose={() => setDeciding(undefined)} title={name}>
        {deciding ? (
          <CloseGroupForm
            listId={list.id}
            group={deciding}
            onClosed={(changed) => {
              setDeciding(undefined);
              onChanged(changed);
            }}
          />
        ) : null}
      </Dialog>
    </Panel>
  );
}

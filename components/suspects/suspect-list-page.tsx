'use client';

import Link from 'next/link';
import { useMethodWords } from '@/components/personnel/method-words';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { DefinitionList } from '@/components/ui/definition-list';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Panel } from '@/components/ui/panel';
import { Skeleton } from '@/components/ui/skeleton';
import { When } from '@/components/ui/when';
import type { SuspectList } from '@/services/contracts/suspects';
import { SuspectGroups } from './suspect-groups';
import { SuspectInspections } from './suspect-inspections';
import { DecisionState } from './suspect-lists-table';

function Facts({ list }: { list: SuspectList }) {
  const t = useMessages('suspects');
  const methodWords = useMethodWords();
  const { cause, named, equipment, since, until, openedBy, state, inspections, held, recall, method } = list;
  const link = 'font-mono text-accent underline underline-offset-4';
  return (
    <Panel>
      <DefinitionList
        columns={2}
        items={[
          { term: t('state'), value: <DecisionState state={state} /> },
          {
            term: t('named'),
            value:
              equipment === null ? (
                named
              ) : (
                <Link className={link} href={`/equipment/${equipment}`}>
                  {named}
                </Link>
              ),
          },
          { term: t('cause'), value: `${t(`causes.${cause}`)} · ${methodWords(method)}` },
          {
            term: t('since'),
            value: since === null ? t('neverGood') : <When at={since} to={cause === 'calibration' ? 'day' : 'minute'} />,
          },
          { term: t('until'), value: <When at={until} /> },
          { term: t('opened'), value: openedBy.name },
          { term: t('inspections'), value: inspections },
          { term: `${t('held')} / ${t('recall')}`, value: `${String(held)} / ${String(recall)}` },
        ]}
      />
    </Panel>
  );
}

/** One suspect list: what failed, since when, what leaned on it, and the decision on each group. */
export function SuspectListPage({ id, mayClose }: { id: string; mayClose: boolean }) {
  const t = useMessages('suspects');
  const { answer: list, problem, renew } = useAnswer<SuspectList>(`/api/suspects/${id}`);
  if (problem) return <ProblemNotice problem={problem} />;
  if (!list) return <Skeleton lines={8} />;
  const turn = String(list.groups.filter(({ state }) => state === 'closed').length);
  return (
    <div className="flex flex-col gap-4">
      <PageHeader title={t('list')} code={list.number} subtitle={list.reason} />
      {list.recall > 0 ? (
        <Notice kind="refusal" title={t('recallTitle', { count: list.recall })}>
          {t('recallHint')}
        </Notice>
      ) : null}
      <Facts list={list} />
      <SuspectGroups list={list} mayClose={mayClose} onChanged={(changed) => void renew(changed)} />
      <SuspectInspections listId={id} turn={turn} />
    </div>
  );
}

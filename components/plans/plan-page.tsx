'use client';

import { sendJson } from '@/components/forms/send-json';
import { useAnswer } from '@/components/theme/use-answer';
import { useMessages } from '@/components/theme/use-messages';
import { Button } from '@/components/ui/button';
import { DataTable } from '@/components/ui/data-table';
import { EmptyState } from '@/components/ui/empty-state';
import { Notice, ProblemNotice } from '@/components/ui/notice';
import { PageHeader } from '@/components/ui/page-header';
import { Skeleton } from '@/components/ui/skeleton';
import { StateWord } from '@/components/ui/state-word';
import { Tabs } from '@/components/ui/tabs';
import { When } from '@/components/ui/when';
import { contentOf, type Plan, type PlanContent } from '@/services/contracts/plan-content';
import { LimitsSection } from './limits-section';
import { planDifferences } from './plan-differences';
import { PlanEditingProvider } from './plan-editing';
import { PlanFaults } from './plan-faults-list';
import { MoveButton } from './plan-moves';
import { RouteSection } from './route-section';
import { RulesSection } from './rules-section';
import { StartIssue } from './start-issue';
import { TryOut } from './try-out';
import { usePlanDraft } from './use-plan-draft';
import { ViewsSection } from './views-section';

export interface PlanPageProps {
  readonly id: string;
  /** Id of the person: nobody checks or approves their own. */
  readonly me: string;
  readonly mayPrepare: boolean;
  readonly mayApprove: boolean;
}

function Signatures({ plan }: { readonly plan: Plan }) {
  const t = useMessages('plans');
  const moments = { prepared: plan.prepared, checked: plan.checked, approved: plan.approved, ended: plan.ended };
  return (
    <p className="mb-4 flex flex-wrap gap-x-6 gap-y-1">
      {(Object.keys(moments) as (keyof typeof moments)[]).map((kind) => {
        const moment = moments[kind];
        return moment === null ? null : (
          <span key={kind}>
            <span className="text-ink-soft">{t(`signatures.${kind}`)}</span> {moment.name}, <When at={moment.at} />
          </span>
        );
      })}
    </p>
  );
}

function Differences({ plan, content }: { readonly plan: Plan; readonly content: PlanContent }) {
  const t = useMessages('plans');
  const others = useAnswer<{ items: Plan[] }>(`/api/drawings/${encodeURIComponent(plan.drawing)}/plans`);
  const before = others.answer?.items.find((one) => one.revision === plan.revision && one.issue === plan.issue - 1);
  if (others.problem) return <ProblemNotice problem={others.problem} />;
  if (!others.answer) return <Skeleton lines={4} />;
  if (!before) return <EmptyState title={t('firstIssue')} />;
  return (
    <DataTable
      caption={t('differences')}
      rows={planDifferences(contentOf(before), content)}
      rowKey={(row) => row.path}
      empty={<EmptyState title={t('noDifferences', { issue: before.issue })} />}
      columns={[
        { key: 'path', title: t('entry'), names: true, cell: (row) => <span className="font-mono">{row.path}</span> },
        {
          key: 'before',
          title: t('issueNumber', { issue: before.issue }),
          cell: (row) => <span className="font-mono">{row.before ?? '–'}</span>,
        },
        {
          key: 'after',
          title: t('issueNumber', { issue: plan.issue }),
          cell: (row) => <span className="font-mono">{row.after ?? '–'}</span>,
        },
      ]}
    />
  );
}

function Issue({ plan, me, mayPrepare, mayApprove, onPlan }: PlanPageProps & { plan: Plan; onPlan: (plan: Plan) => void }) {
  const t = useMessages('plans');
  const draft = usePlanDraft(plan, onPlan);
  const editable = plan.state === 'draft' && mayPrepare;
  const own = plan.prepared?.id === me;
  const conflict = draft.problem?.status === 412;
  const readTheirs = () => sendJson<Plan>(`/api/plans/${plan.id}`, { method: 'GET' }).then(draft.takeTheirs);
  return (
    <div className="flex flex-col">
      <PageHeader
        title={plan.title}
        code={`${plan.drawing} ${plan.revision}`}
        subtitle={t('issueNumber', { issue: plan.issue })}
        actions={
          <>
            <StateWord state={plan.state} />
            {editable ? (
              <>
                <span data-saved={draft.changed ? 'unsaved' : 'saved'} className="text-ink-soft">
                  {t(draft.changed ? 'unsaved' : 'saved')}
                </span>
                <Button busy={draft.busy} disabled={!draft.changed} kind="primary" onClick={() => void draft.save()}>
                  {t('save')}
                </Button>
              </>
            ) : null}
            {plan.state === 'draft' && mayApprove && !own && !draft.changed ? (
              <MoveButton plan={plan} move="check" onDone={onPlan} />
            ) : null}
            {plan.state === 'checked' && mayApprove && !own ? <MoveButton plan={plan} move="approval" onDone={onPlan} /> : null}
            {['checked', 'approved'].includes(plan.state) && mayApprove ? (
              <MoveButton plan={plan} move="withdrawal" onDone={onPlan} />
            ) : null}
            {mayPrepare && plan.state !== 'draft' ? <StartIssue from={plan} /> : null}
          </>
        }
      />
      <Signatures plan={plan} />
      {plan.endedReason === null ? null : <Notice kind="refusal" title={plan.endedReason} />}
      {plan.state === 'draft' && own ? <Notice title={t('secondPerson')} /> : null}
      {plan.state === 'approved' ? <Notice kind="done" title={t('neverChanges')} /> : null}
      {draft.problem ? (
        <ProblemNotice
          problem={draft.problem}
          actions={conflict ? <Button onClick={() => void readTheirs()}>{t('takeTheirs')}</Button> : undefined}
        />
      ) : null}
      {plan.state === 'draft' ? <PlanFaults faults={draft.faults} /> : null}
      <PlanEditingProvider content={draft.content} faults={draft.faults} readOnly={!editable} onChange={draft.change}>
        <Tabs
          label={t('parts')}
          tabs={[
            { key: 'limits', title: t('limits'), content: <LimitsSection /> },
            { key: 'views', title: t('viewsAndZones'), content: <ViewsSection /> },
            { key: 'rules', title: t('ruleSets'), content: <RulesSection /> },
            { key: 'route', title: t('route'), content: <RouteSection /> },
            { key: 'try', title: t('tryOut'), content: <TryOut content={draft.content} /> },
            {
              key: 'differences',
              title: t('differences'),
              content: <Differences plan={plan} content={draft.content} />,
            },
          ]}
        />
      </PlanEditingProvider>
    </div>
  );
}

/** One plan issue: read as it was approved, or edited while it is a draft. */
export function PlanPage(props: PlanPageProps) {
  const { answer: plan, problem, renew } = useAnswer<Plan>(`/api/plans/${props.id}`);
  if (problem && !plan) return <ProblemNotice problem={problem} />;
  if (!plan) return <Skeleton lines={10} />;
  return <Issue key={plan.id} {...props} plan={plan} onPlan={(next) => void renew(next)} />;
}

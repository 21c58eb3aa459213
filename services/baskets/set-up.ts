import { planById, requirementsOfPlan, type RequirementRow } from '@/db/repositories/plans';
import { approvedPlanOf } from '@/db/repositories/scans';
import type { Basket } from '@/db/repositories/baskets';
import { runById } from '@/db/repositories/runs';
import type { Reading } from '@/db/work';
import type { BasketAnswer } from '@/services/contracts/baskets';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import { judgeDraft } from '@/services/contracts/live-judgement';
import { indicatorWasSeen, neededActs } from '@/services/contracts/needed-acts';
import { planRequirement, type Plan, type PlanRequirement } from '@/services/contracts/plan-content';
import { valuesUnderPlan, windowsOfRequirement, type ProcessWindow } from '@/services/contracts/plan-windows';
import { askEngine } from '@/services/inspections/ask-engine';
import { isVoid } from '@/services/inspections/signing-reasons';
import { cleanContent, judgingKind } from './clean-content';

export interface Operation {
  readonly drawingId: string;
  readonly partTitle: string;
  readonly plan: Plan;
  readonly row: RequirementRow;
  readonly asked: PlanRequirement;
  readonly windows: readonly ProcessWindow[];
}

/** The operations of a part number by its newest approved plan issue, in route order. */
export async function operationsOf(reading: Reading, partNumber: string): Promise<Operation[]> {
  const found = await approvedPlanOf(reading, partNumber);
  const plan = found && (await planById(reading, found.planId));
  if (!plan) return [];
  const rows = await requirementsOfPlan(reading, found.planId);
  return rows.map((row) => {
    const asked = planRequirement.parse(row.content);
    const windows = windowsOfRequirement(plan.criteria, asked.process);
    return { drawingId: found.drawingId, partTitle: found.title, plan, row, asked, windows };
  });
}

/** One operation by its key; undefined when the part number has no approved plan or the plan no such row. */
export async function operationOf(reading: Reading, partNumber: string, key: string): Promise<Operation | undefined> {
  return (await operationsOf(reading, partNumber)).find(({ row }) => row.key === key);
}

/** The process values that count for a plan: those of the run the basket leans on, or its own. */
export async function processOf(
  reading: Reading,
  basket: Pick<Basket, 'process' | 'runId'>,
  windows: readonly ProcessWindow[],
): Promise<InspectionContent['process']> {
  const run = basket.runId === null ? undefined : await runById(reading, basket.runId);
  return run ? valuesUnderPlan(run.windows, run.process, windows) : basket.process;
}

/** Judges the set-up as a clean part would be: a void process value, a missing act, a lamp not named. */
export function judgeSetUp(
  operation: Operation,
  basket: Pick<Basket, 'acts' | 'evaluatorId' | 'openedAt'>,
  process: InspectionContent['process'],
): BasketAnswer['setUp'] {
  const { asked, plan, windows } = operation;
  const content = cleanContent(asked, { process, acts: basket.acts, evaluatorId: basket.evaluatorId }, basket.openedAt);
  const judgement = judgeDraft({ plan, requirement: asked, content, uncertainties: [], gaugeKinds: [] }, askEngine);
  const judging = judgingKind(asked.method);
  const acts = neededActs(asked.method, false).flatMap(({ kind, equipment }) => {
    const given = basket.acts.find((act) => act.kind === kind);
    const named = equipment && (given?.equipment.length ?? 0) === 0;
    return [
      ...(kind !== judging && !(given?.person && given.at)
        ? [{ path: `acts.${kind}`, message: 'who did it and when is needed' }]
        : []),
      ...(named ? [{ path: `acts.${kind}.equipment`, message: 'the equipment used is needed' }] : []),
    ];
  });
  const unread = windows.filter(({ number }) => !process.some((one) => one.number === number && one.value.trim() !== ''));
  const unseen = asked.indicator && !indicatorWasSeen(content.acts, asked.indicator.required);
  return {
    void: isVoid(judgement.evaluation),
    judged: (judgement.evaluation?.process ?? []).map(({ number, verdict, sentence }) => ({
      number,
      verdict,
      text: sentence.text,
    })),
    faults: [
      ...judgement.faults,
      ...acts,
      ...unread.map(({ number, title }) => ({ path: `process.${number}`, message: `${title} is missing` })),
      ...(unseen
        ? [
            {
              path: 'acts.indicatorSeen',
              message: `the indicator ${unseen ? (asked.indicator?.required ?? '') : ''} must be placed and seen`,
            },
          ]
        : []),
    ],
  };
}

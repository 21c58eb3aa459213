import { blockSteps } from '@/services/contracts/block-check';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import type { Judgement } from '@/services/contracts/live-judgement';
import { indicatorWasSeen } from '@/services/contracts/needed-acts';

type Act = InspectionContent['acts'][number];

/** Something the person has still to enter before signing; `field` is the id of the element where it is entered. */
export interface MissingEntry {
  readonly kind:
    'reading' | 'attribute' | 'process' | 'method' | 'act' | 'equipment' | 'step' | 'file' | 'examined' | 'indicator';
  readonly name: string;
  readonly act?: Act['kind'];
  readonly field: string;
}

type Source = Pick<InspectionAnswer, 'requirement' | 'neededActs' | 'evidence'> & {
  readonly content: InspectionContent;
  readonly judgement: Judgement;
};

function missingValues({ judgement, content }: Source): MissingEntry[] {
  const named = (judgement.evaluation?.missing ?? []).filter(({ kind }) => kind !== 'method');
  // A row with a fault counts as missing to the engine; its own field already says what is wrong.
  const faulty = judgement.faults.flatMap(({ path }) => {
    const [list, row = ''] = path.split('.');
    if (list === 'readings') return [`reading-${content.readings[Number(row)]?.characteristic ?? ''}`];
    return list === 'process' ? [`process-${content.process[Number(row)]?.number ?? ''}`] : [];
  });
  return named
    .map(({ kind, number }): MissingEntry => ({ kind, name: number, field: `${kind}-${number}` }))
    .filter(({ field }) => !faulty.includes(field));
}

function missingActs({ neededActs, content, requirement }: Source): MissingEntry[] {
  return neededActs.flatMap(({ kind: text, equipment }): MissingEntry[] => {
    const kind = text as Act['kind'];
    const act = content.acts.find((one) => one.kind === kind);
    const steps = blockSteps(requirement.blockCheck ?? { unit: '', steps: [] }, content.acts)
      .filter(({ when, read }) => when === kind && read === null)
      .map(({ nominal }): MissingEntry => ({ kind: 'step', name: nominal, act: kind, field: `act-${kind}-${nominal}` }));
    if (steps.length > 0) return steps;
    if (!act) return [{ kind: 'act', name: kind, act: kind, field: `act-${kind}` }];
    return equipment && act.equipment.length === 0
      ? [{ kind: 'equipment', name: kind, act: kind, field: `act-${kind}-equipment` }]
      : [];
  });
}

/** Everything still to be entered, in the order of the page. A void inspection (a process value out of its window) needs only its acts. */
export function missingEntries(source: Source): MissingEntry[] {
  const { requirement, content, evidence, judgement } = source;
  if (judgement.evaluation?.process.some(({ verdict }) => verdict === 'reject')) return missingActs(source);
  const files = requirement.evidence
    .filter(({ role, minimum }) => evidence.filter((file) => file.role === role).length < minimum)
    .map(({ role }): MissingEntry => ({ kind: 'file', name: role, field: 'attach' }));
  const indicator = requirement.indicator?.required;
  return [
    ...files,
    ...missingValues(source),
    ...missingActs(source),
    ...(indicator !== undefined && !indicatorWasSeen(content.acts, indicator)
      ? [{ kind: 'indicator' as const, name: indicator, field: 'act-exposed-indicatorSeen' }]
      : []),
    ...(content.examined || requirement.indicationRules.length === 0
      ? []
      : [{ kind: 'examined' as const, name: '', field: 'examined' }]),
  ];
}

import type { LinkedEvidence } from '@/db/repositories/evidence';
import type { Actor } from '@/services/contracts/actor';
import { blockSteps } from '@/services/contracts/block-check';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { Judgement } from '@/services/contracts/live-judgement';
import { indicatorWasSeen, judgingAct, neededActs } from '@/services/contracts/needed-acts';
import type { FieldError } from '@/services/http/problem';
import type { ActOnRecord } from './acts-on-record';
import type { InspectionCase } from './load-case';

export interface SigningState {
  readonly inspection: InspectionCase;
  readonly judgement: Judgement;
  readonly acts: readonly ActOnRecord[];
  readonly evidence: readonly LinkedEvidence[];
  readonly signer: Pick<Actor, 'id' | 'name'>;
}

/** A process value outside its window voids the inspection: it may be signed as void although things are missing. */
export function isVoid(evaluation: EvaluationAnswer | null): boolean {
  return evaluation?.process.some(({ verdict }) => verdict === 'reject') ?? false;
}

function actReasons({ inspection, acts, signer }: SigningState): FieldError[] {
  const { asked, row } = inspection;
  const content = acts.map(({ act }) => act);
  const needed = neededActs(row.method, asked.blockCheck !== undefined).flatMap(({ kind, equipment }): FieldError[] => {
    const place = content.findIndex((act) => act.kind === kind);
    if (place < 0)
      return [
        { path: `acts.${kind}`, message: `${kind}: who did it, when${equipment ? ' and with which equipment' : ''} is needed` },
      ];
    return equipment && content[place]?.equipment.length === 0
      ? [{ path: `acts.${String(place)}.equipment`, message: 'the equipment used is needed' }]
      : [];
  });
  const judging = judgingAct(content);
  const signs =
    judging?.person && judging.person !== signer.id
      ? [
          {
            path: `acts.${String(content.indexOf(judging))}.person`,
            message: `the person who ${judging.kind} signs; you are ${signer.name}`,
          },
        ]
      : [];
  return [...needed, ...acts.flatMap(({ faults }) => faults), ...signs];
}

function blockReasons({ inspection: { asked }, acts }: SigningState): FieldError[] {
  if (!asked.blockCheck) return [];
  const { unit, steps } = asked.blockCheck;
  const content = acts.map(({ act }) => act);
  const tolerance = new Map(steps.map((step) => [step.nominal, step.tolerance]));
  const readings = blockSteps(asked.blockCheck, content).flatMap(({ when, nominal, read, within }): FieldError[] => {
    if (within === true) return [];
    const path = `acts.${when}.values.${nominal}`;
    if (read === null) return [{ path, message: `step ${nominal} ${unit} has no reading` }];
    if (within === null) return [{ path, message: `step ${nominal} ${unit}: ${read} is not a decimal` }];
    return [
      { path, message: `step ${nominal} ${unit} read ${read} ${unit}, more than ${tolerance.get(nominal) ?? ''} ${unit} away` },
    ];
  });
  const time = (kind: string) => acts.find(({ act }) => act.kind === kind)?.at ?? null;
  const [before, measured, after] = [time('block-check-before'), time('measured'), time('block-check-after')];
  return [
    ...readings,
    ...(before !== null && measured !== null && before > measured
      ? [{ path: 'acts.block-check-before.at', message: 'lies after the measurement' }]
      : []),
    ...(after !== null && measured !== null && after < measured
      ? [{ path: 'acts.block-check-after.at', message: 'lies before the measurement' }]
      : []),
  ];
}

function evidenceReasons({ inspection: { asked }, evidence }: SigningState): FieldError[] {
  return asked.evidence.flatMap(({ role, minimum }) => {
    const have = evidence.filter((file) => file.role === role).length;
    return have >= minimum
      ? []
      : [{ path: `evidence.${role}`, message: `${String(minimum)} ${role} needed, ${String(have)} attached` }];
  });
}

// The projection keeps ten digits after the point; more are noise of a machine's output, and would be lost without a word.
const mostDecimals = 10;

function digitReasons({ inspection: { draft } }: SigningState): FieldError[] {
  return draft.content.readings.flatMap(({ value }, place) =>
    (value.split('.')[1] ?? '').length > mostDecimals
      ? [{ path: `readings.${String(place)}.value`, message: `has more than ${String(mostDecimals)} digits after the point` }]
      : [],
  );
}

const named = { reading: 'a reading of', attribute: 'a result for', process: 'the process value', method: 'the method' } as const;

function verdictReasons(evaluation: EvaluationAnswer): FieldError[] {
  const missing = evaluation.missing.map(({ kind, number }) => ({
    path: `missing.${kind}.${number}`,
    message: `${named[kind]} ${number} is missing`,
  }));
  if (missing.length > 0 || evaluation.verdict !== 'not-evaluable') return missing;
  const rows = [
    ...evaluation.readings.map(({ characteristic, verdict, sentence }) => ({
      path: `readings.${characteristic}`,
      verdict,
      sentence,
    })),
    ...evaluation.attributes.map(({ number, verdict, sentence }) => ({ path: `attributes.${number}`, verdict, sentence })),
    ...evaluation.rules.map(({ rule, zone, verdict, sentence }) => ({ path: `rules.${rule}.${zone}`, verdict, sentence })),
  ].filter(({ verdict }) => verdict === 'not-evaluable');
  if (rows.length === 0) return [{ path: 'evaluation', message: 'nothing was judged' }];
  return rows.map(({ path, sentence }) => ({ path, message: `cannot be judged: ${sentence.text}` }));
}

/** Every reason why an inspection may not be signed, all at once; empty when it may. */
export function signingReasons(state: SigningState): FieldError[] {
  const { inspection, judgement } = state;
  const { asked, draft, technique, row } = inspection;
  const reasons = [...actReasons(state), ...judgement.faults, ...digitReasons(state)];
  if (row.technique !== null && technique === null)
    reasons.push({ path: 'technique', message: `technique ${row.technique} has no approved issue` });
  if (inspection.plan.state === 'withdrawn-for-error')
    reasons.push({
      path: 'plan',
      message: `plan issue ${String(inspection.plan.issue)} was withdrawn for error; the part needs a valid issue`,
    });
  if (!judgement.evaluation) return [...reasons, { path: 'evaluation', message: 'the criteria cannot be judged' }];
  if (isVoid(judgement.evaluation)) return reasons;
  const examined = draft.content.examined || asked.indicationRules.length === 0;
  return [
    ...reasons,
    ...(examined ? [] : [{ path: 'examined', message: 'say that every view this operation asks for was examined' }]),
    ...(asked.indicator && !indicatorWasSeen(draft.content.acts, asked.indicator.required)
      ? [{ path: 'acts.indicatorSeen', message: `the indicator ${asked.indicator.required} must be placed and seen` }]
      : []),
    ...blockReasons(state),
    ...evidenceReasons(state),
    ...verdictReasons(judgement.evaluation),
  ];
}

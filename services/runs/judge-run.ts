import type { InspectionContent } from '@/services/contracts/inspection-content';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import { judgeInput } from '@/services/contracts/live-judgement';
import { asCriteria, type ProcessWindow } from '@/services/contracts/plan-windows';
import { Problem } from '@/services/http/problem';
import { askEngine } from '@/services/inspections/ask-engine';

type Process = InspectionContent['process'];

export interface JudgedRun {
  readonly evaluation: EvaluationAnswer;
  readonly standing: 'incomplete' | 'good' | 'void';
}

/**
 * Judges the process values of a run by its windows with the engine: one outside makes the run void, one missing
 * leaves it incomplete. Problem invalid-input names the field of a value that is no decimal or of another unit.
 */
export function judgeRun(windows: readonly ProcessWindow[], process: Process): JudgedRun {
  const given = process.map((value, place) => ({ value, place })).filter(({ value }) => value.value.trim() !== '');
  const { evaluation, faults } = judgeInput(
    {
      criteria: { process: asCriteria(windows) },
      observations: {
        methods: [],
        readings: [],
        attributes: [],
        process: given.map(({ value }) => ({ number: value.number, value: value.value, unit: value.unit })),
        indications: [],
      },
      places: { readings: [], attributes: [], process: given.map(({ place }) => place), indications: [] },
    },
    askEngine,
  );
  if (faults.length > 0 || !evaluation)
    throw new Problem('invalid-input', faults.map(({ path, message }) => `${path}: ${message}`).join('; '), faults);
  if (evaluation.process.some(({ verdict }) => verdict === 'reject')) return { evaluation, standing: 'void' };
  return { evaluation, standing: evaluation.missing.length > 0 ? 'incomplete' : 'good' };
}

/** What was outside, in words: goes into the reason of what the run voids. */
export function voidReason(number: string, { evaluation }: JudgedRun): string {
  const outside = evaluation.process.filter(({ verdict }) => verdict === 'reject').map(({ sentence }) => sentence.text);
  return `void: run ${number}: ${outside.join(' ')}`.slice(0, 400);
}

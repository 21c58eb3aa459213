import type { InspectionContent } from './inspection-content';

export type ActKind = InspectionContent['acts'][number]['kind'];

/** An act that must be on record before a requirement of a method is signed. */
export interface NeededAct {
  readonly kind: ActKind;
  /** At least one piece of equipment must be named with it. */
  readonly equipment: boolean;
}

const byMethod: Readonly<Record<string, readonly NeededAct[]>> = {
  'ultrasonic-thickness': [{ kind: 'measured', equipment: true }],
  dimensional: [{ kind: 'measured', equipment: true }],
  airflow: [{ kind: 'measured', equipment: true }],
  mass: [{ kind: 'measured', equipment: true }],
  // Exposing and reading are two acts, often by two people; the one who reads signs.
  radiography: [
    { kind: 'exposed', equipment: true },
    { kind: 'evaluated', equipment: false },
  ],
  penetrant: [
    { kind: 'processed', equipment: false },
    { kind: 'evaluated', equipment: true },
  ],
};

/** The acts a method asks for, in the order they happen; `blockCheck` adds the step block before and after. */
export function neededActs(method: string, blockCheck: boolean): NeededAct[] {
  const acts = byMethod[method] ?? [{ kind: 'evaluated', equipment: false }];
  if (!blockCheck) return [...acts];
  return [{ kind: 'block-check-before', equipment: false }, ...acts, { kind: 'block-check-after', equipment: false }];
}

/** The act whose person judged and therefore signs: the evaluation, or else the measurement. */
export function judgingAct(acts: InspectionContent['acts']): InspectionContent['acts'][number] | undefined {
  return acts.find(({ kind }) => kind === 'evaluated') ?? acts.find(({ kind }) => kind === 'measured');
}

/** Was the image quality indicator named as seen? `values.indicatorSeen` holds `yes`, `true` or the designation seen. */
export function indicatorWasSeen(acts: InspectionContent['acts'], required: string): boolean {
  return acts.some(({ values }) => {
    const seen = (values.indicatorSeen ?? '').trim().toLowerCase();
    return seen === 'yes' || seen === 'true' || seen === required.trim().toLowerCase();
  });
}

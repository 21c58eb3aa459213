import { inspectionContent, type InspectionContent } from '@/services/contracts/inspection-content';
import { neededActs, type ActKind } from '@/services/contracts/needed-acts';
import type { PlanRequirement } from '@/services/contracts/plan-content';

type Acts = InspectionContent['acts'];
type Process = InspectionContent['process'];

/** The act in which the part is judged: its person signs, its time is the scan. */
export function judgingKind(method: string): ActKind {
  return neededActs(method, false).some(({ kind }) => kind === 'measured') ? 'measured' : 'evaluated';
}

/** Why an operation cannot be done by the basket: what each part needs beyond the eye. Null when it can. */
export function basketRefusal(asked: PlanRequirement): string | null {
  if (asked.characteristics.length > 0) return 'asks for readings of each part; open its inspections one by one';
  if (asked.blockCheck) return 'asks for step-block readings; open its inspections one by one';
  return asked.evidence.length > 0 ? 'asks for files of each part; open its inspections one by one' : null;
}

/**
 * What the draft of a part says that was inspected and found clean: every attribute conforms, nothing was marked, the
 * process values and acts are the basket's. `at` is the instant of the scan.
 */
export function cleanContent(
  asked: PlanRequirement,
  basket: { readonly process: Process; readonly acts: Acts; readonly evaluatorId: string },
  at: string,
): InspectionContent {
  const kind = judgingKind(asked.method);
  const own = basket.acts.find((act) => act.kind === kind);
  return inspectionContent.parse({
    attributes: asked.attributes.map((number) => ({ number, result: 'conforming' })),
    process: basket.process,
    acts: [
      ...basket.acts.filter((act) => act.kind !== kind),
      { kind, person: basket.evaluatorId, at, equipment: own?.equipment ?? [], values: own?.values ?? {} },
    ],
    examined: true,
  });
}

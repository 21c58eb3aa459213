import {
  equipmentByIds,
  plantZone,
  techniqueInForce,
  uncertaintiesOf,
  type TechniqueInForce,
  type UncertaintyRow,
} from '@/db/repositories/act-conditions';
import { draftById, type Draft } from '@/db/repositories/drafts';
import { partById, requirementsOfParts, type PartRequirement, type PartSummary } from '@/db/repositories/parts';
import { planById, requirementById, type RequirementRow } from '@/db/repositories/plans';
import type { Reading } from '@/db/work';
import type { InspectionContent } from '@/services/contracts/inspection-content';
import { gaugeKindsOf, type JudgingSource } from '@/services/contracts/judging-input';
import { planRequirement, type Plan, type PlanRequirement } from '@/services/contracts/plan-content';
import { notFound } from '@/services/http/problem';
import { plantDay } from './plant-day';

/** Everything that stands around one inspection, read once. */
export interface InspectionCase {
  readonly draft: Draft;
  readonly part: PartSummary;
  /** All requirements of the part, in route order. */
  readonly route: readonly PartRequirement[];
  /** The state of this requirement on this part. */
  readonly standing: PartRequirement;
  readonly plan: Plan;
  readonly row: RequirementRow;
  readonly asked: PlanRequirement;
  readonly technique: TechniqueInForce | null;
  readonly uncertainties: readonly UncertaintyRow[];
  readonly zone: string;
  readonly now: string;
  readonly day: string;
}

/** Loads an inspection with part, plan and technique; problem not-found when any is absent. `now` is the database's clock. */
export async function loadCase(reading: Reading, inspectionId: string, now: string): Promise<InspectionCase> {
  const draft = await draftById(reading, inspectionId);
  if (!draft) throw notFound('Inspection');
  const part = await partById(reading, draft.partId);
  const row = await requirementById(reading, draft.requirementId);
  if (!part || !row) throw notFound('Inspection');
  const plan = await planById(reading, row.planIssueId);
  const route = (await requirementsOfParts(reading, [part.id])).get(part.id) ?? [];
  const standing = route.find(({ requirementId }) => requirementId === row.id);
  if (!plan || !standing) throw notFound('Inspection');
  const zone = await plantZone(reading);
  const day = plantDay(now, zone);
  const asked = planRequirement.parse(row.content);
  const technique = row.technique === null ? undefined : await techniqueInForce(reading, row.technique);
  const uncertainties = row.technique === null ? [] : await uncertaintiesOf(reading, row.technique, asked.characteristics, day);
  return { draft, part, route, standing, plan, row, asked, technique: technique ?? null, uncertainties, zone, now, day };
}

/** Equipment named in a draft's acts. */
export function equipmentOfActs(content: InspectionContent): string[] {
  return [...new Set(content.acts.flatMap(({ equipment }) => equipment))];
}

/** What the pure mapping to the engine's input needs, for a content of this inspection. */
export async function judgingSource(
  reading: Reading,
  inspection: InspectionCase,
  content: InspectionContent,
): Promise<JudgingSource> {
  const equipment = await equipmentByIds(reading, equipmentOfActs(content), inspection.day);
  return {
    plan: inspection.plan,
    requirement: inspection.asked,
    content,
    uncertainties: inspection.uncertainties,
    gaugeKinds: gaugeKindsOf(content, equipment),
  };
}

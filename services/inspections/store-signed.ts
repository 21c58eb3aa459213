import { insert, insertAll } from '@/db/models/table';
import { inspectionEquipment, inspectionIndications, inspectionReadings, inspections } from '@/db/repositories/inspections';
import { keepLeans } from '@/db/repositories/leans';
import type { Work } from '@/db/work';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import { judgingInput } from '@/services/contracts/judging-input';
import { verdictOfIndication } from './changed-after-verdict';
import type { RecordParts } from './build-record';
import { equipmentOfActs } from './load-case';
import { plantDay } from './plant-day';

/** Digits after the point as entered: `0.10` has two. */
export function decimalsOf(value: string): number {
  return (value.split('.')[1] ?? '').length;
}

/** The verdict of a reading: rows of one characteristic come in the order of its readings. */
function verdictsOfReadings(evaluation: EvaluationAnswer): (characteristic: string) => EvaluationAnswer['verdict'] {
  const rows = new Map<string, EvaluationAnswer['verdict'][]>();
  for (const { characteristic, verdict } of evaluation.readings)
    rows.set(characteristic, [...(rows.get(characteristic) ?? []), verdict]);
  return (characteristic) => rows.get(characteristic)?.shift() ?? 'not-evaluable';
}

async function storeReadings(work: Work, parts: RecordParts): Promise<void> {
  const { draft } = parts.inspection;
  const verdictOf = verdictsOfReadings(parts.evaluation);
  const { places } = judgingInput(parts.source);
  const given = places.readings.flatMap((place) => draft.content.readings.slice(place, place + 1));
  await insertAll(
    work,
    inspectionReadings,
    given.map(({ characteristic, value, unit }, seq) => ({
      inspectionId: draft.id,
      seq,
      characteristic,
      value,
      decimals: decimalsOf(value),
      unit,
      verdict: verdictOf(characteristic),
    })),
  );
}

function isRelevant(relevant: unknown): boolean {
  return (relevant as { is?: unknown } | null | undefined)?.is !== false;
}

async function storeIndications(work: Work, { inspection: { draft }, evaluation }: RecordParts): Promise<void> {
  await insertAll(
    work,
    inspectionIndications,
    draft.content.indications.map((indication, seq) => {
      const judged = evaluation.indications.find(({ id }) => id === indication.id);
      return {
        inspectionId: draft.id,
        seq,
        label: indication.id,
        type: indication.type,
        view: indication.view,
        lengthMm: judged?.length ?? null,
        widthMm: judged?.width ?? null,
        class: judged?.class ?? null,
        zones: (judged?.zones ?? []).join(',').slice(0, 120),
        relevant: isRelevant(indication.relevant),
        shape: indication.shape ?? null,
        verdict: verdictOfIndication(evaluation, indication.id),
      };
    }),
  );
}

/** What each act leaned on, so that a failure found later finds it again. */
async function storeLeans(work: Work, { inspection, acts, actedAt }: RecordParts): Promise<void> {
  const { draft, technique, zone } = inspection;
  const leans = acts.flatMap(({ at, equipment, checks }) => [
    ...equipment.map(({ id }) => ({ kind: 'equipment' as const, target: id, at: at ?? actedAt })),
    ...checks.map(({ scope }) => ({ kind: 'scope' as const, target: scope, at: at ?? actedAt })),
  ]);
  const all = technique ? [...leans, { kind: 'technique' as const, target: technique.id, at: actedAt }] : leans;
  await keepLeans(
    work,
    draft.id,
    all.map((lean) => ({ ...lean, day: plantDay(lean.at, zone) })),
  );
}

/** Appends a signed inspection: the record's bytes and their projection into rows. */
export async function storeSigned(
  work: Work,
  parts: RecordParts,
  record: { readonly bytes: Buffer; readonly digest: string },
): Promise<void> {
  const { inspection, evaluation, number, signer, sentence, actedAt, lateEntry } = parts;
  const { draft, part, row, plan } = inspection;
  await insert(work, inspections, {
    id: draft.id,
    number,
    partId: part.id,
    requirementId: row.id,
    cycle: draft.cycle,
    planIssueId: plan.id,
    method: row.method,
    technique: row.technique,
    verdict: evaluation.verdict,
    readingCount: evaluation.readings.length,
    indicationCount: draft.content.indications.length,
    engine: evaluation.engine,
    criteriaDigest: evaluation.criteriaDigest,
    inputDigest: evaluation.inputDigest,
    record: record.bytes,
    recordDigest: record.digest,
    sentence,
    lateEntry,
    repeatReason: draft.repeatReason,
    supersedes: draft.supersedes,
    signedBy: signer.id,
    actedAt,
    enteredAt: draft.changedAt,
    signedAt: work.now,
  });
  await storeReadings(work, parts);
  await storeIndications(work, parts);
  await insertAll(
    work,
    inspectionEquipment,
    equipmentOfActs(draft.content).map((equipmentId) => ({ inspectionId: draft.id, equipmentId })),
  );
  await storeLeans(work, parts);
}

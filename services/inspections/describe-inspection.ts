import {
  authorisationsFor,
  benchPeople,
  checksAround,
  equipmentOfMethod,
  visionOf,
  type EquipmentRow,
} from '@/db/repositories/act-conditions';
import { evidenceOfInspection } from '@/db/repositories/evidence';
import { signedInspectionById } from '@/db/repositories/inspections';
import { databaseNow, select, type Reading } from '@/db/work';
import type { InspectionAnswer } from '@/services/contracts/inspections';
import { criteriaOfRequirement } from '@/services/contracts/judging-input';
import { judgeDraft, type Judgement } from '@/services/contracts/live-judgement';
import { neededActs } from '@/services/contracts/needed-acts';
import { askEngine } from './ask-engine';
import { scopeStandings, titlesAsked } from './check-covers';
import { describeLink } from './describe-evidence';
import { judgingSource, loadCase, type InspectionCase } from './load-case';
import { personStanding } from './person-counts';
import { readRecord } from './signed-record';

function calibrationState(row: EquipmentRow, day: string): InspectionAnswer['equipment'][number]['calibration']['state'] {
  if (row.calibratedOn === null || row.dueOn === null) return 'none';
  if (row.asLeft === 'failed') return 'failed';
  return row.dueOn < day ? 'overdue' : 'in-date';
}

async function describeEquipment(reading: Reading, inspection: InspectionCase): Promise<InspectionAnswer['equipment']> {
  const rows = await equipmentOfMethod(reading, inspection.row.method, inspection.day);
  return rows.map((row) => ({
    id: row.id,
    number: row.number,
    title: row.title,
    kind: row.kind,
    location: row.location,
    calibration: {
      state: calibrationState(row, inspection.day),
      calibratedOn: row.calibratedOn,
      dueOn: row.dueOn,
      certificate: row.certificate,
    },
  }));
}

async function describePeople(reading: Reading, { row, now, day }: InspectionCase): Promise<InspectionAnswer['people']> {
  const people = await benchPeople(reading);
  const ids = people.map(({ id }) => id);
  const authorisations = await authorisationsFor(reading, row.method, ids);
  const tests = await visionOf(reading, ids);
  return people.map(({ id, name }) => {
    const { reasons } = personStanding(
      { accountId: id, name, method: row.method, technique: row.technique, at: now, day },
      authorisations,
      tests,
    );
    return { id, name, counts: reasons.length === 0, why: reasons.length === 0 ? null : reasons.join('; ') };
  });
}

async function describeChecks(reading: Reading, { asked, now, technique }: InspectionCase): Promise<InspectionAnswer['checks']> {
  const found: InspectionAnswer['checks'] = [];
  for (const scope of asked.checks) {
    const around = await checksAround(reading, scope, now);
    for (const { state, check } of scopeStandings(scope, now, around, titlesAsked(technique?.content, scope)))
      found.push({ scope, state, title: check?.title ?? null, at: check?.at ?? null, validUntil: check?.validUntil ?? null });
  }
  return found;
}

async function describeSigned(
  reading: Reading,
  inspectionId: string,
): Promise<{ signed: InspectionAnswer['signed']; record: ReturnType<typeof readRecord> | null }> {
  const row = await signedInspectionById(reading, inspectionId);
  if (!row) return { signed: null, record: null };
  const findings = await select<{ number: string; state: string; summary: string }>(
    reading,
    'SELECT number, state, summary FROM findings WHERE inspection_id = ? ORDER BY number',
    [inspectionId],
  );
  return {
    record: readRecord(row.record),
    signed: {
      number: row.number,
      verdict: row.verdict,
      sentence: row.sentence,
      by: { id: row.signedBy, name: row.signerName },
      at: row.signedAt,
      actedAt: row.actedAt,
      enteredAt: row.enteredAt,
      lateEntry: row.lateEntry,
      recordDigest: row.recordDigest,
      ended: row.ended,
      findings,
    },
  };
}

/** Everything the bench needs about one inspection. A signed one shows what was signed, not what rows say today. */
export async function describeInspection(reading: Reading, inspectionId: string, now: string): Promise<InspectionAnswer> {
  const inspection = await loadCase(reading, inspectionId, now);
  const { draft, part, plan, row, asked, standing, technique } = inspection;
  const { signed, record } = await describeSigned(reading, inspectionId);
  const content = record?.content ?? draft.content;
  const judgement: Judgement = record
    ? { evaluation: record.evaluation, faults: [] }
    : judgeDraft(await judgingSource(reading, inspection, content), askEngine);
  return {
    id: draft.id,
    state: draft.state,
    version: draft.version,
    cycle: draft.cycle,
    repeatReason: draft.repeatReason as InspectionAnswer['repeatReason'],
    shownReject: draft.shownReject,
    opened: { id: draft.openedBy, name: draft.openedName, at: draft.openedAt },
    changed: { id: draft.changedBy, name: draft.changedName, at: draft.changedAt },
    part: {
      id: part.id,
      serial: part.serial,
      partNumber: part.partNumber,
      title: part.title,
      revision: part.revision,
      customer: part.customer,
      cluster: part.cluster,
      position: part.position,
      state: part.state,
      held: part.held,
      openFindings: part.openFindings,
      ring: inspection.route.map(({ key, title, operation, method, state }) => ({ key, title, operation, method, state })),
    },
    plan: { id: plan.id, issue: plan.issue, state: plan.state },
    requirement: { ...asked, id: row.id, key: row.key, state: standing.state, reason: standing.reason },
    technique: technique && {
      number: technique.number,
      issue: technique.issue,
      title: technique.title,
      standard: technique.standard,
      content: technique.content,
    },
    criteria: record?.criteria ?? criteriaOfRequirement(plan.criteria, asked),
    views: asked.views.length === 0 ? plan.views : plan.views.filter(({ name }) => asked.views.includes(name)),
    uncertainties: [...inspection.uncertainties],
    equipment: await describeEquipment(reading, inspection),
    people: await describePeople(reading, inspection),
    neededActs: neededActs(row.method, asked.blockCheck !== undefined),
    checks: await describeChecks(reading, inspection),
    content,
    evidence: (await evidenceOfInspection(reading, inspectionId)).map(describeLink),
    judgement: { evaluation: judgement.evaluation, faults: [...judgement.faults] },
    signed,
  };
}

/** The same, as of the database's clock. */
export async function describeInspectionNow(reading: Reading, inspectionId: string): Promise<InspectionAnswer> {
  return describeInspection(reading, inspectionId, await databaseNow(reading));
}

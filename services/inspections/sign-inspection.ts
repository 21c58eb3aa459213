import { nextNumber } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { update } from '@/db/models/table';
import { draftById, endDraft } from '@/db/repositories/drafts';
import { shareLeanedOn } from '@/db/repositories/equipment';
import { evidenceOfInspection } from '@/db/repositories/evidence';
import { signedInspectionById } from '@/db/repositories/inspections';
import { partRequirements } from '@/db/repositories/parts';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { RequirementState } from '@/services/contracts/common';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import type { signInspection as contract } from '@/services/contracts/inspections';
import { judgingInput, type JudgingSource } from '@/services/contracts/judging-input';
import { judgeDraft, judgeInput } from '@/services/contracts/live-judgement';
import { judgingAct } from '@/services/contracts/needed-acts';
import type { AnswerOf } from '@/services/contracts/operation';
import { inspectionSentence, type SignedSubject } from '@/services/contracts/signing-sentence';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { closeFollowedUp } from '@/services/findings/close-followed-up';
import { recountPart } from '@/services/parts/recount-part';
import { actsOnRecord, instantOf } from './acts-on-record';
import { askEngine } from './ask-engine';
import { buildRecord, type RecordParts } from './build-record';
import { findingSummary, openFinding, type OpenedFinding } from './open-finding';
import { equipmentOfActs, judgingSource, loadCase, type InspectionCase } from './load-case';
import { refusePart } from './open-inspection';
import { isVoid, signingReasons } from './signing-reasons';
import { storeSigned } from './store-signed';

type By = Work & { readonly actor: Actor };

/** Where a signed verdict leaves its requirement. */
const leadsTo: Readonly<Record<EvaluationAnswer['verdict'], RequirementState>> = {
  accept: 'met',
  reject: 'rejected',
  indeterminate: 'awaiting-decision',
  'not-evaluable': 'to-be-repeated',
};

// An act entered more than a day after it happened is listed as a late entry.
const lateAfterMs = 24 * 3600 * 1000;

/** Takes the part's row and the draft's, in that order, then reads the draft that may be signed: no save or file slips in between. */
async function takeCase(work: By, inspectionId: string, ifMatch: number | null): Promise<InspectionCase> {
  const known = await draftById(work, inspectionId);
  if (!known) throw notFound('Inspection');
  await takeRows(work, 'parts', [known.partId]);
  await takeRows(work, 'inspection_drafts', [inspectionId]);
  const inspection = await loadCase(work, inspectionId, work.now);
  const { draft } = inspection;
  if (draft.state === 'signed') {
    const signed = await signedInspectionById(work, inspectionId);
    throw new Problem(
      'state-refused',
      `This inspection is signed already: ${signed?.number ?? ''}, by ${signed?.signerName ?? ''} at ${signed?.signedAt ?? ''}.`,
      [],
      { number: signed?.number ?? null },
    );
  }
  if (draft.state === 'abandoned') throw new Problem('state-refused', 'This inspection was abandoned; open it again to inspect.');
  const version = draft.version - 1;
  if (ifMatch !== null && version !== ifMatch) {
    throw new Problem(
      'changed-meanwhile',
      `${draft.changedName} saved this inspection at ${draft.changedAt}, after you read it. Look at it before you sign.`,
      [],
      { present: draft.content, version },
    );
  }
  refusePart(inspection.part);
  return inspection;
}

/** The sentence that is signed for a case, when it is not the one of a single inspection. */
type Words = (subject: SignedSubject) => string;

/** Checks a case under its rows: everything that goes into the record but its number. Problem not-signable with every reason. */
export async function signable(
  work: By,
  inspection: InspectionCase,
  words: Words = inspectionSentence,
): Promise<Omit<RecordParts, 'number'>> {
  const { draft, part, plan, row } = inspection;
  const source: JudgingSource = await judgingSource(work, inspection, draft.content);
  const judgement = judgeDraft(source, askEngine);
  await shareLeanedOn(work, equipmentOfActs(draft.content), inspection.asked.checks);
  const acts = await actsOnRecord(work, inspection, draft.content.acts);
  const evidence = await evidenceOfInspection(work, draft.id);
  const reasons = signingReasons({ inspection, judgement, acts, evidence, signer: work.actor });
  if (reasons.length > 0 || !judgement.evaluation) {
    throw new Problem(
      'not-signable',
      `${String(reasons.length)} reason(s): ${reasons.map(({ message }) => message).join('; ')}`,
      reasons,
    );
  }
  const actedAt = instantOf(judgingAct(draft.content.acts)?.at) ?? work.now;
  const { serial, partNumber, revision } = part;
  const sentence = words({
    name: work.actor.name,
    serial,
    partNumber,
    revision,
    planIssue: plan.issue,
    operation: row.operation,
    title: row.title,
    verdict: judgement.evaluation.verdict,
  });
  const lateEntry = Date.parse(draft.openedAt) - Date.parse(actedAt) > lateAfterMs;
  return {
    inspection,
    source,
    evaluation: judgement.evaluation,
    acts,
    evidence,
    signer: work.actor,
    sentence,
    actedAt,
    lateEntry,
  };
}

/** A reject or an undecided verdict opens a finding; so does a defect seen in an inspection that is void. */
async function findingOf(work: By, { inspection, evaluation, source }: RecordParts): Promise<OpenedFinding[]> {
  const { row } = inspection;
  if (evaluation.verdict === 'reject' || evaluation.verdict === 'indeterminate') {
    return [await openFinding(work, inspection, evaluation.verdict, findingSummary(row.operation, row.title, evaluation))];
  }
  if (!isVoid(evaluation)) return [];
  const input = judgingInput(source);
  const seen = judgeInput(
    { ...input, criteria: { ...input.criteria, process: [] }, observations: { ...input.observations, process: [] } },
    askEngine,
  ).evaluation;
  if (seen?.verdictSoFar !== 'reject') return [];
  return [
    await openFinding(
      work,
      inspection,
      'not-evaluable',
      `Seen in a void inspection. ${findingSummary(row.operation, row.title, seen)}`.slice(0, 600),
    ),
  ];
}

type Signed = Recorded<AnswerOf<typeof contract>>;

/**
 * Appends the record of a checked case and moves draft, requirement, finding and part counters; answers what was signed
 * with its events. Call under the rows of the part and the draft. Problems: state-refused, not-signable.
 */
export async function signChecked(work: By, checked: Omit<RecordParts, 'number'>): Promise<Signed> {
  const { draft, part, row, standing } = checked.inspection;
  if (!(await endDraft(work, draft.id, 'signed'))) throw new Problem('state-refused', 'This inspection was ended meanwhile.');
  const parts: RecordParts = { ...checked, number: await nextNumber(work, 'I') };
  const record = await buildRecord(work, parts);
  await storeSigned(work, parts, record);
  const { verdict } = parts.evaluation;
  const findings = await findingOf(work, parts);
  const reason = verdict === 'not-evaluable' ? 'void: a process value was outside its window' : null;
  await update(
    work,
    partRequirements,
    { state: leadsTo[verdict], inspectionId: draft.id, reason },
    { partId: part.id, position: standing.position },
  );
  await closeFollowedUp(work, part.id);
  await recountPart(work, part.id);
  const subjects = [{ kind: 'part', id: part.id }, ...findings.map(({ id }) => ({ kind: 'finding', id }))];
  return {
    answer: {
      inspection: draft.id,
      number: parts.number,
      verdict,
      evaluation: parts.evaluation,
      sentence: parts.sentence,
      findings: findings.map(({ number }) => ({ number })),
    },
    headers: { location: `/api/inspections/${draft.id}` },
    events: [
      {
        subject: { kind: 'inspection', id: draft.id },
        also: subjects,
        details: {
          number: parts.number,
          serial: part.serial,
          operation: row.operation,
          title: row.title,
          verdict,
          recordDigest: record.digest,
          sentence: parts.sentence,
          findings: findings.map(({ number }) => number),
        },
      },
      ...findings.map(({ id, number, summary }) => ({
        kind: 'finding-opened' as const,
        subject: { kind: 'finding', id },
        also: [
          { kind: 'part', id: part.id },
          { kind: 'inspection', id: draft.id },
        ],
        details: { number, serial: part.serial, verdict, summary, inspection: parts.number },
      })),
    ],
  };
}

/**
 * Signs an inspection: re-reads the draft under the part's row, refuses with every reason at once, else appends the
 * record and moves requirement, finding and part counters. Problems: not-found, state-refused, changed-meanwhile, not-signable.
 */
export async function signInspection(work: By, inspectionId: string, ifMatch: number | null): Promise<Signed> {
  const inspection = await takeCase(work, inspectionId, ifMatch);
  return signChecked(work, await signable(work, inspection));
}

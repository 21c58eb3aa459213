import { createHash, randomBytes } from 'node:crypto';
import type { LinkedEvidence } from '@/db/repositories/evidence';
import { select, type Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { EvaluationAnswer } from '@/services/contracts/evaluate';
import { judgingInput, type JudgingSource } from '@/services/contracts/judging-input';
import { canonicalJson } from '@/services/engine/record/canonical';
import { isoOf } from '@/db/work';
import build from '@/package.json';
import type { ActOnRecord } from './acts-on-record';
import type { InspectionCase } from './load-case';
import { recordSchema } from './signed-record';

export interface RecordParts {
  readonly inspection: InspectionCase;
  readonly number: string;
  readonly source: JudgingSource;
  readonly evaluation: EvaluationAnswer;
  readonly acts: readonly ActOnRecord[];
  readonly evidence: readonly LinkedEvidence[];
  readonly signer: Pick<Actor, 'id' | 'name'>;
  readonly sentence: string;
  readonly actedAt: string;
  readonly lateEntry: boolean;
}

/** Values changed after their verdict was shown, in order: with them the record tells each value as it was entered. */
async function keptValues(reading: Reading, draftId: string): Promise<Record<string, unknown>[]> {
  const rows = await select<{ field: string; before: string | null; verdictShown: string; by: string; at: string }>(
    reading,
    `SELECT field, before_value AS \`before\`, verdict_shown AS verdictShown, changed_by AS \`by\`, ${isoOf('changed_at')} AS at FROM draft_changes WHERE draft_id = ? ORDER BY seq`,
    [draftId],
  );
  return rows.map(({ before, ...row }) => ({ ...row, before: before === null ? null : (JSON.parse(before) as unknown) }));
}

function actOf({ act, at, person, standing, equipment, checks }: ActOnRecord): Record<string, unknown> {
  return {
    kind: act.kind,
    at,
    entered: act,
    person,
    authorisation: standing?.authorisation ?? null,
    vision: standing ? { near: standing.nearVision, colour: standing.colourPerception } : null,
    equipment,
    checks,
  };
}

/**
 * The canonical bytes (RFC 8785) of what is signed: copies, not references, so that the record says by itself what
 * counted at that moment. Answers the bytes and their SHA-256 in hex.
 */
export async function buildRecord(reading: Reading, parts: RecordParts): Promise<{ bytes: Buffer; digest: string }> {
  const { inspection, source, evaluation, signer } = parts;
  const { draft, part, plan, row, asked, technique, now } = inspection;
  const { criteria, observations } = judgingInput(source);
  const record = {
    schema: recordSchema,
    kind: 'inspection',
    id: draft.id,
    number: parts.number,
    cycle: draft.cycle,
    repeatReason: draft.repeatReason,
    supersedes: draft.supersedes,
    subject: {
      part: part.id,
      serial: part.serial,
      partNumber: part.partNumber,
      title: part.title,
      revision: part.revision,
      customer: { id: part.customerId, name: part.customer },
      cluster: { id: part.clusterId, number: part.cluster },
      position: part.position,
    },
    plan: { id: plan.id, drawing: plan.drawing, revision: plan.revision, issue: plan.issue, state: plan.state },
    requirement: { ...asked, id: row.id, key: row.key },
    technique,
    criteria,
    observations,
    content: draft.content,
    keptValues: await keptValues(reading, draft.id),
    entries: {
      opened: { by: draft.openedBy, name: draft.openedName, at: draft.openedAt },
      changed: { by: draft.changedBy, name: draft.changedName, at: draft.changedAt },
      version: draft.version,
    },
    acts: parts.acts.map(actOf),
    uncertainties: inspection.uncertainties,
    evidence: parts.evidence.map(({ id, sha256, bytes, mediaType, name, role, view, registration, pixelPitchUm, facts }) => ({
      id,
      sha256,
      bytes,
      mediaType,
      name,
      role,
      view,
      registration,
      pixelPitchUm,
      facts,
    })),
    evaluation,
    times: { acted: parts.actedAt, entered: draft.changedAt, signed: now, lateEntry: parts.lateEntry },
    signer: { id: signer.id, name: signer.name },
    sentence: parts.sentence,
    build: { name: build.name, version: build.version },
    // 128 bits, so that a digest beside this one in a proof cannot be guessed.
    nonce: randomBytes(16).toString('hex'),
  };
  const bytes = Buffer.from(canonicalJson(JSON.parse(JSON.stringify(record))), 'utf8');
  return { bytes, digest: createHash('sha256').update(bytes).digest('hex') };
}

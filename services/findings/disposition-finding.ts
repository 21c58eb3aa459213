import { createHash } from 'node:crypto';
import { newId } from '@/db/identity';
import { takeRows } from '@/db/lock';
import { endDraft, liveDraft } from '@/db/repositories/drafts';
import { appendEvent } from '@/db/repositories/events';
import { findingByNumber, historyOf, reworkCycles, type FindingRow } from '@/db/repositories/findings';
import { planById, requirementsOfPlan } from '@/db/repositories/plans';
import { execute, selectOne, sqlTimeOf, type Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { dispositionSentence } from '@/services/contracts/disposition-sentence';
import type { Decision, dispositionFinding as contract, Finding } from '@/services/contracts/findings';
import type { BodyOf } from '@/services/contracts/operation';
import type { Plan } from '@/services/contracts/plan-content';
import { canonicalJson } from '@/services/engine/record/canonical';
import { notFound, Problem } from '@/services/http/problem';
import type { Recorded } from '@/services/http/route';
import { recountPart } from '@/services/parts/recount-part';
import { readFinding } from './read-finding';

type By = Work & { readonly actor: Actor };
type Body = BodyOf<typeof contract>;

/** Where each decision leaves its finding. */
const leadsTo: Readonly<Record<Decision, FindingRow['state']>> = {
  're-interpretation': 'awaiting-follow-up',
  rework: 'awaiting-follow-up',
  repair: 'awaiting-follow-up',
  'use-as-is': 'awaiting-follow-up',
  void: 'awaiting-follow-up',
  refer: 'awaiting-follow-up',
  scrap: 'closed',
};

/** Part states in which operations can be repeated. */
const repeatable: readonly string[] = ['serialised', 'in-process', 'finished', 'returned'];

function refuse(actor: Actor, row: FindingRow, evaluators: ReadonlySet<string>, decision: Decision): void {
  if (row.state === 'closed') throw new Problem('state-refused', `Finding ${row.number} is closed.`);
  // A scrapped part may have further findings; they are closed by saying so of each.
  if (!repeatable.includes(row.partState) && !(row.partState === 'scrapped' && decision === 'scrap'))
    throw new Problem('state-refused', `Serial ${row.serial} is ${row.partState}; only a part in the plant can be decided on.`);
  if (evaluators.has(actor.id))
    throw new Problem('not-permitted', 'Nobody decides a finding on an inspection they signed themselves.');
  if (decision === 'use-as-is' || decision === 'repair') {
    throw new Problem(
      'not-permitted',
      'What stays outside the drawing is accepted only by the customer’s concession or under a material-review delegation, never on a reviewer’s own authority.',
      [{ path: 'decision', message: 'needs a concession or a material-review delegation' }],
    );
  }
}

/** Ends the live draft of a requirement that is reopened: what was measured before the rework does not count after it. */
async function endLiveDraft(work: By, row: FindingRow, requirementId: string): Promise<void> {
  const draft = await liveDraft(work, row.partId, requirementId);
  if (!draft || !(await endDraft(work, draft.id, 'abandoned'))) return;
  await appendEvent(work, {
    kind: 'inspection-abandoned',
    subject: { kind: 'inspection', id: draft.id },
    also: [{ kind: 'part', id: row.partId }],
    details: { reason: `reopened by finding ${row.number}`, shownReject: draft.shownReject, version: draft.version },
  });
}

/** Sets operations to be repeated, each in its next cycle. Problem invalid-input names keys that are not in the route. */
async function reopen(work: By, row: FindingRow, keys: readonly string[], reason: string): Promise<void> {
  const route = await requirementsOfPlan(work, row.planId);
  const unknown = keys.flatMap((key, at) =>
    route.some((one) => one.key === key)
      ? []
      : [{ path: `repeat.${String(at)}`, message: `${key} is not an operation of the route` }],
  );
  if (unknown.length > 0) throw new Problem('invalid-input', 'repeat: names operations that are not in the route', unknown);
  for (const { id } of route.filter(({ key }) => keys.includes(key))) {
    await endLiveDraft(work, row, id);
    await execute(
      work,
      `UPDATE part_requirements SET state = 'to-be-repeated', cycle = cycle + 1, reason = ? WHERE part_id = ? AND requirement_id = ?`,
      [reason, row.partId, id],
    );
  }
}

/** The kind of rework that is named, with cycles left. Problems invalid-input (not in the plan), state-refused (used up). */
async function namedRework(work: By, row: FindingRow, scheme: string, kinds: Plan['rework']): Promise<Plan['rework'][number]> {
  const named = kinds.find(({ kind }) => kind === scheme);
  if (!named)
    throw new Problem('invalid-input', `scheme: ${scheme} is no kind of rework of the plan`, [
      { path: 'scheme', message: 'is no kind of rework of the plan' },
    ]);
  const before = await reworkCycles(work, row.partId, scheme);
  if (before >= named.mostCycles)
    throw new Problem(
      'state-refused',
      `${named.title} was ordered ${String(before)} time(s) on serial ${row.serial}; the plan allows ${String(named.mostCycles)}.`,
      [{ path: 'scheme', message: `the plan allows ${String(named.mostCycles)} cycle(s)` }],
    );
  return named;
}

/**
 * Operations repeated after rework: those chosen, the finding's own, and what the named kind of rework reopens by the
 * plan. Where nothing is named, what any kind of the plan reopens: rather one operation too many.
 */
async function repeatedAfterRework(work: By, row: FindingRow, { repeat, scheme }: Body): Promise<string[]> {
  const kinds = (await planById(work, row.planId))?.rework ?? [];
  const named = scheme === undefined ? [] : [await namedRework(work, row, scheme, kinds)];
  const counted = named.length > 0 || repeat !== undefined ? named : kinds;
  // What was chosen comes first, so that a refusal's path fits what was sent.
  return [...new Set([...(repeat ?? []), row.key, ...counted.flatMap(({ reopens }) => reopens)])];
}

/** What the decision does to part, requirement and inspection; answers the operations to be repeated. */
async function carryOut(work: By, row: FindingRow, body: Body): Promise<readonly string[]> {
  if (body.decision === 'scrap') {
    await execute(work, `UPDATE parts SET state = 'scrapped' WHERE id = ?`, [row.partId]);
    return [];
  }
  if (body.decision === 'refer') return [];
  const keys = body.decision === 'rework' ? await repeatedAfterRework(work, row, body) : [row.key];
  if (body.decision === 'void' && row.inspectionId) {
    await execute(
      work,
      `INSERT IGNORE INTO inspection_ends (inspection_id, kind, reason, ended_by, ended_at) VALUES (?, 'voided', ?, ?, ?)`,
      [row.inspectionId, body.reason.slice(0, 400), work.actor.id, sqlTimeOf(work.now)],
    );
  }
  await reopen(work, row, keys, `${body.decision}: ${row.number}`);
  return keys;
}

async function storeDecision(
  work: By,
  row: FindingRow,
  body: Body,
  repeat: readonly string[],
  sentence: string,
): Promise<string> {
  const last = await selectOne<{ seq: number | null }>(work, 'SELECT MAX(seq) AS seq FROM dispositions WHERE finding_id = ?', [
    row.id,
  ]);
  const id = newId();
  const record = {
    schema: 1,
    id,
    finding: row.number,
    part: row.partId,
    serial: row.serial,
    inspection: row.inspectionId,
    decision: body.decision,
    reason: body.reason,
    repeat,
    scheme: body.scheme ?? null,
    decidedBy: { id: work.actor.id, name: work.actor.name },
    decidedAt: work.now,
    sentence,
  };
  const bytes = Buffer.from(canonicalJson(record), 'utf8');
  const digest = createHash('sha256').update(bytes).digest('hex');
  await execute(
    work,
    'INSERT INTO dispositions (id, finding_id, seq, decision, reason, repeat_keys, scheme, inspection_id, sentence, record, record_digest, decided_by, decided_at) VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)',
    [
      id,
      row.id,
      (last?.seq ?? 0) + 1,
      body.decision,
      body.reason,
      JSON.stringify(repeat),
      body.scheme ?? null,
      row.inspectionId,
      sentence,
      bytes,
      digest,
      work.actor.id,
      sqlTimeOf(work.now),
    ],
  );
  return digest;
}

/**
 * A reviewer's signed decision on a finding. The part's row is written first; the decision, what it reopens and the
 * counters change together. Problems: not-found, not-permitted, state-refused, invalid-input.
 */
export async function dispositionFinding(work: By, number: string, body: Body): Promise<Recorded<Finding>> {
  const known = await findingByNumber(work, number);
  if (!known) throw notFound(`Finding ${number}`);
  await takeRows(work, 'parts', [known.partId]);
  await takeRows(work, 'findings', [known.id]);
  const row = await findingByNumber(work, number);
  if (!row) throw notFound(`Finding ${number}`);
  const history = await historyOf(work, row.partId, row.requirementId);
  refuse(work.actor, row, new Set(history.map(({ signedById }) => signedById)), body.decision);
  const repeat = await carryOut(work, row, body);
  const sentence = dispositionSentence({
    name: work.actor.name,
    finding: number,
    serial: row.serial,
    decision: body.decision,
    repeat,
  });
  const digest = await storeDecision(work, row, body, repeat, sentence);
  const state = leadsTo[body.decision];
  await execute(work, 'UPDATE findings SET state = ?, closed_at = ? WHERE id = ?', [
    state,
    state === 'closed' ? sqlTimeOf(work.now) : null,
    row.id,
  ]);
  await recountPart(work, row.partId);
  return {
    answer: await readFinding(work, number),
    events: [
      {
        subject: { kind: 'finding', id: row.id },
        also: [{ kind: 'part', id: row.partId }],
        details: { finding: number, serial: row.serial, decision: body.decision, reason: body.reason, repeat, state, digest },
      },
    ],
  };
}

import { z } from 'zod';
import { id, instant, partState, password, requirementState, verdict } from './common';
import { evaluation } from './evaluate';
import { evidenceFile, evidenceRole } from './evidence';
import { inspectionContent, inspectionPatch } from './inspection-content';
import { operation } from './operation';
import { ringSegment } from './parts';
import { planRequirement, planState, planView } from './plan-content';

const byId = z.object({ id });
const entryFault = z.object({ path: z.string(), message: z.string() });
const personAt = z.object({ id, name: z.string(), at: instant });

/** Why a requirement is inspected again (the list of the quality manual; each names itself on the record). */
export const repeatReason = z.enum([
  'retake',
  'repeat',
  're-read',
  're-measure',
  're-inspect-after-rework',
  're-inspect-after-return',
]);
export type RepeatReason = z.output<typeof repeatReason>;

export const judgement = z.object({ evaluation: evaluation.nullable(), faults: z.array(entryFault) });

/** Last calibration of a piece of equipment, as it counts today. */
const equipmentChoice = z.object({
  id,
  number: z.string(),
  title: z.string(),
  kind: z.string(),
  location: z.string().nullable(),
  calibration: z.object({
    state: z.enum(['in-date', 'overdue', 'failed', 'none']),
    calibratedOn: z.string().nullable(),
    dueOn: z.string().nullable(),
    certificate: z.string().nullable(),
  }),
});

const linkedEvidence = evidenceFile.extend({
  role: evidenceRole,
  view: z.string().nullable(),
  registration: z.unknown(),
  linkedBy: z.string(),
  linkedAt: instant,
});

const signedInspection = z.object({
  number: z.string(),
  verdict,
  sentence: z.string(),
  by: z.object({ id, name: z.string() }),
  at: instant,
  actedAt: instant,
  enteredAt: instant,
  lateEntry: z.boolean(),
  recordDigest: z.string(),
  ended: z
    .object({ kind: z.enum(['superseded', 'voided']), reason: z.string(), at: instant, successor: id.nullable() })
    .nullable(),
  findings: z.array(z.object({ number: z.string(), state: z.string(), summary: z.string() })),
});

/** Everything the bench needs in one answer. `ETag` is `version`. */
export const inspection = z.object({
  id,
  state: z.enum(['draft', 'signed', 'abandoned']),
  version: z.int(),
  cycle: z.int(),
  repeatReason: repeatReason.nullable(),
  shownReject: z.boolean(),
  opened: personAt,
  changed: personAt,
  part: z.object({
    id,
    serial: z.string(),
    partNumber: z.string(),
    title: z.string(),
    revision: z.string(),
    customer: z.string(),
    cluster: z.string(),
    position: z.string(),
    state: partState,
    held: z.boolean(),
    openFindings: z.int(),
    ring: z.array(ringSegment),
  }),
  plan: z.object({ id, issue: z.int(), state: planState }),
  requirement: planRequirement.extend({ id, key: z.string(), state: requirementState, reason: z.string().nullable() }),
  technique: z
    .object({
      number: z.string(),
      issue: z.int(),
      title: z.string(),
      standard: z.string(),
      content: z.record(z.string(), z.unknown()),
    })
    .nullable(),
  /** The plan's criteria cut to this requirement: the form of POST /api/evaluate. */
  criteria: z.record(z.string(), z.unknown()),
  views: z.array(planView),
  uncertainties: z.array(
    z.object({
      characteristic: z.string(),
      gaugeKind: z.string(),
      expanded: z.string(),
      k: z.string(),
      unit: z.string(),
      basis: z.string(),
    }),
  ),
  equipment: z.array(equipmentChoice),
  /** Who may be named in an act, and whether their authorisation and vision count today. */
  people: z.array(z.object({ id, name: z.string(), counts: z.boolean(), why: z.string().nullable() })),
  neededActs: z.array(z.object({ kind: z.string(), equipment: z.boolean() })),
  checks: z.array(
    z.object({
      scope: z.string(),
      state: z.enum(['good', 'failed', 'missed']),
      title: z.string().nullable(),
      at: instant.nullable(),
      validUntil: instant.nullable(),
    }),
  ),
  content: inspectionContent,
  evidence: z.array(linkedEvidence),
  judgement,
  signed: signedInspection.nullable(),
});
export type InspectionAnswer = z.output<typeof inspection>;

export const openInspection = operation({
  name: 'open-inspection',
  method: 'POST',
  path: '/api/inspections',
  summary: 'Open the inspection of one requirement of a part; 200 with the live draft when one is open already.',
  changes: true,
  body: z.strictObject({
    subject: z.strictObject({ part: id }),
    /** Requirement id of the part, or its key in the plan. */
    requirement: z.string().min(1).max(60),
    repeatReason: repeatReason.optional(),
  }),
  response: inspection,
  status: 201,
});

export const readInspection = operation({
  name: 'read-inspection',
  method: 'GET',
  path: '/api/inspections/{id}',
  summary: 'One inspection, draft or signed, with all the bench needs. ETag is the draft version.',
  changes: false,
  params: byId,
  response: inspection,
  status: 200,
});

export const changeInspection = operation({
  name: 'change-inspection',
  method: 'PATCH',
  path: '/api/inspections/{id}',
  summary: 'Save a draft as typed (If-Match); the lists sent replace what was there. Answers the live verdict.',
  changes: true,
  params: byId,
  body: inspectionPatch,
  response: inspection,
  status: 200,
});

export const abandonInspection = operation({
  name: 'abandon-inspection',
  method: 'POST',
  path: '/api/inspections/{id}/abandonment',
  summary: 'Give up a draft; it is kept as abandoned.',
  changes: true,
  params: byId,
  body: z.strictObject({ reason: z.string().trim().max(400).optional() }),
  response: inspection,
  status: 200,
});

export const deleteInspection = operation({
  name: 'delete-inspection',
  method: 'DELETE',
  path: '/api/inspections/{id}',
  summary: 'The same as abandonment, without a reason; the draft is kept as abandoned.',
  changes: true,
  params: byId,
  status: 204,
});

export const signInspection = operation({
  name: 'sign-inspection',
  method: 'POST',
  path: '/api/inspections/{id}/signature',
  summary: 'Sign an inspection. 422 with every reason why it may not be signed yet.',
  changes: true,
  params: byId,
  body: z.strictObject({ password: password.optional(), pin: z.string().min(1).max(20).optional() }),
  response: z.object({
    inspection: id,
    number: z.string(),
    verdict,
    evaluation,
    sentence: z.string(),
    findings: z.array(z.object({ number: z.string() })),
  }),
  status: 201,
});

export const readingsFile = operation({
  name: 'read-readings-file',
  method: 'POST',
  path: '/api/inspections/{id}/readings-file',
  summary:
    'Parse a CSV of readings (the body) against the requirement: rows by characteristic, faults by row. Nothing is stored.',
  changes: false,
  bodyKind: 'stream',
  params: byId,
  query: z.object({ decimalSign: z.enum(['.', ',']).optional(), separator: z.enum([',', ';', 'tab']).optional() }),
  response: z.object({
    separator: z.string(),
    decimalSign: z.string(),
    readings: inspectionContent.shape.readings,
    faults: z.array(z.object({ line: z.int(), message: z.string() })),
  }),
  status: 200,
});

export const linkEvidence = operation({
  name: 'link-evidence',
  method: 'PUT',
  path: '/api/inspections/{id}/evidence/{evidenceId}',
  summary: 'Attach an admitted file to a draft, with its role, view and registration.',
  changes: true,
  params: z.object({ id, evidenceId: id }),
  body: z.strictObject({ role: evidenceRole, view: z.string().max(60).nullish(), registration: z.unknown().optional() }),
  response: z.object({ evidence: z.array(linkedEvidence) }),
  status: 200,
});

export const unlinkEvidence = operation({
  name: 'unlink-evidence',
  method: 'DELETE',
  path: '/api/inspections/{id}/evidence/{evidenceId}',
  summary: 'Detach a file from a draft; the file stays.',
  changes: true,
  params: z.object({ id, evidenceId: id }),
  status: 204,
});

import { lotById, lotsAbove } from '@/db/repositories/lots';
import { holdsOver } from '@/db/repositories/part-story';
import { requirementsOfParts, partById, type PartRequirement, type PartSummary } from '@/db/repositories/parts';
import { planById } from '@/db/repositories/plans';
import {
  badEvidence,
  decidersOfParts,
  inspectionsOfParts,
  suspectEquipment,
  type ShipmentRow,
  type SignedInspection,
} from '@/db/repositories/shipments';
import type { Reading } from '@/db/work';
import type { GateReason } from '@/services/contracts/shipments';
import { metStates } from '@/services/parts/recount-part';
import { reasonsOfActs } from './act-gates';

/** What one serial brings to the gates, and what stands against it. */
export interface GatedPart {
  readonly part: PartSummary;
  readonly requirements: readonly PartRequirement[];
  readonly inspections: readonly SignedInspection[];
  readonly heat: string | null;
  readonly reasons: readonly GateReason[];
}

interface Facts {
  readonly requirements: Map<string, PartRequirement[]>;
  readonly inspections: readonly SignedInspection[];
  readonly deciders: readonly { partId: string; decidedBy: string }[];
  readonly suspects: readonly { partId: string; equipment: string; inspection: string }[];
  readonly files: readonly { partId: string; name: string }[];
  readonly acts: ReadonlyMap<string, readonly GateReason[]>;
}

const reason = (gate: number, code: string, message: string, who: string): GateReason => ({ gate, code, message, who });

function requirementReasons(requirements: readonly PartRequirement[]): GateReason[] {
  return requirements
    .filter(({ state }) => !metStates.includes(state))
    .map(({ operation, title, state }) =>
      reason(
        1,
        'requirement-not-met',
        `${operation} ${title} is ${state.replaceAll('-', ' ')}`,
        state === 'rejected' || state === 'awaiting-decision' ? 'reviewer' : 'inspector',
      ),
    );
}

function peopleReasons(part: PartSummary, facts: Facts, signatoryId: string | null): GateReason[] {
  const own = facts.inspections.filter(({ partId, signedBy }) => partId === part.id && signedBy === signatoryId);
  const decided = facts.deciders.some(({ partId, decidedBy }) => partId === part.id && decidedBy === signatoryId);
  return [
    ...(own.length > 0
      ? [
          reason(
            11,
            'own-inspection',
            `the signatory signed inspection ${own[0]?.number ?? ''} of this serial`,
            'another signatory',
          ),
        ]
      : []),
    ...(decided ? [reason(11, 'own-decision', 'the signatory decided a finding on this serial', 'another signatory')] : []),
  ];
}

function orderReasons(part: PartSummary, shipment: ShipmentRow): GateReason[] {
  const found: GateReason[] = [];
  if (part.drawingId !== shipment.drawingId || part.revision !== shipment.revision) {
    found.push(
      reason(
        10,
        'other-drawing',
        `the order asks for ${shipment.partNumber} revision ${shipment.revision}; this is ${part.partNumber} revision ${part.revision}`,
        'administrator',
      ),
    );
  }
  if (part.customerId !== shipment.customerId)
    found.push(reason(10, 'other-customer', 'this part belongs to another customer', 'administrator'));
  return found;
}

async function lineageReasons(reading: Reading, part: PartSummary): Promise<{ heat: string | null; reasons: GateReason[] }> {
  const lots = await lotsAbove(reading, part.clusterId);
  const reasons = (
    await holdsOver(
      reading,
      part.id,
      lots.map(({ id }) => id),
    )
  ).map((hold) => reason(2, 'held', `hold ${hold.number} on ${hold.target}: ${hold.reason}`, 'reviewer'));
  const heat = lots.find(({ kind }) => kind === 'heat');
  if (!heat) reasons.push(reason(9, 'no-heat', 'no heat is on record above the cluster', 'administrator'));
  else if (!(await lotById(reading, heat.id))?.attributes.alloyCertificate)
    reasons.push(reason(9, 'no-alloy-certificate', `heat ${heat.number} has no alloy certificate`, 'administrator'));
  return { heat: heat?.number ?? null, reasons };
}

async function gatesOf(
  reading: Reading,
  part: PartSummary,
  facts: Facts,
  shipment: ShipmentRow,
  signatoryId: string | null,
): Promise<GatedPart> {
  const requirements = facts.requirements.get(part.id) ?? [];
  const lineage = await lineageReasons(reading, part);
  const plan = await planById(reading, part.planIssueId);
  const reasons = [
    ...requirementReasons(requirements),
    ...(part.openFindings > 0
      ? [reason(2, 'open-finding', `${String(part.openFindings)} finding(s) are not closed`, 'reviewer')]
      : []),
    ...(part.held && lineage.reasons.every(({ code }) => code !== 'held')
      ? [reason(2, 'held', 'the part is held', 'reviewer')]
      : []),
    ...lineage.reasons,
    ...facts.suspects
      .filter(({ partId }) => partId === part.id)
      .map(({ equipment, inspection }) =>
        reason(2, 'suspect', `${equipment} was found out of tolerance after inspection ${inspection}`, 'reviewer'),
      ),
    ...(facts.acts.get(part.id) ?? []),
    ...(plan && plan.state !== 'approved' && plan.state !== 'superseded'
      ? [reason(5, 'plan-not-effective', `plan issue ${String(plan.issue)} is ${plan.state}`, 'reviewer')]
      : []),
    ...facts.files
      .filter(({ partId }) => partId === part.id)
      .map(({ name }) => reason(7, 'file-not-sound', `file ${name} is missing or altered in the store`, 'administrator')),
    ...orderReasons(part, shipment),
    ...(part.state === 'finished' || part.state === 'in-process' || part.state === 'serialised'
      ? []
      : [reason(1, 'part-state', `the part is ${part.state}`, 'reviewer')]),
    ...peopleReasons(part, facts, signatoryId),
  ];
  return {
    part,
    requirements,
    inspections: facts.inspections.filter(({ partId }) => partId === part.id),
    heat: lineage.heat,
    reasons,
  };
}

/** Reasons of the shipment as a whole. */
export function shipmentReasons(shipment: ShipmentRow, count: number): GateReason[] {
  const left = shipment.quantity - shipment.released;
  return [
    ...(count === 0 ? [reason(10, 'empty', 'the shipment holds no serial', 'administrator')] : []),
    ...(count > left
      ? [reason(10, 'quantity', `the order line has ${String(left)} open; the shipment holds ${String(count)}`, 'administrator')]
      : []),
  ];
}

/**
 * The release gates of every serial, with all reasons at once. Inside the signing transaction call it after the parts'
 * rows were taken; `signatoryId` null shows the gates without segregation.
 */
export async function gatesOfParts(
  reading: Reading,
  partIds: readonly string[],
  shipment: ShipmentRow,
  signatoryId: string | null,
): Promise<GatedPart[]> {
  const facts: Facts = {
    requirements: await requirementsOfParts(reading, partIds),
    inspections: await inspectionsOfParts(reading, partIds),
    deciders: await decidersOfParts(reading, partIds),
    suspects: await suspectEquipment(reading, partIds),
    files: await badEvidence(reading, partIds),
    acts: await reasonsOfActs(reading, partIds),
  };
  const gated: GatedPart[] = [];
  for (const partId of partIds) {
    const part = await partById(reading, partId);
    if (part) gated.push(await gatesOf(reading, part, facts, shipment, signatoryId));
  }
  return gated.sort((a, b) => (a.part.serial < b.part.serial ? -1 : 1));
}

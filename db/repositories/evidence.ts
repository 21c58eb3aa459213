import { orderClauses } from '../../services/contracts/order-clauses';
import { execute, isoOf, select, selectOne, sqlTimeOf, type Reading, type Work } from '../work';
import type { EvidenceRole } from '../../services/contracts/evidence';

export interface EvidenceRow {
  id: string;
  sha256: string;
  bytes: number;
  mediaType: string;
  name: string;
  kind: string;
  width: number | null;
  height: number | null;
  bits: number | null;
  pixelPitchUm: string | null;
  facts: Record<string, unknown>;
  storageKey: string;
  previewKey: string | null;
  packedKey: string | null;
  admittedBy: string;
  admittedAt: string;
}

type Stored = Omit<EvidenceRow, 'facts'> & { facts: string };

const columns = `v.id, v.sha256, v.bytes, v.media_type AS mediaType, v.name, v.kind, v.width, v.height, v.bits, v.pixel_pitch_um AS pixelPitchUm, v.facts,
  v.storage_key AS storageKey, v.preview_key AS previewKey, v.packed_key AS packedKey, v.admitted_by AS admittedBy, ${isoOf('v.admitted_at')} AS admittedAt`;

function toEvidence(row: Stored): EvidenceRow {
  return { ...row, facts: JSON.parse(row.facts) as Record<string, unknown> };
}

export async function evidenceById(reading: Reading, evidenceId: string): Promise<EvidenceRow | undefined> {
  const row = await selectOne<Stored>(reading, `SELECT ${columns} FROM evidence v WHERE v.id = ?`, [evidenceId]);
  return row && toEvidence(row);
}

export async function evidenceByDigest(reading: Reading, sha256: string): Promise<EvidenceRow | undefined> {
  const row = await selectOne<Stored>(reading, `SELECT ${columns} FROM evidence v WHERE v.sha256 = ?`, [sha256]);
  return row && toEvidence(row);
}

/** Adds the row of an admitted file; false when these bytes are there already (two uploads at once give one row). */
export async function addEvidence(work: Work, row: EvidenceRow): Promise<boolean> {
  const added = await execute(
    work,
    `INSERT IGNORE INTO evidence (id, sha256, bytes, media_type, name, kind, width, height, bits, pixel_pitch_um, facts, storage_key, preview_key, packed_key, admitted_by, admitted_at)
     VALUES (?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?, ?)`,
    [
      row.id,
      row.sha256,
      row.bytes,
      row.mediaType,
      row.name,
      row.kind,
      row.width,
      row.height,
      row.bits,
      row.pixelPitchUm,
      JSON.stringify(row.facts),
      row.storageKey,
      row.previewKey,
      row.packedKey,
      row.admittedBy,
      sqlTimeOf(row.admittedAt),
    ],
  );
  return added === 1;
}

interface LinkRow {
  inspectionId: string;
  evidenceId: string;
  role: EvidenceRole;
  view: string | null;
  registration: unknown;
  linkedBy: string;
  linkedAt: string;
}

/** A file as linked to an inspection. */
export type LinkedEvidence = EvidenceRow & {
  readonly role: EvidenceRole;
  readonly view: string | null;
  readonly registration: unknown;
  readonly linkedName: string;
  readonly linkedAt: string;
};

/** The files of an inspection in the order they were attached. */
export async function evidenceOfInspection(reading: Reading, inspectionId: string): Promise<LinkedEvidence[]> {
  const rows = await select<
    Stored & { role: EvidenceRole; view: string | null; registration: string | null; linkedName: string; linkedAt: string }
  >(
    reading,
    `SELECT ${columns}, l.role, l.view, l.registration, a.name AS linkedName, ${isoOf('l.linked_at')} AS linkedAt
     FROM inspection_evidence l JOIN evidence v ON v.id = l.evidence_id JOIN accounts a ON a.id = l.linked_by WHERE l.inspection_id = ? ORDER BY l.linked_at, v.id`,
    [inspectionId],
  );
  return rows.map((row) => ({
    ...toEvidence(row),
    role: row.role,
    view: row.view,
    registration: row.registration === null ? null : (JSON.parse(row.registration) as unknown),
    linkedName: row.linkedName,
    linkedAt: row.linkedAt,
  }));
}

/** Links a file, or changes how it is linked. */
export async function putLink(work: Work, link: LinkRow): Promise<void> {
  const registration = link.registration === null || link.registration === undefined ? null : JSON.stringify(link.registration);
  await execute(
    work,
    `INSERT INTO inspection_evidence (inspection_id, evidence_id, role, view, registration, linked_by, linked_at) VALUES (?, ?, ?, ?, ?, ?, ?)
     ON DUPLICATE KEY UPDATE role = VALUES(role), view = VALUES(view), registration = VALUES(registration), linked_by = VALUES(linked_by), linked_at = VALUES(linked_at)`,
    [link.inspectionId, link.evidenceId, link.role, link.view, registration, link.linkedBy, sqlTimeOf(link.linkedAt)],
  );
}

export async function dropLink(work: Work, inspectionId: string, evidenceId: string): Promise<boolean> {
  return (
    (await execute(work, 'DELETE FROM inspection_evidence WHERE inspection_id = ? AND evidence_id = ?', [
      inspectionId,
      evidenceId,
    ])) === 1
  );
}

/**
 * Is a file part of a released part of this customer, on an order line whose clauses show images?
 */
export async function customerMaySeeFile(reading: Reading, evidenceId: string, customerId: string): Promise<boolean> {
  const rows = await select<{ clauses: string }>(
    reading,
    `SELECT DISTINCT ol.clauses FROM inspection_evidence l JOIN inspections i ON i.id = l.inspection_id JOIN parts p ON p.id = i.part_id
       JOIN release_parts rp ON rp.part_id = p.id JOIN releases r ON r.id = rp.release_id JOIN shipments s ON s.id = r.shipment_id JOIN order_lines ol ON ol.id = s.order_line_id
     WHERE l.evidence_id = ? AND p.customer_id = ? AND r.customer_id = ?`,
    [evidenceId, customerId, customerId],
  );
  return rows.some(({ clauses }) => orderClauses.parse(JSON.parse(clauses)).images);
}

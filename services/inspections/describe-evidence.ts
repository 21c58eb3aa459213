import type { EvidenceRow, LinkedEvidence } from '@/db/repositories/evidence';
import type { EvidenceFile } from '@/services/contracts/evidence';
import type { InspectionAnswer } from '@/services/contracts/inspections';

/** A stored file as the contract shows it; where it lies in the store stays inside. */
export function describeFile(row: EvidenceRow): EvidenceFile {
  const { id, sha256, bytes, mediaType, name, kind, width, height, bits, pixelPitchUm, facts, admittedAt } = row;
  return {
    id,
    sha256,
    bytes,
    mediaType,
    name,
    kind,
    width,
    height,
    bits,
    pixelPitchUm,
    facts,
    hasPreview: row.previewKey !== null,
    hasPixels: row.packedKey !== null,
    admittedAt,
  };
}

export function describeLink(row: LinkedEvidence): InspectionAnswer['evidence'][number] {
  return {
    ...describeFile(row),
    role: row.role,
    view: row.view,
    registration: row.registration,
    linkedBy: row.linkedName,
    linkedAt: row.linkedAt,
  };
}

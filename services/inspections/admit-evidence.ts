import { newId } from '@/db/identity';
import { addEvidence, evidenceByDigest, type EvidenceRow } from '@/db/repositories/evidence';
import type { Work } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import type { admitEvidence as contract, EvidenceFile } from '@/services/contracts/evidence';
import type { QueryOf } from '@/services/contracts/operation';
import type { Recorded } from '@/services/http/route';
import { describeFile } from './describe-evidence';

/** What receiving a file found out; its bytes are in the store, under a key made from their digest. */
export type ReceivedFile = Pick<
  EvidenceRow,
  | 'sha256'
  | 'bytes'
  | 'mediaType'
  | 'width'
  | 'height'
  | 'bits'
  | 'pixelPitchUm'
  | 'facts'
  | 'storageKey'
  | 'previewKey'
  | 'packedKey'
>;

/** Enters a received file; the same bytes again answer 200 with the row that is there, and change nothing. */
export async function admitEvidence(
  work: Work & { readonly actor: Actor },
  query: QueryOf<typeof contract>,
  file: ReceivedFile,
): Promise<Recorded<EvidenceFile>> {
  const row: EvidenceRow = {
    ...file,
    id: newId(),
    name: query.name,
    kind: query.kind,
    admittedBy: work.actor.id,
    admittedAt: work.now,
  };
  const added = await addEvidence(work, row);
  const stored = added ? row : await evidenceByDigest(work, file.sha256);
  if (!stored) throw new Error('the evidence row just found is not there');
  const answer = describeFile(stored);
  if (!added) return { answer, status: 200, events: [] };
  return {
    answer,
    headers: { location: `/api/evidence/${row.id}` },
    events: [
      {
        subject: { kind: 'evidence', id: row.id },
        details: { sha256: row.sha256, bytes: row.bytes, mediaType: row.mediaType, name: row.name, kind: row.kind },
      },
    ],
  };
}

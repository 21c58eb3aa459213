import { customerMaySeeFile, evidenceById, type EvidenceRow } from '@/db/repositories/evidence';
import type { Reading } from '@/db/work';
import type { Actor } from '@/services/contracts/actor';
import { notFound } from '@/services/http/problem';

/**
 * A file the person may see: staff and auditors every one, a customer those of their own released parts where the
 * order line's clauses show images. What they may not see answers as what does not exist.
 */
export async function visibleEvidence(reading: Reading & { readonly actor: Actor }, evidenceId: string): Promise<EvidenceRow> {
  const file = await evidenceById(reading, evidenceId);
  if (!file) throw notFound('File');
  const { role, customerId } = reading.actor;
  if (role === 'customer-quality' && (customerId === null || !(await customerMaySeeFile(reading, evidenceId, customerId))))
    throw notFound('File');
  return file;
}

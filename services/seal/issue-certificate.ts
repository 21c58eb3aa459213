import { createHash } from 'node:crypto';
import type { CertificateRecord } from '../pdf/certificate-record';
import { layOutCertificate } from '../pdf/lay-out-certificate';
import type { TimeStamper } from './detached-cms';
import type { PlantKeys } from './plant-keys';
import { sealPdf, SealError } from './seal-pdf';

export interface IssuedCertificate {
  bytes: Uint8Array;
  /** SHA-256 of the sealed file, lower-case hex: store it, it is the surest check there is. */
  sha256: string;
  /** SHA-256 of the attached record, lower-case hex. */
  recordSha256: string;
  pageCount: number;
}

/**
 * Lays out and seals the certificate of a signed release. What the paper says of a time stamp must be what the seal has:
 * `record.timeStamp` is 'rfc3161' exactly when `timestamp` is given. Throws SealError, ZodError, MissingGlyphError, CodeError,
 * and whatever the time-stamping authority's client throws: the release then stays signed-not-issued.
 */
export async function issueCertificate(
  record: CertificateRecord,
  order: { keys: PlantKeys; sealedAt: Date; timestamp?: TimeStamper },
): Promise<IssuedCertificate> {
  if ((record.timeStamp === 'rfc3161') !== (order.timestamp !== undefined)) {
    throw new SealError('The record and the seal disagree about a time stamp');
  }
  const laidOut = await layOutCertificate(record);
  const bytes = await sealPdf(laidOut.bytes, order);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  return { bytes, sha256, recordSha256: laidOut.recordSha256, pageCount: laidOut.pageCount };
}

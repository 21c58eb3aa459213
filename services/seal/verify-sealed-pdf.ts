import { createHash, timingSafeEqual, verify, X509Certificate } from 'node:crypto';
import type { CertificateRecord } from '../pdf/certificate-record';
import { encodeCms, readCms, signedAttributes } from './detached-cms';
import type { ReadCms } from './detached-cms';
import { readSealedDocument } from './read-sealed-document';
import { findSeal } from './read-seal';
import type { FoundSeal } from './read-seal';

/** Why a file is not a valid sealed document of this plant. */
export type SealFault =
  | 'too-large'
  | 'not-a-pdf'
  | 'no-seal'
  | 'several-seals'
  | 'malformed-seal'
  | 'not-the-whole-file'
  | 'signer-not-from-this-plant'
  | 'signer-not-for-sealing'
  | 'signature-wrong'
  | 'signed-outside-certificate-validity'
  | 'time-stamp-wrong'
  | 'unexpected-content'
  | 'record-wrong'
  | 'not-the-issued-file';

export interface SealVerdict {
  /** 'altered': began as ours and is not as it was issued. 'not-sealed-here': nothing in it is of this plant. */
  state: 'valid' | 'altered' | 'not-sealed-here';
  /** SHA-256 of the file, lower-case hex; absent when it is too large to be read. */
  sha256?: string;
  number?: string;
  record?: CertificateRecord;
  /** The seal's own time; claimed by the plant unless `timeStamped`. */
  signedAt?: Date;
  timeStamped?: boolean;
  reasons: SealFault[];
}

export interface SealTrust {
  /** PEM of this plant's roots, present and past. */
  trustedRoots: readonly string[];
  /** SHA-256 stored at issue, hex. The surest check: give it whenever the certificate's number is known. */
  expectedSha256?: string;
  /** Judges an RFC 3161 token (DER) over a signature's SHA-256. Needed for time-stamped seals when no stored SHA-256 is given. */
  judgeTimeStamp?: (token: Uint8Array, digest: Uint8Array) => boolean | Promise<boolean>;
}

/** Largest file that is read; larger ones are answered without a look. */
export const mostSealedBytes = 32 * 1024 * 1024;

/**
 * Judges a file as a sealed document of this plant. Stricter than PDF readers, which call a file valid after a page overlay was
 * appended: one seal, one revision, every byte covered, the signature encoded as we encode it, the chain to a plant root, the
 * attached record whole. Nothing of the file but fixed text is interpreted before its signature has been found good.
 * Never throws on hostile bytes; throws only when a trusted root is no PEM certificate.
 */
export async function verifySealedPdf(file: Uint8Array, trust: SealTrust): Promise<SealVerdict> {
  if (file.length > mostSealedBytes) return { state: 'not-sealed-here', reasons: ['too-large'] };
  const bytes = Buffer.from(file.buffer, file.byteOffset, file.byteLength);
  const sha256 = createHash('sha256').update(bytes).digest('hex');
  const roots = trust.trustedRoots.map((pem) => new X509Certificate(pem));
  const refuse = (...reasons: SealFault[]): SealVerdict => ({
    state: beganHere(bytes, roots) || trust.expectedSha256 !== undefined ? 'altered' : 'not-sealed-here',
    sha256,
    reasons,
  });
  if (bytes.toString('latin1', 0, 5) !== '%PDF-') return refuse('not-a-pdf');
  const asIssued = trust.expectedSha256 === undefined ? undefined : sha256 === trust.expectedSha256.toLowerCase();
  const seal = findSeal(bytes);
  if (typeof seal === 'string') return refuse(seal);
  if (!seal.coversWholeFile) return refuse('not-the-whole-file');
  const signed = judgeSignature(bytes, seal, roots);
  if (typeof signed === 'string') return refuse(signed);
  const stamp = await judgeStamp(signed.cms, asIssued === true, trust);
  if (stamp === undefined) return refuse('time-stamp-wrong');

  const read = await readSealedDocument(bytes);
  if (typeof read === 'string') return refuse(read);
  if (!covers(signed.signer, read.signedAt)) return refuse('signed-outside-certificate-validity');
  // A token is not covered by the signature, so its absence would not show otherwise.
  if ((read.record.timeStamp === 'rfc3161') !== (stamp === 'good')) return refuse('time-stamp-wrong');
  if (asIssued === false) return refuse('not-the-issued-file');
  const { record, signedAt } = read;
  return { state: 'valid', sha256, number: record.number, record, signedAt, timeStamped: stamp === 'good', reasons: [] };
}

function judgeSignature(
  bytes: Buffer,
  seal: FoundSeal,
  roots: X509Certificate[],
): { cms: ReadCms; signer: X509Certificate } | SealFault {
  try {
    const cms = readCms(seal.cms);
    const root = roots.find((known) => cms.certificates.some((inside) => inside.equals(known.raw)));
    const sealCertificate = cms.certificates.find((inside) => root !== undefined && !inside.equals(root.raw));
    if (root === undefined || sealCertificate === undefined) return 'signer-not-from-this-plant';
    const signer = new X509Certificate(sealCertificate);
    if (!signer.checkIssued(root) || !signer.verify(root.publicKey)) return 'signer-not-from-this-plant';
    if (signer.ca || !isForSealing(signer)) return 'signer-not-for-sealing';
    const hash = createHash('sha256').update(bytes.subarray(0, seal.holeAt)).update(bytes.subarray(seal.holeEnd));
    const contentDigest = hash.digest();
    const attributes = signedAttributes(contentDigest, sealCertificate);
    if (!verify('sha256', attributes, signer.publicKey, cms.signature)) return 'signature-wrong';
    // The parts that no signature covers (order, algorithm fields, the outer frame) must be the ones we write.
    const timeStampToken = cms.timeStampToken;
    const parts = { contentDigest, sealCertificate, rootCertificate: root.raw, signature: cms.signature };
    const expected = encodeCms(timeStampToken === undefined ? parts : { ...parts, timeStampToken });
    if (expected.length !== seal.cms.length || !timingSafeEqual(expected, seal.cms)) return 'malformed-seal';
    return { cms, signer };
  } catch {
    return 'malformed-seal';
  }
}

/** 'none', 'good' or undefined (wrong). A token counts as good unseen only in the very file that was stored at issue. */
async function judgeStamp(cms: ReadCms, asIssued: boolean, trust: SealTrust): Promise<'none' | 'good' | undefined> {
  if (cms.timeStampToken === undefined) return 'none';
  if (asIssued) return 'good';
  try {
    const digest = createHash('sha256').update(cms.signature).digest();
    return (await trust.judgeTimeStamp?.(cms.timeStampToken, digest)) === true ? 'good' : undefined;
  } catch {
    return undefined;
  }
}

/** Document signing (RFC 9336), as our seal certificates name it. */
function isForSealing(certificate: X509Certificate): boolean {
  return certificate.keyUsage.includes('1.3.6.1.5.5.7.3.36');
}

function covers(certificate: X509Certificate, at: Date): boolean {
  return at >= new Date(certificate.validFrom) && at <= new Date(certificate.validTo);
}

/** A trace of this plant anywhere in the file: its root's public key, as the hex digits of a seal's certificate chain. */
function beganHere(bytes: Buffer, roots: X509Certificate[]): boolean {
  return roots.some((root) => {
    const key = root.publicKey.export({ type: 'spki', format: 'der' }).toString('hex');
    const serial = root.serialNumber.toLowerCase();
    return [key, serial, key.slice(-64)].some((trace) => bytes.indexOf(trace, 0, 'latin1') >= 0);
  });
}

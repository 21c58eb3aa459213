import { createHash } from 'node:crypto';
import { signDetached } from './detached-cms';
import type { TimeStamper } from './detached-cms';
import type { PlantKeys } from './plant-keys';
import { offsetPlaceholder, pdfTime } from './reserve-seal';

/** A document that cannot be sealed: no reserved seal, too little room, or a certificate that does not cover the time. */
export class SealError extends Error {
  constructor(fault: string) {
    super(fault);
    this.name = 'SealError';
  }
}

export interface SealOrder {
  keys: PlantKeys;
  /** The database server's time; stands in the seal as /M. */
  sealedAt: Date;
  timestamp?: TimeStamper;
}

/**
 * Fills the reserved seal of a document: PAdES baseline B (ETSI EN 319 142-1), or T when an authority time-stamps it.
 * Everything but the signature's own hex digits is signed. Throws SealError; passes on what the time-stamping authority throws.
 */
export async function sealPdf(unsealed: Uint8Array, order: SealOrder): Promise<Uint8Array> {
  if (order.sealedAt >= order.keys.sealNotAfter) throw new SealError('The seal certificate has ended');
  const bytes = Buffer.from(unsealed);
  const range = `[ 0 ${offsetPlaceholder} ${offsetPlaceholder} ${offsetPlaceholder} ]`;
  const rangeAt = onlyPlaceOf(bytes, `/ByteRange ${range}`) + '/ByteRange '.length;
  const holeAt = bytes.indexOf('/Contents <', rangeAt, 'latin1') + '/Contents '.length;
  const holeEnd = bytes.indexOf('>', holeAt, 'latin1') + 1;
  const timeAt = bytes.indexOf('/M (D:', holeEnd, 'latin1') + '/M ('.length;
  if (holeAt <= rangeAt || holeEnd <= holeAt || timeAt <= holeEnd) throw new SealError('The reserved seal is incomplete');

  const filled = `[ 0 ${holeAt} ${holeEnd} ${bytes.length - holeEnd}`;
  bytes.write(`${filled.padEnd(range.length - 1)}]`, rangeAt, 'latin1');
  bytes.write(pdfTime(order.sealedAt), timeAt, 'latin1');
  const digest = createHash('sha256').update(bytes.subarray(0, holeAt)).update(bytes.subarray(holeEnd)).digest();
  const { sealCertificate, rootCertificate, sealPrivateKey } = order.keys;
  const cms = await signDetached(digest, { sealCertificate, rootCertificate, privateKey: sealPrivateKey }, order.timestamp);
  const roomBytes = (holeEnd - holeAt - 2) / 2;
  if (cms.length > roomBytes) throw new SealError(`The seal needs ${cms.length} bytes; ${roomBytes} were reserved`);
  bytes.write(cms.toString('hex').padEnd(roomBytes * 2, '0'), holeAt + 1, 'latin1');
  return bytes;
}

function onlyPlaceOf(bytes: Buffer, text: string): number {
  const place = bytes.indexOf(text, 0, 'latin1');
  if (place < 0 || bytes.indexOf(text, place + 1, 'latin1') >= 0)
    throw new SealError('The document holds no single reserved seal');
  return place;
}

import { createHash, sign } from 'node:crypto';
import type { KeyObject } from 'node:crypto';
import { der, objectIdentifier, octets, readElement, readMembers, sequence, setOf, smallInteger, tags } from './der';

/** Object identifiers of RFC 5652, RFC 5035, RFC 5758 and RFC 3161. */
const identifiers = {
  data: '1.2.840.113549.1.7.1',
  signedData: '1.2.840.113549.1.7.2',
  contentType: '1.2.840.113549.1.9.3',
  messageDigest: '1.2.840.113549.1.9.4',
  signingCertificateV2: '1.2.840.113549.1.9.16.2.47',
  timeStampToken: '1.2.840.113549.1.9.16.2.14',
  sha256: '2.16.840.1.101.3.4.2.1',
  ecdsaWithSha256: '1.2.840.10045.4.3.2',
};

/** Asks a time-stamping authority for an RFC 3161 token (DER) over a SHA-256 digest (32 bytes). A failure must throw. */
export type TimeStamper = (digest: Uint8Array) => Promise<Uint8Array>;

export interface CmsParts {
  /** SHA-256 of the bytes that are signed, 32 bytes. */
  contentDigest: Buffer;
  sealCertificate: Buffer;
  rootCertificate: Buffer;
  /** ECDSA over `signedAttributes`, DER. */
  signature: Buffer;
  timeStampToken?: Buffer;
}

/** Issuer name and serial number of a certificate, as they stand in its DER (RFC 5280, 4.1). */
function issuerAndSerial(certificate: Buffer): { issuer: Buffer; serial: Buffer } {
  const [body] = readMembers(readElement(certificate));
  const fields = body === undefined ? [] : readMembers(body);
  const [, serial, , issuer] = fields;
  if (serial?.tag !== tags.integer || issuer?.tag !== tags.sequence)
    throw new TypeError('The seal certificate is not version 3 DER');
  return { issuer: issuer.bytes, serial: serial.bytes };
}

/**
 * The attributes that are signed, as a SET: content type, message digest and ESS signing-certificate-v2 (which binds the
 * certificate, and without which a signature is no CAdES). No signing-time: in a PDF that is /M (ETSI EN 319 142-1, 6.3).
 */
export function signedAttributes(contentDigest: Buffer, sealCertificate: Buffer): Buffer {
  const { issuer, serial } = issuerAndSerial(sealCertificate);
  const certificateDigest = createHash('sha256').update(sealCertificate).digest();
  const generalNames = sequence(der(0xa4, issuer));
  const essCertificate = sequence(octets(certificateDigest), sequence(generalNames, serial));
  return setOf(
    sequence(objectIdentifier(identifiers.contentType), setOf(objectIdentifier(identifiers.data))),
    sequence(objectIdentifier(identifiers.messageDigest), setOf(octets(contentDigest))),
    sequence(objectIdentifier(identifiers.signingCertificateV2), setOf(sequence(sequence(essCertificate)))),
  );
}

/** The one encoding of these parts: SignedData with detached content, one signer, seal certificate and root. */
export function encodeCms(parts: CmsParts): Buffer {
  const { issuer, serial } = issuerAndSerial(parts.sealCertificate);
  const sha256 = sequence(objectIdentifier(identifiers.sha256));
  const attributes = readElement(signedAttributes(parts.contentDigest, parts.sealCertificate)).content;
  const unsigned =
    parts.timeStampToken === undefined
      ? []
      : [der(0xa1, sequence(objectIdentifier(identifiers.timeStampToken), setOf(parts.timeStampToken)))];
  const signer = sequence(
    smallInteger(1),
    sequence(issuer, serial),
    sha256,
    der(0xa0, attributes),
    sequence(objectIdentifier(identifiers.ecdsaWithSha256)),
    octets(parts.signature),
    ...unsigned,
  );
  const certificates = [parts.sealCertificate, parts.rootCertificate].sort(Buffer.compare);
  const signedData = sequence(
    smallInteger(1),
    setOf(sha256),
    sequence(objectIdentifier(identifiers.data)),
    der(0xa0, ...certificates),
    setOf(signer),
  );
  return sequence(objectIdentifier(identifiers.signedData), der(0xa0, signedData));
}

/**
 * Signs a digest with the seal key (EC P-256) and, when an authority is given, has the signature time-stamped.
 * The authority's failure is thrown on: a token is never left out in silence.
 */
export async function signDetached(
  contentDigest: Buffer,
  key: { sealCertificate: Buffer; rootCertificate: Buffer; privateKey: KeyObject },
  timestamp?: TimeStamper,
): Promise<Buffer> {
  const { sealCertificate, rootCertificate, privateKey } = key;
  const signature = sign('sha256', signedAttributes(contentDigest, sealCertificate), privateKey);
  const parts = { contentDigest, sealCertificate, rootCertificate, signature };
  if (timestamp === undefined) return encodeCms(parts);
  const token = await timestamp(createHash('sha256').update(signature).digest());
  return encodeCms({ ...parts, timeStampToken: Buffer.from(token) });
}

export interface ReadCms {
  certificates: Buffer[];
  signature: Buffer;
  timeStampToken: Buffer | undefined;
}

/** Takes a signature of ours apart. Throws DerError or TypeError on anything `encodeCms` does not write; judges nothing. */
export function readCms(bytes: Buffer): ReadCms {
  const [, wrapper] = readMembers(readElement(bytes));
  const [signedData] = wrapper === undefined ? [] : readMembers(wrapper);
  const [, , , certificates, signers] = signedData === undefined ? [] : readMembers(signedData);
  const [signer] = signers === undefined ? [] : readMembers(signers);
  if (certificates?.tag !== 0xa0 || signer === undefined) throw new TypeError('The seal holds no certificates or no signer');
  const [, , , , , signature, unsigned] = readMembers(signer);
  if (signature?.tag !== tags.octetString) throw new TypeError('The seal holds no signature');
  return {
    certificates: readMembers(certificates).map((member) => member.bytes),
    signature: signature.content,
    timeStampToken: unsigned === undefined ? undefined : tokenIn(unsigned.bytes),
  };
}

function tokenIn(unsigned: Buffer): Buffer {
  const [attribute] = readMembers(readElement(unsigned));
  const [, values] = attribute === undefined ? [] : readMembers(attribute);
  const [token] = values === undefined ? [] : readMembers(values);
  if (token === undefined) throw new TypeError('The seal holds an empty time stamp');
  return token.bytes;
}

// @peculiar/x509 resolves its parts through decorators, which need this loaded first.
import 'reflect-metadata';
import { KeyObject, randomBytes, webcrypto } from 'node:crypto';
import type { X509Certificate } from 'node:crypto';
import * as x509 from '@peculiar/x509';

export interface MadeKey {
  certificatePem: string;
  privateKey: KeyObject;
}

const algorithm = { name: 'ECDSA', namedCurve: 'P-256', hash: 'SHA-256' };
/** RFC 9336: a key for signing documents. Common readers do not know it yet, so e-mail protection stands beside it. */
const documentSigning = '1.3.6.1.5.5.7.3.36';

/** Backdating, so that a reader whose clock is a little slow does not find a certificate that is not yet valid. */
const backdatedMs = 3_600_000;

/** A self-signed root of the plant, valid ten years. */
export async function makeRoot(plantName: string, now: Date): Promise<MadeKey> {
  const keys = await webcrypto.subtle.generateKey(algorithm, true, ['sign', 'verify']);
  const certificate = await x509.X509CertificateGenerator.createSelfSigned({
    serialNumber: randomSerial(),
    name: distinguishedName(plantName, 'record root'),
    ...validity(now, 10),
    signingAlgorithm: algorithm,
    keys,
    extensions: [
      new x509.BasicConstraintsExtension(true, 0, true),
      new x509.KeyUsagesExtension(x509.KeyUsageFlags.keyCertSign | x509.KeyUsageFlags.cRLSign, true),
      await x509.SubjectKeyIdentifierExtension.create(keys.publicKey),
    ],
  });
  return { certificatePem: `${certificate.toString('pem')}\n`, privateKey: KeyObject.from(keys.privateKey) };
}

/** A certificate for sealing documents, valid two years (never beyond its root), issued by the plant's root. */
export async function makeSealCertificate(
  plantName: string,
  now: Date,
  root: { certificate: X509Certificate; privateKey: KeyObject },
): Promise<MadeKey> {
  const issuer = new x509.X509Certificate(root.certificate.raw);
  const pkcs8 = root.privateKey.export({ type: 'pkcs8', format: 'der' });
  const signingKey = await webcrypto.subtle.importKey('pkcs8', pkcs8, algorithm, false, ['sign']);
  const keys = await webcrypto.subtle.generateKey(algorithm, true, ['sign', 'verify']);
  const { notBefore, notAfter } = validity(now, 2);
  const certificate = await x509.X509CertificateGenerator.create({
    serialNumber: randomSerial(),
    subject: distinguishedName(plantName, 'certificate seal'),
    // The very name, not its text: other programs compare issuer and subject byte by byte.
    issuer: issuer.subjectName,
    notBefore,
    notAfter: notAfter < issuer.notAfter ? notAfter : issuer.notAfter,
    signingAlgorithm: algorithm,
    publicKey: keys.publicKey,
    signingKey,
    extensions: [
      new x509.BasicConstraintsExtension(false, undefined, true),
      new x509.KeyUsagesExtension(x509.KeyUsageFlags.digitalSignature | x509.KeyUsageFlags.nonRepudiation, true),
      new x509.ExtendedKeyUsageExtension([documentSigning, x509.ExtendedKeyUsage.emailProtection]),
      await x509.SubjectKeyIdentifierExtension.create(keys.publicKey),
      await x509.AuthorityKeyIdentifierExtension.create(issuer),
    ],
  });
  return { certificatePem: `${certificate.toString('pem')}\n`, privateKey: KeyObject.from(keys.privateKey) };
}

function distinguishedName(plantName: string, use: string): x509.JsonName {
  // RFC 5280, appendix A: both at most 64 characters.
  const organisation = plantName.slice(0, 64);
  return [{ O: [organisation] }, { CN: [`${plantName.slice(0, 63 - use.length)} ${use}`] }];
}

function validity(now: Date, years: number): { notBefore: Date; notAfter: Date } {
  const notBefore = new Date(now.getTime() - backdatedMs);
  const notAfter = new Date(notBefore);
  notAfter.setUTCFullYear(notAfter.getUTCFullYear() + years);
  return { notBefore, notAfter };
}

/** 128 random bits, positive (RFC 5280, 4.1.2.2). */
function randomSerial(): string {
  const bytes = randomBytes(16);
  bytes[0] = ((bytes[0] ?? 0) & 0x7f) | 0x40;
  return bytes.toString('hex');
}

import { execFileSync } from 'node:child_process';
import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, expect, test } from 'vitest';
import { encodeCms, readCms } from '@/services/seal/detached-cms';
import { issueCertificate } from '@/services/seal/issue-certificate';
import { openPlantKeys } from '@/services/seal/plant-keys';
import type { PlantKeys } from '@/services/seal/plant-keys';
import { verifySealedPdf } from '@/services/seal/verify-sealed-pdf';
import { dropFolder, freshFolder, judge, needPrograms, putFile, signatureIn, trustStore } from './certificate-outside-judges';
import { exampleRecord } from './certificate-pdf-example';

// The authority here is OpenSSL's own RFC 3161 responder with a certificate for time stamping alone (RFC 3161, 2.3).
const now = new Date('2026-03-09T12:00:00Z');
const record = { ...exampleRecord({ serials: 2 }), timeStamp: 'rfc3161' as const };
let folder: string;
let keys: PlantKeys;

beforeAll(async () => {
  folder = freshFolder();
  keys = await openPlantKeys({
    folder: `${folder}/keys`,
    passphrase: 'a passphrase for tests',
    plantName: 'Harrow Vale Castings',
    now,
  });
});
afterAll(() => dropFolder(folder));

function openssl(...args: string[]): void {
  execFileSync('openssl', args, { cwd: folder, stdio: 'pipe' });
}

/** Makes the authority; answers its time-stamper and a judge of its tokens. */
function authority() {
  const settings = [
    '[tsa]', 'serial = tsa.serial', 'crypto_device = builtin', 'signer_cert = tsa.pem', 'signer_key = tsa.key', 'signer_digest = sha256',
    'default_policy = 1.3.6.1.4.1.99999.1', 'digests = sha256', 'accuracy = secs:1', 'ess_cert_id_alg = sha256', '[req]', 'distinguished_name = dn',
    '[dn]', '[ext]', 'extendedKeyUsage = critical,timeStamping', 'keyUsage = critical,digitalSignature', 'basicConstraints = CA:FALSE',
  ]; // prettier-ignore
  putFile(folder, 'tsa.cnf', `${settings.join('\n')}\n`);
  putFile(folder, 'tsa.serial', '01\n');
  openssl('req', '-x509', '-newkey', 'rsa:2048', '-nodes', '-keyout', 'tsa.key', '-out', 'tsa.pem', '-subj', '/CN=Test authority', '-days', '30', '-config', 'tsa.cnf', '-extensions', 'ext'); // prettier-ignore
  const hex = (digest: Uint8Array) => Buffer.from(digest).toString('hex');
  const stamp = async (digest: Uint8Array) => {
    openssl('ts', '-query', '-digest', hex(digest), '-sha256', '-cert', '-out', 'query.tsq');
    openssl(
      'ts',
      '-reply',
      '-config',
      'tsa.cnf',
      '-section',
      'tsa',
      '-queryfile',
      'query.tsq',
      '-token_out',
      '-out',
      'token.der',
    );
    return readFileSync(`${folder}/token.der`);
  };
  const judgeToken = (token: Uint8Array, digest: Uint8Array) => {
    const file = putFile(folder, 'judged.der', token);
    const asked = judge(
      'openssl',
      'ts',
      '-verify',
      '-digest',
      hex(digest),
      '-in',
      file,
      '-token_in',
      '-CAfile',
      `${folder}/tsa.pem`,
    );
    return asked.status === 0;
  };
  return { stamp, judgeToken };
}

test('a seal with an RFC 3161 token is valid for pdfsig and for us, and only the authority’s judge or the stored digest vouches for it', async (context) => {
  needPrograms(context, 'openssl', 'pdfsig', 'certutil', 'pdftotext');
  const { stamp, judgeToken } = authority();
  const issued = await issueCertificate(record, { keys, sealedAt: now, timestamp: stamp });
  const trust = { trustedRoots: [keys.rootCertificatePem] };
  const file = putFile(folder, 'stamped.pdf', issued.bytes);
  expect(judge('pdfsig', '-nssdir', trustStore(folder, keys.rootCertificatePem), file).said).toContain('Signature is Valid.');
  expect(judge('pdftotext', '-l', '1', file, '-').said).toContain('RFC 3161');

  const judged = await verifySealedPdf(issued.bytes, { ...trust, judgeTimeStamp: judgeToken });
  expect(judged).toMatchObject({ state: 'valid', timeStamped: true });
  expect(await verifySealedPdf(issued.bytes, { ...trust, expectedSha256: issued.sha256 })).toMatchObject({ state: 'valid' });
  expect(await verifySealedPdf(issued.bytes, trust)).toMatchObject({ state: 'altered', reasons: ['time-stamp-wrong'] });
  expect(judgeToken(readFileSync(`${folder}/token.der`), new Uint8Array(32))).toBe(false);
});

test('a token that was taken out of a seal is missed', async (context) => {
  needPrograms(context, 'openssl');
  const issued = await issueCertificate(record, { keys, sealedAt: now, timestamp: authority().stamp });
  const { holeAt, holeEnd, cms, signed } = signatureIn(issued.bytes);
  const bare = encodeCms({
    contentDigest: createHash('sha256').update(signed).digest(),
    sealCertificate: keys.sealCertificate,
    rootCertificate: keys.rootCertificate,
    signature: readCms(cms).signature,
  });
  const stripped = Buffer.from(issued.bytes);
  stripped.write(bare.toString('hex').padEnd(holeEnd - holeAt - 2, '0'), holeAt + 1, 'latin1');
  const found = await verifySealedPdf(stripped, { trustedRoots: [keys.rootCertificatePem] });
  expect(found).toMatchObject({ state: 'altered', reasons: ['time-stamp-wrong'] });
});

test('an authority that is down stops the issue; a paper and a seal that disagree about a time stamp are never made', async () => {
  const down = () => Promise.reject(new Error('no answer from the authority'));
  await expect(issueCertificate(record, { keys, sealedAt: now, timestamp: down })).rejects.toThrow('no answer');
  await expect(issueCertificate(record, { keys, sealedAt: now })).rejects.toThrow('disagree');
  const unstamped = { ...record, timeStamp: 'none' as const };
  await expect(issueCertificate(unstamped, { keys, sealedAt: now, timestamp: down })).rejects.toThrow('disagree');
});

import { createPrivateKey, X509Certificate } from 'node:crypto';
import { readFileSync } from 'node:fs';
import path from 'node:path';
import { PDFDocument } from 'pdf-lib';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { certificateRecordBytes } from '@/services/pdf/certificate-record';
import { layOutCertificate } from '@/services/pdf/lay-out-certificate';
import { issueCertificate } from '@/services/seal/issue-certificate';
import type { IssuedCertificate } from '@/services/seal/issue-certificate';
import { openPlantKeys } from '@/services/seal/plant-keys';
import type { PlantKeys } from '@/services/seal/plant-keys';
import { reserveSeal, reserveSealReference } from '@/services/seal/reserve-seal';
import { sealPdf } from '@/services/seal/seal-pdf';
import { mostSealedBytes, verifySealedPdf } from '@/services/seal/verify-sealed-pdf';
import { dropFolder, freshFolder, judge, needPrograms, putFile, signatureIn, trustStore } from './certificate-outside-judges';
import { exampleRecord } from './certificate-pdf-example';

const passphrase = 'a passphrase for tests';
const now = new Date('2026-03-09T12:00:00Z');
const record = exampleRecord({ serials: 4 });
let folder: string;
let keys: PlantKeys;
let issued: IssuedCertificate;

function plant(name: string, plantName: string): Promise<PlantKeys> {
  return openPlantKeys({ folder: `${folder}/${name}`, passphrase, plantName, now });
}

function verdict(file: Uint8Array) {
  return verifySealedPdf(file, { trustedRoots: [keys.rootCertificatePem] });
}

/** A small seeded generator (mulberry32), so that a failing change can be repeated. */
function generator(seed: number): (below: number) => number {
  let state = seed;
  return (below) => {
    state = (state + 0x6d2b79f5) | 0;
    let mixed = Math.imul(state ^ (state >>> 15), 1 | state);
    mixed = (mixed + Math.imul(mixed ^ (mixed >>> 7), 61 | mixed)) ^ mixed;
    return ((mixed ^ (mixed >>> 14)) >>> 0) % below;
  };
}

function changed(file: Uint8Array, at: number, to: number): Buffer {
  const copy = Buffer.from(file);
  copy[at] = to;
  return copy;
}

/** What an attacker adds without touching a signed byte: the first page again, with words over it, as a new revision. */
async function withOverlay(file: Uint8Array): Promise<Buffer> {
  const bytes = Buffer.from(file);
  const document = await PDFDocument.load(bytes, { updateMetadata: false });
  const page = document.getPage(0);
  const next = document.context.largestObjectNumber + 1;
  const text = 'BT 1 0 0 rg 12 0 0 12 80 400 Tm ET 100 380 300 40 re f';
  const kept = page.node.toString().replace(/\/Contents [^\n]+/, `/Contents ${next} 0 R`);
  const overlay = `${next} 0 obj\n<< /Length ${text.length} >>\nstream\n${text}\nendstream\nendobj\n`;
  const redone = `${page.ref.objectNumber} 0 obj\n${kept}\nendobj\n`;
  const offset = (at: number) => `${String(at).padStart(10, '0')} 00000 n \n`;
  const start = bytes.length + 1;
  const table = `xref\n${page.ref.objectNumber} 1\n${offset(start + overlay.length)}${next} 1\n${offset(start)}`;
  const previous = bytes.toString('latin1').match(/startxref\s+(\d+)/)?.[1] ?? '';
  const trailer = `trailer\n<< /Size ${next + 1} /Root ${document.context.trailerInfo.Root?.toString()} /Prev ${previous} >>\n`;
  const end = `startxref\n${start + overlay.length + redone.length}\n%%EOF\n`;
  return Buffer.concat([bytes, Buffer.from(`\n${overlay}${redone}${table}${trailer}${end}`, 'latin1')]);
}

/** A blank page with files attached, sealed with the plant's key. */
async function sealedWith(files: [name: string, text: string][]): Promise<Uint8Array> {
  const document = await PDFDocument.create({ updateMetadata: false });
  const reference = reserveSealReference(document);
  document.addPage();
  for (const [name, text] of files) await document.attach(new TextEncoder().encode(text), name);
  reserveSeal(document, reference, { name: 'Plant', reason: 'Test', location: 'Here', at: now, roomBytes: 6_000 });
  return sealPdf(await document.save({ useObjectStreams: false }), { keys, sealedAt: now });
}

beforeAll(async () => {
  folder = freshFolder();
  keys = await plant('keys', 'Harrow Vale Castings');
  issued = await issueCertificate(record, { keys, sealedAt: now });
});
afterAll(() => dropFolder(folder));

describe('ordinary tools call a sealed certificate valid', () => {
  test('pdfsig (poppler, NSS): valid, trusted, the whole document, CAdES', (context) => {
    needPrograms(context, 'pdfsig', 'certutil');
    const store = trustStore(folder, keys.rootCertificatePem);
    const { said } = judge('pdfsig', '-nssdir', store, putFile(folder, 'sealed.pdf', issued.bytes));
    expect(said).toContain('Signature is Valid.');
    expect(said).toContain('Certificate is Trusted.');
    expect(said).toContain('Total document signed');
    expect(said).toContain('ETSI.CAdES.detached');
    expect(said).not.toContain('Signature #2');
    const { holeAt } = signatureIn(issued.bytes);
    const altered = putFile(folder, 'altered.pdf', changed(issued.bytes, holeAt - 200, 0x20));
    expect(judge('pdfsig', '-nssdir', store, altered).said).not.toContain('Signature is Valid.');
  });

  test('qpdf --check finds no fault', (context) => {
    needPrograms(context, 'qpdf');
    const { status, said } = judge('qpdf', '--check', putFile(folder, 'checked.pdf', issued.bytes));
    expect(said).not.toContain('WARNING');
    expect(status).toBe(0);
  });

  test('openssl cms -verify -cades accepts the signature and refuses it over one changed byte', (context) => {
    needPrograms(context, 'openssl');
    const { cms, signed } = signatureIn(issued.bytes);
    const root = putFile(folder, 'root.pem', keys.rootCertificatePem);
    const verifyOver = (content: Uint8Array) =>
      judge(
        'openssl', 'cms', '-verify', '-cades', '-binary', '-inform', 'DER', '-in', putFile(folder, 'seal.der', cms),
        '-content', putFile(folder, 'signed.bin', content), '-CAfile', root, '-purpose', 'any', '-attime', String(now.getTime() / 1000),
        '-out', `${folder}/out`,
      ); // prettier-ignore
    expect(verifyOver(signed)).toMatchObject({ status: 0, said: expect.stringContaining('CAdES Verification successful') });
    expect(verifyOver(changed(signed, 100, 0x7e)).status).not.toBe(0);
  });
});

describe('our own verifier', () => {
  test('calls it valid, with number, record, time and the digest to store', async () => {
    const found = await verdict(issued.bytes);
    expect(found).toEqual({
      state: 'valid',
      sha256: issued.sha256,
      number: record.number,
      record,
      signedAt: now,
      timeStamped: false,
      reasons: [],
    });
  });

  test('finds each of 300 random single-byte changes', async () => {
    const random = generator(20_260_309);
    const missed: string[] = [];
    for (let count = 0; count < 300; count++) {
      const at = random(issued.bytes.length);
      const to = ((issued.bytes[at] ?? 0) + 1 + random(255)) % 256;
      const { state } = await verdict(changed(issued.bytes, at, to));
      if (state === 'valid') missed.push(`${at} → ${to}`);
    }
    expect(missed).toEqual([]);
  });

  test('finds any changed digit of the signature itself, the unused room and the case of its letters included', async () => {
    const { holeAt, holeEnd, cms } = signatureIn(issued.bytes);
    const missed: number[] = [];
    for (let at = holeAt; at < holeEnd; at += at < holeAt + cms.length * 2 ? 7 : 997) {
      const old = issued.bytes[at] ?? 0;
      const letter = old >= 0x61 && old <= 0x66;
      const to = letter ? old - 0x20 : old === 0x30 ? 0x31 : 0x30;
      if ((await verdict(changed(issued.bytes, at, to))).state === 'valid') missed.push(at);
    }
    expect(missed).toEqual([]);
  });

  test('refuses an overlay appended as a new revision, which pdfsig still calls a valid signature', async (context) => {
    const overlaid = await withOverlay(issued.bytes);
    expect(await verdict(overlaid)).toMatchObject({ state: 'altered', reasons: ['not-the-whole-file'] });
    needPrograms(context, 'pdfsig', 'qpdf');
    const file = putFile(folder, 'overlaid.pdf', overlaid);
    expect(judge('pdfsig', '-nocert', file).said).toContain('Signature is Valid.');
    expect(judge('qpdf', '--check', file).status).toBe(0);
  });

  test('refuses a file cut anywhere, and knows it for one of ours once the seal was reached', async () => {
    const { holeEnd } = signatureIn(issued.bytes);
    for (let length = 0; length < issued.bytes.length; length += 1009) {
      const found = await verdict(issued.bytes.subarray(0, length));
      expect(found.state).not.toBe('valid');
      if (length > holeEnd) expect(found.state).toBe('altered');
    }
    expect((await verdict(issued.bytes.subarray(0, -1))).state).toBe('altered');
  });

  test('refuses a certificate saved anew by another program', async () => {
    const document = await PDFDocument.load(issued.bytes);
    expect((await verdict(await document.save({ useObjectStreams: false }))).state).toBe('altered');
  });

  test('refuses the seal of another plant, even one that bears our name', async () => {
    const foreign = await issueCertificate(record, { keys: await plant('foreign', 'Another Foundry'), sealedAt: now });
    expect(await verdict(foreign.bytes)).toMatchObject({ state: 'not-sealed-here', reasons: ['signer-not-from-this-plant'] });
    const impostor = await plant('impostor', 'Harrow Vale Castings');
    const alone = await issueCertificate(record, { keys: impostor, sealedAt: now });
    expect((await verdict(alone.bytes)).state).toBe('not-sealed-here');
    const withOurRoot = { ...impostor, rootCertificate: keys.rootCertificate };
    const forged = await issueCertificate(record, { keys: withOurRoot, sealedAt: now });
    expect(await verdict(forged.bytes)).toMatchObject({ state: 'altered', reasons: ['signer-not-from-this-plant'] });
  });

  test('refuses a signature made with the root’s own key', async () => {
    const rootKey = createPrivateKey({ key: readFileSync(`${folder}/keys/root/key.pem`), passphrase });
    const asRoot = { ...keys, sealCertificate: keys.rootCertificate, sealPrivateKey: rootKey };
    const { bytes } = await layOutCertificate(record);
    const found = await verdict(await sealPdf(bytes, { keys: asRoot, sealedAt: now }));
    expect(found).toMatchObject({ state: 'altered', reasons: ['signer-not-from-this-plant'] });
  });

  test('refuses a certificate of our root that is not for sealing documents', async (context) => {
    needPrograms(context, 'openssl');
    const at = (name: string) => path.join(folder, name);
    const run = (...args: string[]) => expect(judge('openssl', ...args).status).toBe(0);
    run('req', '-new', '-newkey', 'ec', '-pkeyopt', 'ec_paramgen_curve:P-256', '-nodes', '-keyout', at('mail.key'), '-out', at('mail.csr'), '-subj', '/CN=Mail only'); // prettier-ignore
    const use = putFile(folder, 'mail.ext', 'extendedKeyUsage = emailProtection\nbasicConstraints = CA:FALSE\n');
    run('x509', '-req', '-in', at('mail.csr'), '-CA', at('keys/root/certificate.pem'), '-CAkey', at('keys/root/key.pem'), '-passin', `pass:${passphrase}`, '-CAcreateserial', '-extfile', use, '-days', '30', '-out', at('mail.pem')); // prettier-ignore
    const sealCertificate = new X509Certificate(readFileSync(at('mail.pem'))).raw;
    const asMail = { ...keys, sealCertificate, sealPrivateKey: createPrivateKey(readFileSync(at('mail.key'))) };
    const { bytes } = await issueCertificate(record, { keys: asMail, sealedAt: now });
    expect(await verdict(bytes)).toMatchObject({ state: 'altered', reasons: ['signer-not-for-sealing'] });
  });

  test('refuses what the plant’s key sealed but is no certificate: no record, a second file, a record under another name', async () => {
    const text = new TextDecoder().decode(certificateRecordBytes(record));
    const named = `${record.number}.json`;
    expect(await verdict(await sealedWith([[named, text]]))).toMatchObject({ state: 'valid' });
    expect((await verdict(await sealedWith([]))).reasons).toEqual(['record-wrong']);
    expect((await verdict(await sealedWith([[named, text], ['more.json', '{}']]))).reasons).toEqual(['unexpected-content']); // prettier-ignore
    expect((await verdict(await sealedWith([['other.json', text]]))).reasons).toEqual(['record-wrong']);
    expect((await verdict(await sealedWith([[named, `${text} `]]))).reasons).toEqual(['record-wrong']);
    expect((await verdict(await sealedWith([[named, text.replace('"accept"', '"reject"')]]))).reasons).toEqual(['record-wrong']);
  });

  test('refuses a seal dated outside its certificate', async () => {
    const early = await issueCertificate(record, { keys, sealedAt: new Date('2026-03-01T00:00:00Z') });
    expect((await verdict(early.bytes)).reasons).toEqual(['signed-outside-certificate-validity']);
    const late = issueCertificate(record, { keys, sealedAt: new Date('2029-01-01T00:00:00Z') });
    await expect(late).rejects.toThrow('has ended');
  });

  test('refuses another genuine certificate in the place of the one that was issued', async () => {
    const other = await issueCertificate(exampleRecord({ serials: 5 }), { keys, sealedAt: now });
    const found = await verifySealedPdf(other.bytes, { trustedRoots: [keys.rootCertificatePem], expectedSha256: issued.sha256 });
    expect(found).toMatchObject({ state: 'altered', reasons: ['not-the-issued-file'] });
  });

  test('says of an unsealed document and of strange files that they were not sealed here, quickly and without a crash', async () => {
    const { bytes } = await layOutCertificate(record);
    const head = Buffer.from('%PDF-1.7\n');
    const strange: Uint8Array[] = [
      bytes,
      new Uint8Array(),
      head,
      Buffer.alloc(mostSealedBytes + 1),
      Buffer.concat([head, Buffer.alloc(4_000_000, '/ByteRange ')]),
      Buffer.concat([head, Buffer.from('/ByteRange [ 0 9 9 9 ]')]),
      Buffer.concat([head, Buffer.from('/ByteRange [ 0 9999999999 1 1 ]')]),
      Buffer.concat([head, Buffer.from('/ByteRange [ 0 40 48 2 ]          <3082ff>ab')]),
      Buffer.concat([head, Buffer.alloc(4_000_000, '[<<(')]),
    ];
    const begun = performance.now();
    for (const file of strange) expect((await verdict(file)).state).toBe('not-sealed-here');
    expect(performance.now() - begun).toBeLessThan(5_000);
  });
});

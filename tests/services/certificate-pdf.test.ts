import { createHash } from 'node:crypto';
import { readFileSync } from 'node:fs';
import { afterAll, beforeAll, describe, expect, test } from 'vitest';
import { MissingGlyphError } from '@/services/pdf/certificate-fonts';
import { certificateRecordBytes } from '@/services/pdf/certificate-record';
import type { CertificateRecord } from '@/services/pdf/certificate-record';
import { layOutCertificate } from '@/services/pdf/lay-out-certificate';
import { dropFolder, freshFolder, judge, needPrograms, putFile } from './certificate-outside-judges';
import { exampleRecord } from './certificate-pdf-example';

let folder: string;
beforeAll(() => {
  folder = freshFolder();
});
afterAll(() => dropFolder(folder));

async function laidOut(record: CertificateRecord, name: string): Promise<{ file: string; pageCount: number }> {
  const { bytes, pageCount } = await layOutCertificate(record);
  return { file: putFile(folder, name, bytes), pageCount };
}

/** The text of a PDF in reading order, spaces made single (poppler). */
function textOf(file: string, ...args: string[]): string {
  return judge('pdftotext', '-layout', ...args, file, '-').printed.replace(/\s+/g, ' ');
}

/** A record whose every field is as long as may be: nothing may leave the sheet. */
function longestRecord(): CertificateRecord {
  const record = exampleRecord({ serials: 3, number: 'COC-2026-000417-WMWMWMWM' });
  const long = (most: number) => 'Wärmebehandlungs-Prüfmittelüberwachung 0O1lI5S ≥ '.repeat(40).slice(0, most).trim();
  const unbroken = (most: number) => 'W0O1lI5SMQ'.repeat(20).slice(0, most);
  return {
    ...record,
    plant: { name: long(120), address: Array.from({ length: 5 }, () => long(80)) },
    customer: { name: long(120), address: Array.from({ length: 5 }, () => long(80)) },
    order: { number: unbroken(80), purchaseOrder: unbroken(80), line: unbroken(20) },
    part: { number: unbroken(80), title: long(200) },
    drawing: { number: unbroken(80), revision: unbroken(20) },
    planIssue: unbroken(40),
    statement: long(1500),
    signatory: { ...record.signatory, name: long(120), function: unbroken(120) },
    caution: long(600),
    checkCode: unbroken(40).toUpperCase(),
    clauses: [{ code: unbroken(40), text: long(600) }],
    serials: record.serials.map((part, index) => ({
      ...part,
      serial: `${unbroken(39)}${index}`,
      heat: unbroken(40),
      cluster: unbroken(40),
      inspections: part.inspections.map((made) => ({
        ...made,
        title: long(120),
        standard: unbroken(120),
        inspectionNumber: unbroken(40),
      })),
      values: Array.from({ length: 400 }, () => ({ operation: unbroken(16), label: long(80), value: '123456789012.123456789012', unit: unbroken(16), lower: '0.1', upper: '999999999999.999999999999' })), // prettier-ignore
    })),
  };
}

describe('the file', () => {
  test('is the same bytes for the same record, whatever the order of its members', async () => {
    const record = exampleRecord({ serials: 7 });
    const turned = Object.fromEntries(Object.entries(record).reverse()) as CertificateRecord;
    const [first, second] = [await layOutCertificate(record), await layOutCertificate(turned)];
    expect(Buffer.from(second.bytes).equals(first.bytes)).toBe(true);
    const other = await layOutCertificate({ ...record, place: 'Elsewhere' });
    expect(Buffer.from(other.bytes).equals(first.bytes)).toBe(false);
  });

  test('carries the record itself, byte for byte, as <number>.json with relationship Data', async (context) => {
    needPrograms(context, 'pdfdetach', 'qpdf');
    const record = exampleRecord({ serials: 5 });
    const { file } = await laidOut(record, 'attached.pdf');
    expect(judge('pdfdetach', '-list', file).said).toContain(`1: ${record.number}.json`);
    judge('pdfdetach', '-save', '1', '-o', `${folder}/detached.json`, file);
    const detached = readFileSync(`${folder}/detached.json`);
    expect(detached.equals(certificateRecordBytes(record))).toBe(true);
    expect(JSON.parse(detached.toString())).toEqual(record);
    expect(judge('qpdf', '--qdf', '--object-streams=disable', file, '-').said).toContain('/AFRelationship /Data');
    const { recordSha256 } = await layOutCertificate(record);
    expect(createHash('sha256').update(detached).digest('hex')).toBe(recordSha256);
  });

  test('embeds every font it uses', async (context) => {
    needPrograms(context, 'pdffonts');
    const { file } = await laidOut(exampleRecord({ serials: 2 }), 'fonts.pdf');
    const lines = judge('pdffonts', file).said.trim().split('\n').slice(2);
    expect(lines.map((line) => line.split(/\s+/)[0]?.split('+')[1]).sort()).toEqual([
      'AtkinsonHyperlegibleMono-Regular',
      'AtkinsonHyperlegibleNext-Bold',
      'AtkinsonHyperlegibleNext-Regular',
      'DejaVuSans',
    ]);
    for (const line of lines) expect(line).toMatch(/yes yes yes/);
  });
});

describe('the paper', () => {
  test('says what ISO/IEC 17050-1 and the order ask: number, parties, part, serials, inspections, concession, signatory, caution', async (context) => {
    needPrograms(context, 'pdftotext');
    const record = exampleRecord({ serials: 4 });
    const { file } = await laidOut(record, 'text.pdf');
    const text = textOf(file);
    const first = record.serials.flatMap((part) => [
      part.serial,
      `Heat ${part.heat}`,
      `Cluster ${part.cluster}, position ${part.position}`,
      ...part.inspections.flatMap((made) => [made.inspectionNumber ?? '', made.standard ?? '', made.technique ?? '']),
    ]);
    for (const said of [
      'Certificate of conformance',
      'Inspection certificate 3.1 according to EN 10204',
      record.number,
      record.checkCode,
      record.plant.name,
      record.customer.name,
      '14, rue de l’Œuvre',
      record.order.purchaseOrder,
      `Line ${record.order.line}`,
      record.part.number,
      record.part.title,
      record.drawing.number,
      `Revision ${record.drawing.revision}`,
      record.planIssue,
      'Zoë Łukasik',
      'Release signed 2026-03-09 12:58 (Europe/Paris)',
      'Harrow Vale, 2026-03-09',
      'No time stamp',
      'not an airworthiness release',
      'accepted by concession',
      'Concession CN-26-0031 (reference AT-DER-2208): Wall at station 17; 0.78 mm ≤ wall < 0.80 mm',
      'Dimensional inspection, ⌀ and chord',
      'Page 1 of 2',
      'Page 2 of 2',
      'Q-22',
      ...first,
    ]) {
      expect(text).toContain(said);
    }
  });

  test('does not claim type 3.1 where the record does not, and names the certificate it replaces', async (context) => {
    needPrograms(context, 'pdftotext');
    const record = { ...exampleRecord({ serials: 1 }), type31: false, replaces: 'COC-2026-000400' };
    const text = textOf((await laidOut(record, 'plain.pdf')).file);
    expect(text).not.toContain('10204');
    expect(text).toContain('Replaces certificate COC-2026-000400');
  });

  test('speaks French', async (context) => {
    needPrograms(context, 'pdftotext');
    const text = textOf((await laidOut(exampleRecord({ serials: 3, locale: 'fr' }), 'french.pdf')).file);
    for (const said of [
      'Certificat de conformité',
      'Déclaration de conformité',
      'accepté par dérogation',
      'Coulée',
      'Page 1 sur',
      'Sans horodatage',
    ]) {
      expect(text).toContain(said);
    }
    expect(text).not.toMatch(/\b(accepted|Heat|Statement|Page 1 of)\b/);
  });

  test('has a QR code that a reader turns back into the address of verification', async (context) => {
    needPrograms(context, 'pdftoppm', 'zbarimg');
    const record = exampleRecord({ serials: 2 });
    const { file } = await laidOut(record, 'code.pdf');
    judge('pdftoppm', '-r', '150', '-f', '1', '-l', '1', '-png', '-singlefile', file, `${folder}/code`);
    expect(judge('zbarimg', '-q', '--raw', `${folder}/code.png`).printed.trim()).toBe(record.verifyUrl);
  });

  test('lists 200 serials over numbered pages within two seconds, each serial once', async (context) => {
    needPrograms(context, 'pdftotext');
    const record = exampleRecord({ serials: 200 });
    const begun = performance.now();
    const { file, pageCount } = await laidOut(record, 'two-hundred.pdf');
    const tookMs = Math.round(performance.now() - begun);
    console.info(`200 serials with 6 inspections each: ${pageCount} pages in ${tookMs} ms`);
    expect(pageCount).toBeGreaterThan(8);
    expect(pageCount).toBeLessThan(30);
    expect(tookMs).toBeLessThan(2_000);
    const words = textOf(file).split(' ');
    for (const { serial } of record.serials) expect(words.filter((word) => word === serial)).toHaveLength(1);
    const text = textOf(file);
    for (let page = 1; page <= pageCount; page++) expect(text).toContain(`Page ${page} of ${pageCount}`);
  });

  test('keeps the longest texts inside the margins of every page', async (context) => {
    needPrograms(context, 'pdftotext');
    const { file } = await laidOut(longestRecord(), 'longest.pdf');
    const boxes = judge('pdftotext', '-bbox', file, '-').said;
    const words = [...boxes.matchAll(/<word xMin="([\d.-]+)" yMin="([\d.-]+)" xMax="([\d.-]+)" yMax="([\d.-]+)">([^<]*)</g)];
    expect(words.length).toBeGreaterThan(1_000);
    const outside = words.filter(
      ([, left, top, right, bottom]) => Number(left) < 50 || Number(right) > 546 || Number(top) < 30 || Number(bottom) > 822,
    );
    expect(outside.map((word) => word[5])).toEqual([]);
    const overlapsFoot = words.filter(([, , top, , bottom]) => Number(bottom) > 798 && Number(top) < 800);
    expect(overlapsFoot.map((word) => word[5])).toEqual([]);
  });
});

describe('a character that no font can print', () => {
  test.each([
    ['Chinese', '叶片'],
    ['Arabic, which needs shaping', 'شفرة'],
    ['Devanagari', 'ब्लेड'],
    ['a picture character', '🛠'],
  ])('is refused by name, never drawn as a box: %s', async (_, title) => {
    const record = exampleRecord({ serials: 1 });
    const refused = layOutCertificate({ ...record, part: { ...record.part, title } });
    await expect(refused).rejects.toThrow(MissingGlyphError);
    await expect(refused).rejects.toThrow(title.normalize('NFC').slice(0, 2));
  });

  test('signs of the trade and the letters of our customers do print', async (context) => {
    needPrograms(context, 'pdftotext');
    const record = exampleRecord({ serials: 1 });
    const title = '⌀ 4 ≤ 5 ≥ 3 ± 0,1 µm ° × “Łódź” Ğ ő ß Турбина Ω';
    const { file } = await laidOut({ ...record, part: { ...record.part, title } }, 'signs.pdf');
    expect(textOf(file).replaceAll(' ', '')).toContain(title.replaceAll(' ', ''));
  });
});

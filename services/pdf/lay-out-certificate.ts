import { createHash } from 'node:crypto';
import { AFRelationship, PDFDocument, PDFHexString } from 'pdf-lib';
import { reserveSeal, reserveSealReference } from '../seal/reserve-seal';
import { embedPaperFonts } from './certificate-fonts';
import { certificateRecord, certificateRecordBytes } from './certificate-record';
import type { CertificateRecord } from './certificate-record';
import { certificateWords } from './certificate-words';
import { layOutFace } from './lay-out-face';
import { layOutClauses, layOutInspections, layOutSerials } from './lay-out-serials';
import { drawMark } from './draw-mark-and-code';
import { inks, Paper, sheet } from './paper';

export interface CertificatePdf {
  /** The document with its seal reserved but not yet filled. Same record, same bytes. */
  bytes: Uint8Array;
  pageCount: number;
  /** SHA-256 of the attached record, lower-case hex; printed on the paper. */
  recordSha256: string;
}

/** Room for a signature with its certificates, and with a time-stamp token and that token's chain, bytes. */
const roomBytes = { none: 6_000, rfc3161: 24_000 };

/**
 * Lays a release record out as an A4 certificate with the record attached as `<number>.json`. Depends on the record alone:
 * dates come from the record, /ID from its digest. Throws ZodError (no record), MissingGlyphError, CodeError.
 */
export async function layOutCertificate(unchecked: CertificateRecord): Promise<CertificatePdf> {
  const record = certificateRecord.parse(unchecked);
  const words = certificateWords(record.locale);
  const attached = certificateRecordBytes(record);
  const recordSha256 = createHash('sha256').update(attached).digest('hex');
  const issuedAt = new Date(record.issuedAt);

  const document = await PDFDocument.create({ updateMetadata: false });
  const seal = reserveSealReference(document);
  const fonts = await embedPaperFonts(document, JSON.stringify(record) + Object.values(words).join(''));
  const paper = new Paper(document, fonts);
  const runningHead = () => layOutRunningHead(paper, record);
  paper.beginPage = runningHead;
  layOutFace(paper, record, recordSha256);
  layOutInspections(paper, record);
  layOutSerials(paper, record, runningHead);
  layOutClauses(paper, record);
  layOutFeet(paper, record, recordSha256);

  document.setTitle(`${words.title} ${record.number}`, { showInWindowTitleBar: true });
  document.setAuthor(record.plant.name);
  document.setSubject(`${record.part.number} · ${record.order.purchaseOrder}`);
  document.setLanguage(record.locale);
  document.setCreator('Ringtrue');
  document.setProducer('Ringtrue');
  document.setCreationDate(issuedAt);
  document.setModificationDate(issuedAt);
  await document.attach(attached, `${record.number}.json`, {
    mimeType: 'application/json',
    description: `${words.title} ${record.number}`,
    creationDate: issuedAt,
    modificationDate: issuedAt,
    afRelationship: AFRelationship.Data,
  });
  reserveSeal(document, seal, {
    name: record.plant.name,
    reason: `${words.title} ${record.number}`,
    location: record.place,
    at: issuedAt,
    roomBytes: roomBytes[record.timeStamp],
  });
  const id = PDFHexString.of(recordSha256.slice(0, 32).toUpperCase());
  document.context.trailerInfo.ID = document.context.obj([id, id]);
  const bytes = await document.save({ useObjectStreams: false, updateFieldAppearances: false, addDefaultPage: false });
  return { bytes, pageCount: paper.pages.length, recordSha256 };
}

function layOutRunningHead(paper: Paper, record: CertificateRecord): void {
  const words = certificateWords(record.locale);
  const baseline = sheet.topPt - 4;
  drawMark(paper.page, sheet.leftPt + 8, baseline + 3.4, 8);
  const number = { face: 'mono', sizePt: 10, ink: inks.ink } as const;
  const title = { face: 'text', sizePt: 9.5, ink: inks.quiet } as const;
  paper.writeRight(record.number, sheet.rightPt, baseline, number);
  const besideNumber = sheet.rightPt - paper.widthOf(record.number, number) - 8;
  paper.writeRight(words.title, besideNumber, baseline, title);
  const issuer = { face: 'bold', sizePt: 9.5, ink: inks.ink } as const;
  const left = sheet.leftPt + 24;
  const room = besideNumber - paper.widthOf(words.title, title) - left - 24;
  const [first = '', ...rest] = paper.wrap(record.plant.name, room, issuer);
  paper.write(rest.length > 0 ? `${first}…` : first, left, baseline, issuer);
  paper.rule(baseline - 11, 1, inks.accent);
  paper.yPt = baseline - 28;
}

function layOutFeet(paper: Paper, record: CertificateRecord, recordSha256: string): void {
  const words = certificateWords(record.locale);
  const quiet = { face: 'text', sizePt: 8.5, ink: inks.quiet } as const;
  paper.pages.forEach((page, index) => {
    paper.rule(44, 0.6, inks.line, page);
    paper.write(`${record.number} · ${words.recordDigest} ${recordSha256.slice(0, 16)}…`, sheet.leftPt, 31, quiet, page);
    const count = `${words.page} ${index + 1} ${words.of} ${paper.pages.length}`;
    paper.writeRight(count, sheet.rightPt, 31, { ...quiet, ink: inks.ink }, page);
  });
}

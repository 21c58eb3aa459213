import type { CertificateRecord } from './certificate-record';
import { certificateWords } from './certificate-words';
import { drawMark, drawQrCode } from './draw-mark-and-code';
import { inks, sheet } from './paper';
import type { Paper, TextStyle } from './paper';

const label: TextStyle = { face: 'text', sizePt: 8.5, ink: inks.quiet };
const value: TextStyle = { face: 'text', sizePt: 10, ink: inks.ink };
const strong: TextStyle = { face: 'bold', sizePt: 10.5, ink: inks.ink };
const code: TextStyle = { face: 'mono', sizePt: 10.5, ink: inks.ink };

/** A line of a column: what it says and how. */
type ColumnLine = [text: string, style: TextStyle];

const gapPt = 18;

/** The first page down to the caution: issuer, number, parties, part, statement, signatory, seal and code. */
export function layOutFace(paper: Paper, record: CertificateRecord, recordSha256: string): void {
  layOutHead(paper, record);
  layOutParties(paper, record);
  layOutStatement(paper, record);
  layOutSignature(paper, record, recordSha256);
  layOutCaution(paper, record);
}

function layOutHead(paper: Paper, record: CertificateRecord): void {
  const words = certificateWords(record.locale);
  const top = sheet.topPt;
  drawMark(paper.page, sheet.leftPt + 19, top - 15, 19);
  const nameX = sheet.leftPt + 52;
  const nameWidth = 245;
  let y = top + 2;
  y -= paper.block(record.plant.name, nameX, y, nameWidth, { ...strong, sizePt: 13 });
  for (const addressLine of record.plant.address) y -= paper.block(addressLine, nameX, y, nameWidth, label);
  paper.writeRight(words.number, sheet.rightPt, top - 6, label);
  paper.writeRight(record.number, sheet.rightPt, top - 23, { ...code, sizePt: 13 });
  if (record.replaces !== null) paper.writeRight(`${words.replaces} ${record.replaces}`, sheet.rightPt, top - 37, label);
  y = Math.min(y, top - 42) - 10;
  paper.rule(y, 1.4, inks.accent);
  paper.write(words.title, sheet.leftPt, y - 33, { face: 'bold', sizePt: 25, ink: inks.ink });
  y -= 40;
  if (record.type31) y -= 4 + paper.block(words.type31, sheet.leftPt, y - 4, sheet.bodyWidthPt, { ...strong, ink: inks.accent });
  y -= 3 + paper.block(words.form, sheet.leftPt, y - 3, sheet.bodyWidthPt, label);
  paper.yPt = y - 12;
}

function layOutParties(paper: Paper, record: CertificateRecord): void {
  const words = certificateWords(record.locale);
  const { customer, order, part, drawing } = record;
  layOutColumns(paper, [
    [[words.customer, label], [customer.name, strong], ...customer.address.map((text): ColumnLine => [text, value])],
    [
      [words.purchaseOrder, label],
      [order.purchaseOrder, code],
      [`${words.orderLine} ${order.line}`, value],
      [`${words.orderNumber} ${order.number}`, label],
    ],
  ]);
  layOutColumns(paper, [
    [
      [words.part, label],
      [part.number, { ...code, sizePt: 12 }],
      [part.title, value],
    ],
    [
      [words.drawing, label],
      [drawing.number, code],
      [`${words.revision} ${drawing.revision}`, value],
      [`${words.planIssue} ${record.planIssue}`, label],
    ],
    [
      [words.quantity, label],
      [String(record.quantity), { face: 'bold', sizePt: 20, ink: inks.ink }],
    ],
  ]);
}

function layOutColumns(paper: Paper, columns: ColumnLine[][]): void {
  const wide = (sheet.bodyWidthPt + gapPt) / 5;
  paper.rule(paper.yPt);
  const top = paper.yPt - 8;
  const ends = columns.map((lines, index) => {
    const span = index === 0 ? 2.5 : index === 1 && columns.length === 3 ? 1.75 : index === 1 ? 2.5 : 0.75;
    const x = sheet.leftPt + wide * (index === 0 ? 0 : index === 1 ? 2.5 : 4.25);
    return lines.reduce((y, [text, style]) => y - paper.block(text, x, y, wide * span - gapPt, style) - 1.5, top);
  });
  paper.yPt = Math.min(...ends) - 7;
}

function layOutStatement(paper: Paper, record: CertificateRecord): void {
  const words = certificateWords(record.locale);
  const text: TextStyle = { face: 'text', sizePt: 10.5, ink: inks.ink };
  const width = sheet.bodyWidthPt - 30;
  const height = paper.heightOf(record.statement, width, text) + 38;
  paper.need(height);
  const top = paper.yPt;
  paper.page.drawRectangle({ x: sheet.leftPt, y: top - height, width: sheet.bodyWidthPt, height, color: inks.tint });
  paper.page.drawRectangle({ x: sheet.leftPt, y: top - height, width: 3.5, height, color: inks.accent });
  paper.block(words.statement, sheet.leftPt + 16, top - 10, width, { ...strong, ink: inks.accent });
  paper.block(record.statement, sheet.leftPt + 16, top - 27, width, text);
  paper.yPt = top - height - 14;
}

function layOutSignature(paper: Paper, record: CertificateRecord, recordSha256: string): void {
  const words = certificateWords(record.locale);
  const codeSide = 118;
  const left: ColumnLine[] = [
    [words.signatory, label],
    [record.signatory.name, { ...strong, sizePt: 13 }],
    [record.signatory.function, value],
    [`${words.signedAt} ${instantInWords(record.signatory.signedAt, record.timeZone)}`, label],
    [words.placeAndDate, { ...label, sizePt: 8.5 }],
    [`${record.place}, ${dateInWords(record.issuedAt, record.timeZone)}`, value],
    [words.seal, label],
    [words.sealText, { ...value, sizePt: 9 }],
    [record.timeStamp === 'none' ? words.noTimeStamp : words.timeStamp, { ...strong, sizePt: 9 }],
    [`${words.recordDigest}`, label],
    ...(recordSha256.match(/.{32}/g) ?? []).map((half): ColumnLine => [half, { ...code, sizePt: 8.5 }]),
  ];
  const headings = new Set([words.placeAndDate, words.seal, words.recordDigest]);
  const leftWidth = sheet.bodyWidthPt - 190;
  const heightPt = left.reduce((sum, [text, style]) => sum + paper.heightOf(text, leftWidth, style) + 7, 0);
  paper.need(Math.max(heightPt, 225));
  const top = paper.yPt;
  const end = left.reduce((y, [text, style]) => {
    const from = headings.has(text) ? y - 6 : y;
    return from - paper.block(text, sheet.leftPt, from, leftWidth, style) - 1;
  }, top);

  const x = sheet.rightPt - 160;
  paper.block(words.check, x, top, 160, label);
  const quiet = (codeSide * 4) / 45;
  drawQrCode(paper.page, record.verifyUrl, x - quiet, top - 14 - codeSide + quiet / 2, codeSide);
  let y = top - 14 - codeSide + quiet / 2 - 2;
  y -= paper.block(words.checkCode, x, y, 160, label) + 1;
  y -= paper.block(record.checkCode, x, y, 160, { ...code, sizePt: 12 }) + 2;
  y -= paper.block(addressWithoutQuery(record.verifyUrl), x, y, 160, label);
  paper.yPt = Math.min(end, y) - 10;
}

function layOutCaution(paper: Paper, record: CertificateRecord): void {
  const words = certificateWords(record.locale);
  const text: TextStyle = { face: 'text', sizePt: 9, ink: inks.ink };
  const heading: TextStyle = { ...strong, sizePt: 9.5 };
  const indent = paper.widthOf(words.caution, heading) + 14;
  const width = sheet.bodyWidthPt - indent - 12;
  const height = paper.heightOf(record.caution, width, text) + 15;
  paper.need(height);
  const top = paper.yPt;
  const box = { x: sheet.leftPt, y: top - height, width: sheet.bodyWidthPt, height };
  paper.page.drawRectangle({ ...box, borderColor: inks.quiet, borderWidth: 0.8 });
  paper.block(words.caution, sheet.leftPt + 9, top - 7, indent, heading);
  paper.block(record.caution, sheet.leftPt + indent + 4, top - 7.4, width, text);
  paper.yPt = top - height - 20;
}

/** The page's address for those who type it; number and check code stand beside it. */
function addressWithoutQuery(url: string): string {
  return url.split(/[?#]/)[0] ?? url;
}

/** A date of the plant's calendar, 2026-03-09. */
function dateInWords(instant: string, timeZone: string): string {
  return instantInWords(instant, timeZone).slice(0, 10);
}

/** A time of the plant's clock with the zone named: 2026-03-09 14:05 (Europe/Paris). */
function instantInWords(instant: string, timeZone: string): string {
  const format = new Intl.DateTimeFormat('en-GB', {
    timeZone,
    year: 'numeric',
    month: '2-digit',
    day: '2-digit',
    hour: '2-digit',
    minute: '2-digit',
    hourCycle: 'h23',
  });
  const part = Object.fromEntries(format.formatToParts(new Date(instant)).map((piece) => [piece.type, piece.value]));
  return `${part.year}-${part.month}-${part.day} ${part.hour}:${part.minute} (${timeZone})`;
}

import type { CertificateInspection, CertificateRecord, CertificateSerial } from './certificate-record';
import { certificateWords, resultInWords } from './certificate-words';
import { inks, sheet } from './paper';
import type { Paper, TextStyle } from './paper';

const small: TextStyle = { face: 'text', sizePt: 8.5, ink: inks.ink };
const quiet: TextStyle = { ...small, ink: inks.quiet };
const code: TextStyle = { face: 'mono', sizePt: 8.5, ink: inks.ink };
const heading: TextStyle = { face: 'bold', sizePt: 13, ink: inks.ink };

type Words = ReturnType<typeof certificateWords>;
/** A piece of a line: text, style, distance from the left margin in points. */
type Piece = { text: string; style: TextStyle; xPt: number };

const linePt = 12;
/** Between the pieces of a cell. */
const gapPt = 5;
const column = { operation: 0, title: 46, standard: 222, count: sheet.bodyWidthPt };
/** Where the results of a serial begin, right of serial, heat and place, and how many fit side by side. */
const results = { xPt: 132, across: 2 };
const cellPt = (sheet.bodyWidthPt - results.xPt) / results.across;

function writeLine(paper: Paper, pieces: Piece[], baselinePt: number): void {
  for (const { text, style, xPt } of pieces) paper.write(text, sheet.leftPt + xPt, baselinePt, style);
}

function sectionHead(paper: Paper, title: string, keepPt: number): void {
  paper.need(30 + keepPt);
  paper.write(title, sheet.leftPt, paper.yPt - 11, heading);
  paper.yPt -= 22;
}

/** What was inspected, to which standard and technique, and on how many of the serials. */
export function layOutInspections(paper: Paper, record: CertificateRecord): void {
  const words = certificateWords(record.locale);
  const made = new Map<string, { inspection: CertificateInspection; count: number }>();
  for (const part of record.serials) {
    for (const inspection of part.inspections) {
      const { operation, title, method, standard, technique } = inspection;
      const key = JSON.stringify([operation, title, method, standard, technique]);
      made.set(key, { inspection, count: (made.get(key)?.count ?? 0) + 1 });
    }
  }
  if (made.size === 0) return;
  sectionHead(paper, words.inspections, 60);
  writeLine(
    paper,
    [
      { text: words.operation, style: quiet, xPt: column.operation },
      { text: words.inspection, style: quiet, xPt: column.title },
      { text: words.standardAndTechnique, style: quiet, xPt: column.standard },
    ],
    paper.yPt - 8,
  );
  paper.writeRight(words.serials, sheet.rightPt, paper.yPt - 8, quiet);
  paper.yPt -= 13;
  for (const { inspection, count } of made.values()) layOutInspection(paper, inspection, `${count} / ${record.quantity}`, words);
  paper.rule(paper.yPt);
  paper.yPt -= 22;
}

function layOutInspection(paper: Paper, inspection: CertificateInspection, count: string, words: Words): void {
  const normative = [inspection.standard, inspection.technique].filter((text) => text !== null).join(' · ');
  const titles = paper.wrap(inspection.title, column.standard - column.title - 10, small);
  const standards = paper.wrap(normative || words.notStated, 222, small);
  const operations = paper.wrap(inspection.operation, column.title - column.operation - 6, code);
  const lines = Math.max(titles.length, standards.length, operations.length);
  paper.need(lines * linePt + 6);
  paper.rule(paper.yPt);
  paper.writeRight(count, sheet.rightPt, paper.yPt - 12, code);
  for (let index = 0; index < lines; index++) {
    writeLine(
      paper,
      [
        { text: operations[index] ?? '', style: code, xPt: column.operation },
        { text: titles[index] ?? '', style: small, xPt: column.title },
        { text: standards[index] ?? '', style: small, xPt: column.standard },
      ],
      paper.yPt - 12 - index * linePt,
    );
  }
  paper.yPt -= lines * linePt + 5;
}

/** Every serial with heat and place, each inspection's result and number, values and concessions; flows over pages. */
export function layOutSerials(paper: Paper, record: CertificateRecord, runningHead: () => void): void {
  const words = certificateWords(record.locale);
  sectionHead(paper, `${words.serials} (${record.quantity})`, 60);
  paper.beginPage = () => {
    runningHead();
    paper.write(`${words.serials}, ${words.continued}`, sheet.leftPt, paper.yPt - 8, quiet);
    paper.yPt -= 16;
  };
  for (const part of record.serials) layOutSerial(paper, part, record.locale);
  paper.rule(paper.yPt);
  paper.yPt -= 22;
  paper.beginPage = runningHead;
}

function layOutSerial(paper: Paper, part: CertificateSerial, locale: CertificateRecord['locale']): void {
  const words = certificateWords(locale);
  const left = placeLines(paper, part, words);
  const right = [...resultLines(paper, part, locale), ...valueLines(paper, part), ...concessionLines(paper, part, words)];
  const count = Math.max(left.length, right.length);
  const wholeBodyPt = 640;
  paper.need(Math.min(count * linePt + 10, wholeBodyPt));
  paper.rule(paper.yPt);
  paper.yPt -= 3.5;
  for (let index = 0; index < count; index++) {
    paper.need(linePt + 4);
    writeLine(paper, [...(left[index] ?? []), ...(right[index] ?? [])], paper.yPt - 10);
    paper.yPt -= linePt;
  }
  paper.yPt -= 5;
}

function placeLines(paper: Paper, part: CertificateSerial, words: Words): Piece[][] {
  const serialStyle: TextStyle = { face: 'mono', sizePt: 11, ink: inks.ink };
  const place = [
    ...(part.cluster === null ? [] : [`${words.cluster} ${part.cluster}`]),
    ...(part.position === null ? [] : [`${words.position} ${part.position}`]),
  ].join(', ');
  const width = results.xPt - 10;
  const lines = paper.wrap(part.serial, width, serialStyle).map((text): Piece[] => [{ text, style: serialStyle, xPt: 0 }]);
  for (const text of [`${words.heat} ${part.heat}`, ...(place === '' ? [] : [place])]) {
    for (const wrapped of paper.wrap(text, width, small)) lines.push([{ text: wrapped, style: small, xPt: 0 }]);
  }
  return lines;
}

/** Cells of one or two columns, set side by side while they fit; one that is wider than the line goes on below. */
function flow(paper: Paper, cells: Omit<Piece, 'xPt'>[][]): Piece[][] {
  const lines: Piece[][] = [];
  let used: number = results.across;
  for (const cell of cells) {
    const widthPt = cell.reduce((sum, piece) => sum + paper.widthOf(piece.text, piece.style) + gapPt, 0);
    if (widthPt > cellPt * results.across) {
      lines.push(...overlong(paper, cell));
      used = results.across;
      continue;
    }
    const span = Math.ceil(widthPt / cellPt);
    if (used + span > results.across) {
      lines.push([]);
      used = 0;
    }
    let xPt = results.xPt + used * cellPt;
    for (const piece of cell) {
      lines.at(-1)?.push({ ...piece, xPt });
      xPt += paper.widthOf(piece.text, piece.style) + gapPt;
    }
    used += span;
  }
  return lines;
}

/** Each piece of a cell on lines of its own. */
function overlong(paper: Paper, cell: Omit<Piece, 'xPt'>[]): Piece[][] {
  return cell.flatMap(({ text, style }) =>
    paper.wrap(text, sheet.bodyWidthPt - results.xPt, style).map((line): Piece[] => [{ text: line, style, xPt: results.xPt }]),
  );
}

function resultLines(paper: Paper, part: CertificateSerial, locale: CertificateRecord['locale']): Piece[][] {
  const cells = part.inspections.map((made) => [
    { text: made.operation, style: code },
    { text: resultInWords(locale, made.result), style: small },
    ...(made.inspectionNumber === null ? [] : [{ text: made.inspectionNumber, style: { ...code, ink: inks.quiet } }]),
  ]);
  return flow(paper, cells);
}

function valueLines(paper: Paper, part: CertificateSerial): Piece[][] {
  const cells = (part.values ?? []).map((value) => {
    const limits =
      value.lower !== null && value.upper !== null
        ? `(${value.lower}–${value.upper})`
        : value.lower !== null
          ? `(≥ ${value.lower})`
          : value.upper !== null
            ? `(≤ ${value.upper})`
            : '';
    return [
      { text: value.operation, style: code },
      { text: value.label, style: small },
      { text: `${value.value} ${value.unit}`, style: code },
      { text: limits, style: quiet },
    ].filter((piece) => piece.text !== '');
  });
  return flow(paper, cells);
}

function concessionLines(paper: Paper, part: CertificateSerial, words: Words): Piece[][] {
  const bold: TextStyle = { ...small, face: 'bold' };
  return part.concessions.flatMap((granted) => {
    const reference = granted.customerReference === null ? '' : ` (${words.reference} ${granted.customerReference})`;
    const text = `${words.concession} ${granted.number}${reference}: ${granted.requirement}; ${granted.limits}`;
    return paper
      .wrap(text, sheet.bodyWidthPt - results.xPt, bold)
      .map((line): Piece[] => [{ text: line, style: bold, xPt: results.xPt }]);
  });
}

/** The order's clauses that the certificate answers. */
export function layOutClauses(paper: Paper, record: CertificateRecord): void {
  if (record.clauses.length === 0) return;
  const words = certificateWords(record.locale);
  sectionHead(paper, words.clauses, 30);
  for (const clause of record.clauses) {
    const lines = paper.wrap(clause.text, sheet.bodyWidthPt - 100, small);
    const codes = paper.wrap(clause.code, 90, code);
    const count = Math.max(lines.length, codes.length);
    paper.need(count * linePt + 6);
    for (let index = 0; index < count; index++) {
      writeLine(
        paper,
        [
          { text: codes[index] ?? '', style: code, xPt: 0 },
          { text: lines[index] ?? '', style: small, xPt: 100 },
        ],
        paper.yPt - 10 - index * linePt,
      );
    }
    paper.yPt -= count * linePt + 4;
  }
}

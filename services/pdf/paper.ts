import { beginText, endText, rgb, setFillingColor, setFontAndSize, setTextMatrix, showText } from 'pdf-lib';
import type { PDFDocument, PDFFont, PDFName, PDFPage, RGB } from 'pdf-lib';
import type { PaperFace, PaperFonts } from './certificate-fonts';

function tone(hex: string): RGB {
  const part = (at: number) => parseInt(hex.slice(at, at + 2), 16) / 255;
  return rgb(part(1), part(3), part(5));
}

/** Inks of the paper, by meaning. */
export const inks = {
  ink: tone('#1A1E21'),
  quiet: tone('#4A5157'),
  line: tone('#C4CACE'),
  accent: tone('#17456B'),
  tint: tone('#EEF3F7'),
  ground: rgb(1, 1, 1),
};

/** A4 in points (ISO 216: 210 × 297 mm), its margins and what is left between them. */
export const sheet = {
  widthPt: 595.28,
  heightPt: 841.89,
  leftPt: 51,
  rightPt: 544.28,
  topPt: 793,
  bottomPt: 62,
  bodyWidthPt: 493.28,
};

/** Distance of baselines in font sizes. */
const leading = 1.34;

export interface TextStyle {
  face: PaperFace;
  sizePt: number;
  ink: RGB;
}

/** Pages that are written from top to bottom: keeps the height still free and starts a new page when a piece does not fit. */
export class Paper {
  readonly pages: PDFPage[] = [];
  /** Distance of the free space's upper edge from the page's lower edge, points. */
  yPt = sheet.topPt;
  /** Drawn at the top of each new page: the running head and, within a table, its heads. */
  beginPage: () => void = () => undefined;
  private readonly fontNames = new Map<PDFPage, Map<PDFFont, PDFName>>();

  constructor(
    private readonly document: PDFDocument,
    private readonly fonts: PaperFonts,
  ) {
    this.addPage();
  }

  get page(): PDFPage {
    const page = this.pages.at(-1);
    if (page === undefined) throw new Error('The paper has no page');
    return page;
  }

  /** Makes sure that `heightPt` is free, on a new page where needed. */
  need(heightPt: number): void {
    if (this.yPt - heightPt >= sheet.bottomPt) return;
    this.addPage();
    this.beginPage();
  }

  widthOf(text: string, style: TextStyle): number {
    return this.fonts.widthOf(style.face, text, style.sizePt);
  }

  /** Writes one line with its baseline at `yPt`. Throws MissingGlyphError. */
  write(text: string, xPt: number, yPt: number, style: TextStyle, page = this.page): void {
    let x = xPt;
    for (const run of this.fonts.runs(style.face, text)) {
      page.pushOperators(
        beginText(),
        setFillingColor(style.ink),
        setFontAndSize(this.nameOf(page, run.font), style.sizePt),
        setTextMatrix(1, 0, 0, 1, rounded(x), rounded(yPt)),
        showText(run.font.encodeText(run.text)),
        endText(),
      );
      x += run.font.widthOfTextAtSize(run.text, style.sizePt);
    }
  }

  writeRight(text: string, rightPt: number, yPt: number, style: TextStyle, page = this.page): void {
    this.write(text, rightPt - this.widthOf(text, style), yPt, style, page);
  }

  /** Breaks a text into lines of at most `widthPt`; a word that is longer is broken between characters. */
  wrap(text: string, widthPt: number, style: TextStyle): string[] {
    const lines: string[] = [];
    let line = '';
    for (const word of text.split(' ').flatMap((part) => this.pieces(part, widthPt, style))) {
      const longer = line === '' ? word : `${line} ${word}`;
      if (line !== '' && this.widthOf(longer, style) > widthPt) {
        lines.push(line);
        line = word;
      } else {
        line = longer;
      }
    }
    return [...lines, line];
  }

  /** Writes wrapped lines from `yPt` (upper edge) down; returns the height used in points. */
  block(text: string, xPt: number, yPt: number, widthPt: number, style: TextStyle): number {
    const leadPt = style.sizePt * leading;
    const lines = this.wrap(text, widthPt, style);
    lines.forEach((line, index) => this.write(line, xPt, yPt - style.sizePt * 0.95 - index * leadPt, style));
    return lines.length * leadPt;
  }

  /** The height that `block` will use, points. */
  heightOf(text: string, widthPt: number, style: TextStyle): number {
    return this.wrap(text, widthPt, style).length * style.sizePt * leading;
  }

  rule(yPt: number, thicknessPt = 0.6, color = inks.line, page = this.page): void {
    page.drawLine({ start: { x: sheet.leftPt, y: yPt }, end: { x: sheet.rightPt, y: yPt }, thickness: thicknessPt, color });
  }

  private addPage(): void {
    this.pages.push(this.document.addPage([sheet.widthPt, sheet.heightPt]));
    this.yPt = sheet.topPt;
  }

  private pieces(word: string, widthPt: number, style: TextStyle): string[] {
    if (this.widthOf(word, style) <= widthPt) return [word];
    const made: string[] = [];
    let piece = '';
    for (const character of word) {
      if (piece !== '' && this.widthOf(piece + character, style) > widthPt) {
        made.push(piece);
        piece = '';
      }
      piece += character;
    }
    return [...made, piece];
  }

  private nameOf(page: PDFPage, font: PDFFont): PDFName {
    let names = this.fontNames.get(page);
    if (names === undefined) this.fontNames.set(page, (names = new Map<PDFFont, PDFName>()));
    let name = names.get(font);
    if (name === undefined) names.set(font, (name = page.node.newFontDictionary(font.name, font.ref)));
    return name;
  }
}

function rounded(points: number): number {
  return Math.round(points * 100) / 100;
}

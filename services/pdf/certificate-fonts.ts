import { readFile } from 'node:fs/promises';
import path from 'node:path';
import fontkit from '@pdf-lib/fontkit';
import type { PDFDocument, PDFFont } from 'pdf-lib';

/**
 * The faces of the paper. The whole TTF files are used, not the web subsets: those lack ≤ ≥ and most of Latin Extended.
 * 'symbol' is the fallback for what Atkinson Hyperlegible has no shape for (⌀ µ → ✓, Greek, Cyrillic): DejaVu Sans.
 */
const files = {
  text: 'AtkinsonHyperlegibleNext-Regular.ttf',
  bold: 'AtkinsonHyperlegibleNext-Bold.ttf',
  mono: 'AtkinsonHyperlegibleMono-Regular.ttf',
  symbol: 'DejaVuSans.ttf',
} as const;

type Face = keyof typeof files;
export type PaperFace = Exclude<Face, 'symbol'>;
type FontFile = ReturnType<typeof fontkit.create>;

/** Neither the face nor the fallback can print this character; pdf-lib would have drawn an empty box without a word. */
export class MissingGlyphError extends Error {
  constructor(
    readonly character: string,
    readonly text: string,
  ) {
    const code = (character.codePointAt(0) ?? 0).toString(16).toUpperCase().padStart(4, '0');
    super(`No certificate font can print U+${code} in "${text.slice(0, 80)}"`);
    this.name = 'MissingGlyphError';
  }
}

/** Right-to-left and joining scripts and combining marks need shaping, which a character look-up cannot do: refused, not mangled. */
const needsShaping = /[\p{M}\u0590-\u08ff\u0900-\u0dff\u0e00-\u0fff\u1000-\u109f\u1780-\u17ff\ufb1d-\ufdff\ufe70-\ufeff]/u;

export interface TextRun {
  text: string;
  font: PDFFont;
}

export interface PaperFonts {
  /** Splits a text by the font that can print each character. Throws MissingGlyphError. */
  runs(face: PaperFace, text: string): TextRun[];
  /** Width in points. Throws MissingGlyphError. */
  widthOf(face: PaperFace, text: string, sizePt: number): number;
}

/** One glyph per character: no ligatures, so that text is searched and copied as typed, and four times faster than shaping. */
function withoutShaping(bytes: Uint8Array): FontFile {
  const font = fontkit.create(bytes);
  const known = new Map<string, { glyphs: ReturnType<FontFile['layout']>['glyphs'] }>();
  const layout = (text: string) => {
    let laid = known.get(text);
    if (laid === undefined) {
      laid = { glyphs: Array.from(text, (character) => font.glyphForCodePoint(character.codePointAt(0) ?? 0)) };
      if (known.size < 5000) known.set(text, laid);
    }
    return laid;
  };
  return Object.assign(font, { layout }) as FontFile;
}

/** Embeds the faces in a document; the fallback only when `texts` need it, so that most certificates stay small. */
export async function embedPaperFonts(document: PDFDocument, texts: string, folder = fontsFolder()): Promise<PaperFonts> {
  document.registerFontkit({ create: withoutShaping });
  const covers = new Map<PDFFont, Set<number>>();
  const embed = async (face: Face): Promise<PDFFont> => {
    const bytes = await readFile(path.join(folder, files[face]));
    const font = await document.embedFont(bytes, { subset: true, customName: `RTSEAL+${files[face].replace('.ttf', '')}` });
    covers.set(font, new Set(font.getCharacterSet()));
    return font;
  };
  const faces = { text: await embed('text'), bold: await embed('bold'), mono: await embed('mono') };
  const covered = (font: PDFFont | undefined, character: string) =>
    font !== undefined && covers.get(font)?.has(character.codePointAt(0) ?? 0) === true;
  const inAllFaces = (character: string) => Object.values(faces).every((font) => covered(font, character));
  const symbol = Array.from(texts).every(inAllFaces) ? undefined : await embed('symbol');

  const fontFor = (face: PaperFace, character: string, text: string): PDFFont => {
    if (needsShaping.test(character)) throw new MissingGlyphError(character, text);
    if (covered(faces[face], character)) return faces[face];
    if (symbol !== undefined && covered(symbol, character)) return symbol;
    throw new MissingGlyphError(character, text);
  };
  const runs = (face: PaperFace, text: string): TextRun[] => {
    const made: TextRun[] = [];
    for (const character of text) {
      const font = fontFor(face, character, text);
      const last = made.at(-1);
      if (last?.font === font) last.text += character;
      else made.push({ text: character, font });
    }
    return made;
  };
  const widthOf = (face: PaperFace, text: string, sizePt: number) =>
    runs(face, text).reduce((sum, run) => sum + run.font.widthOfTextAtSize(run.text, sizePt), 0);
  return { runs, widthOf };
}

function fontsFolder(): string {
  return path.join(process.cwd(), 'services', 'pdf', 'fonts');
}

import type { PlaceUm } from './part-forms';

/** A stroke from one place to another; a dot where both are the same. */
export type Stroke = readonly [PlaceUm, PlaceUm];

// Seven rows of five, top first; drawn for this project.
const glyphs: Readonly<Record<string, string>> = {
  A: '01110 10001 10001 11111 10001 10001 10001',
  B: '11110 10001 10001 11110 10001 10001 11110',
  C: '01110 10001 10000 10000 10000 10001 01110',
  D: '11110 10001 10001 10001 10001 10001 11110',
  E: '11111 10000 10000 11110 10000 10000 11111',
  F: '11111 10000 10000 11110 10000 10000 10000',
  G: '01110 10001 10000 10111 10001 10001 01110',
  H: '10001 10001 10001 11111 10001 10001 10001',
  I: '01110 00100 00100 00100 00100 00100 01110',
  J: '00111 00010 00010 00010 00010 10010 01100',
  K: '10001 10010 10100 11000 10100 10010 10001',
  L: '10000 10000 10000 10000 10000 10000 11111',
  M: '10001 11011 10101 10101 10001 10001 10001',
  N: '10001 11001 10101 10011 10001 10001 10001',
  O: '01110 10001 10001 10001 10001 10001 01110',
  P: '11110 10001 10001 11110 10000 10000 10000',
  Q: '01110 10001 10001 10001 10101 10010 01101',
  R: '11110 10001 10001 11110 10100 10010 10001',
  S: '01111 10000 10000 01110 00001 00001 11110',
  T: '11111 00100 00100 00100 00100 00100 00100',
  U: '10001 10001 10001 10001 10001 10001 01110',
  V: '10001 10001 10001 10001 10001 01010 00100',
  W: '10001 10001 10001 10101 10101 11011 10001',
  X: '10001 10001 01010 00100 01010 10001 10001',
  Y: '10001 10001 01010 00100 00100 00100 00100',
  Z: '11111 00001 00010 00100 01000 10000 11111',
  '0': '01110 10001 10011 10101 11001 10001 01110',
  '1': '00100 01100 00100 00100 00100 00100 01110',
  '2': '01110 10001 00001 00110 01000 10000 11111',
  '3': '11110 00001 00001 01110 00001 00001 11110',
  '4': '00010 00110 01010 10010 11111 00010 00010',
  '5': '11111 10000 11110 00001 00001 10001 01110',
  '6': '01110 10000 10000 11110 10001 10001 01110',
  '7': '11111 00001 00010 00100 00100 01000 01000',
  '8': '01110 10001 10001 01110 10001 10001 01110',
  '9': '01110 10001 10001 01111 00001 00001 01110',
  '-': '00000 00000 00000 11111 00000 00000 00000',
  '.': '00000 00000 00000 00000 00000 00000 00100',
  '/': '00001 00001 00010 00100 01000 10000 10000',
  ' ': '00000 00000 00000 00000 00000 00000 00000',
};

function strokesOf(rows: readonly string[], at: PlaceUm, cellUm: number): Stroke[] {
  const lit = (row: number, column: number): boolean => rows[row]?.[column] === '1';
  const place = (row: number, column: number): PlaceUm => [
    Math.round(at[0] + column * cellUm),
    Math.round(at[1] + (6 - row) * cellUm),
  ];
  const strokes: Stroke[] = [];
  for (let row = 0; row < 7; row += 1) {
    for (let column = 0; column < 5; column += 1) {
      if (!lit(row, column)) continue;
      const here = place(row, column);
      strokes.push([here, here]);
      if (lit(row, column + 1)) strokes.push([here, place(row, column + 1)]);
      if (lit(row + 1, column)) strokes.push([here, place(row + 1, column)]);
      // A diagonal joins only where no square neighbour already does, or corners would fill up.
      if (lit(row + 1, column + 1) && !lit(row, column + 1) && !lit(row + 1, column))
        strokes.push([here, place(row + 1, column + 1)]);
      if (lit(row + 1, column - 1) && !lit(row, column - 1) && !lit(row + 1, column))
        strokes.push([here, place(row + 1, column - 1)]);
    }
  }
  return strokes;
}

/**
 * Strokes of a line of letters whose lower left corner is `at` and whose letters are six cells high.
 * @throws RangeError for a character that the set of lead letters does not have.
 */
export function letterStrokes(text: string, at: PlaceUm, cellUm: number): Stroke[] {
  return [...text.toUpperCase()].flatMap((character, place) => {
    const glyph = glyphs[character];
    if (glyph === undefined) throw new RangeError(`no lead letter for '${character}'`);
    return strokesOf(glyph.split(' '), [at[0] + place * 6.4 * cellUm, at[1]], cellUm);
  });
}

const pairs: Readonly<Record<string, readonly [string, string]>> = {
  Digit1: ['1', '!'],
  Digit2: ['2', '@'],
  Digit3: ['3', '#'],
  Digit4: ['4', '$'],
  Digit5: ['5', '%'],
  Digit6: ['6', '^'],
  Digit7: ['7', '&'],
  Digit8: ['8', '*'],
  Digit9: ['9', '('],
  Digit0: ['0', ')'],
  Minus: ['-', '_'],
  Equal: ['=', '+'],
  BracketLeft: ['[', '{'],
  BracketRight: [']', '}'],
  Semicolon: [';', ':'],
  Quote: ["'", '"'],
  Backquote: ['`', '~'],
  Backslash: ['\\', '|'],
  Comma: [',', '<'],
  Period: ['.', '>'],
  Slash: ['/', '?'],
  Space: [' ', ' '],
  NumpadDecimal: ['.', '.'],
  NumpadDivide: ['/', '/'],
  NumpadSubtract: ['-', '-'],
  NumpadAdd: ['+', '+'],
  NumpadMultiply: ['*', '*'],
};

/**
 * The character a scanner meant by a key: scanners type as on a US keyboard, so the key's place says it, whatever
 * layout the computer has. Null for keys that type nothing.
 */
export function characterByPlace(code: string, shift: boolean): string | null {
  const letter = /^Key([A-Z])$/.exec(code)?.[1];
  if (letter !== undefined) return shift ? letter : letter.toLowerCase();
  const digit = /^Numpad([0-9])$/.exec(code)?.[1];
  if (digit !== undefined) return digit;
  return pairs[code]?.[shift ? 1 : 0] ?? null;
}

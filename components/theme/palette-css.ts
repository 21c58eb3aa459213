import { paletteNames, palettes, paletteScheme, printPalette, tokenNames } from './palettes';
import type { Palette } from './palettes';

function declarations(palette: Palette, indent: string): string {
  return tokenNames.map((name) => `${indent}--${name}: ${palette[name]};`).join('\n');
}

/** The rules of globals.css that carry the palettes, written from the same data that the contrast test measures. */
export function paletteCss(): string {
  const screens = paletteNames.map(
    (name) => `html[data-palette='${name}'] {\n  color-scheme: ${paletteScheme[name]};\n${declarations(palettes[name], '  ')}\n}`,
  );
  const print = `@media print {\n  html[data-palette] {\n    color-scheme: light;\n${declarations(printPalette, '    ')}\n  }\n}`;
  return [...screens, print].join('\n\n');
}

import { readFileSync } from 'node:fs';
import { join } from 'node:path';
import { describe, expect, it } from 'vitest';
import config from '../../tailwind.config.js';
import { contrastRatio, relativeLuminance } from '../../components/theme/contrast';
import { paletteCss } from '../../components/theme/palette-css';
import { palettes, paletteNames, printPalette, shapePairs, textPairs, tokenNames } from '../../components/theme/palettes';

const grounds = [...paletteNames.map((name) => [name, palettes[name]] as const), ['print', printPalette] as const];

describe('contrast of the palettes (WCAG 2.2: 1.4.3 text 4.5 to 1, 1.4.11 shapes 3 to 1)', () => {
  it('measures as the standard does', () => {
    // WCAG 2.2, 'contrast ratio': black on white is 21 to 1. #777777 on white is the well-known near miss of 4.48 (from memory).
    expect(contrastRatio('#000000', '#ffffff')).toBe(21);
    expect(contrastRatio('#ffffff', '#777777').toFixed(2)).toBe('4.48');
    expect(() => relativeLuminance('red')).toThrow('not a colour');
  });

  describe.each(grounds)('%s', (_name, palette) => {
    it.each(textPairs)('%s is readable on %s', (text, ground) => {
      expect(contrastRatio(palette[text], palette[ground])).toBeGreaterThanOrEqual(4.5);
    });

    it.each(shapePairs)('%s shows on %s', (shape, ground) => {
      expect(contrastRatio(palette[shape], palette[ground])).toBeGreaterThanOrEqual(3);
    });
  });

  it('keeps the reading room near a third of the luminance of white, and the booth darker still', () => {
    expect(relativeLuminance(palettes['reading-room'].ink)).toBeLessThan(0.4);
    for (const name of tokenNames) expect(relativeLuminance(palettes.booth[name])).toBeLessThan(0.36);
  });

  it('keeps the booth between red and amber: red leads, green less, hardly any blue', () => {
    for (const name of tokenNames) {
      const [red = 0, green = 0, blue = 0] = [1, 3, 5].map((at) => Number.parseInt(palettes.booth[name].slice(at, at + 2), 16));
      expect(red, name).toBeGreaterThanOrEqual(green);
      expect(green, name).toBeGreaterThanOrEqual(blue);
      expect(green, name).toBeLessThanOrEqual(red * 0.68);
    }
  });
});

const colours: object = config.theme?.colors ?? {};

describe('one source for colours', () => {
  it('globals.css carries exactly the palettes that are measured', () => {
    const css = readFileSync(join(import.meta.dirname, '../../app/globals.css'), 'utf8');
    expect(css).toContain(paletteCss());
  });

  it('the style sheet offers each meaning once, and no hue', () => {
    const offered = Object.keys(colours).filter((name) => !['transparent', 'current', 'inherit'].includes(name));
    expect(offered).toEqual([...tokenNames]);
    for (const name of tokenNames) expect(colours).toHaveProperty(name, `var(--${name})`);
  });
});

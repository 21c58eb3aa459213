import sharp from 'sharp';
import { describe, expect, it } from 'vitest';
import { characterByPlace } from '@/components/scanner/character-by-place';
import { readScan } from '@/services/contracts/scan-text';
import { dataMatrixOutline } from '@/services/labels/data-matrix';

describe('a key by its place', () => {
  // The US layout (ANSI INCITS 154), which keyboard-wedge scanners type by default, from memory.
  it.each([
    ['KeyA', true, 'A'],
    ['KeyQ', false, 'q'],
    ['Digit1', false, '1'],
    ['Digit8', true, '*'],
    ['Minus', false, '-'],
    ['Minus', true, '_'],
    ['Slash', false, '/'],
    ['Numpad7', false, '7'],
    ['ShiftLeft', true, null],
    ['ArrowUp', false, null],
  ] as const)('%s, shift %s, is %s on whatever layout', (code, shift, sign) => {
    expect(characterByPlace(code, shift)).toBe(sign);
  });
});

describe('a scanned code', () => {
  it.each([
    ['N50101', { serial: 'N50101', partNumber: null }],
    ['  N50101 ', { serial: 'N50101', partNumber: null }],
    ['AM-5120 N50101', { serial: 'N50101', partNumber: 'AM-5120' }],
    // ISO/IEC 15434 format 06 with ANSI MH10.8.2 identifiers, from memory.
    ['[)>\u001e06\u001d1PAM-5120\u001dSN50101\u001e\u0004', { serial: 'N50101', partNumber: 'AM-5120' }],
    ['[)>\u001e06\u001dSN50101\u001d1PAM-5120\u001e\u0004', { serial: 'N50101', partNumber: 'AM-5120' }],
    ['[)>\u001e06\u001d1PAM-5120\u001e\u0004', null],
    ['   ', null],
  ])('%j names %j', (text, found) => {
    expect(readScan(text)).toEqual(found);
  });
});

describe('the Data Matrix of a tag', () => {
  it('has the solid edges left and below and the clock track above and right (ISO/IEC 16022)', async () => {
    const { path, modules } = dataMatrixOutline('N50101');
    const svg = `<svg xmlns="http://www.w3.org/2000/svg" width="${String(modules)}" height="${String(modules)}"><rect width="100" height="100" fill="#fff"/><path shape-rendering="crispEdges" d="${path}"/></svg>`;
    const { data } = await sharp(Buffer.from(svg)).greyscale().raw().toBuffer({ resolveWithObject: true });
    const dark = (x: number, y: number) => (data[y * modules + x] ?? 255) < 128;
    const along = Array.from({ length: modules }, (_, place) => place);
    // Six digits and letters fit the square of 12 modules.
    expect(modules).toBe(12);
    expect(along.every((place) => dark(0, place))).toBe(true);
    expect(along.every((place) => dark(place, modules - 1))).toBe(true);
    expect(along.map((place) => dark(place, 0))).toEqual(along.map((place) => place % 2 === 0));
    expect(along.map((place) => dark(modules - 1, place))).toEqual(along.map((place) => place % 2 === 1));
  });
});

/** What a colour means; never what it looks like. tailwind.config.js offers exactly these names. */
export const tokenNames = [
  'surface',
  'raised',
  'sunken',
  'ink',
  'ink-soft',
  'line',
  'line-strong',
  'accent',
  'accent-hover',
  'on-accent',
  'accent-wash',
  'focus',
  'accept',
  'accept-wash',
  'reject',
  'reject-wash',
  'on-reject',
  'unsure',
  'unsure-wash',
  'held',
  'held-wash',
  'caution',
  'caution-wash',
  'mark',
  'mark-ground',
] as const;

export type TokenName = (typeof tokenNames)[number];
export type Palette = Record<TokenName, string>;

/** The palettes a workstation can choose, in the order they are offered. */
export const paletteNames = ['floor', 'reading-room', 'booth'] as const;
export type PaletteName = (typeof paletteNames)[number];

/** The cookie that keeps a workstation's palette; read by the server so that the first paint is right. */
export const paletteCookie = 'ringtrue-palette';

/** Paper on a bench in a bright shop: warm, unglazed, with kiln blue for what can be done. */
const floor: Palette = {
  surface: '#f5f4ef',
  raised: '#fdfcf9',
  sunken: '#e9e7de',
  ink: '#1a1e21',
  'ink-soft': '#4d5358',
  line: '#d3cfc2',
  'line-strong': '#767163',
  accent: '#174a7c',
  'accent-hover': '#0f3860',
  'on-accent': '#ffffff',
  'accent-wash': '#dde6ee',
  focus: '#0a58c2',
  accept: '#0b6259',
  'accept-wash': '#d8e9e4',
  reject: '#9c2a1f',
  'reject-wash': '#f4dfd9',
  'on-reject': '#ffffff',
  unsure: '#7a4d00',
  'unsure-wash': '#f4e6c6',
  held: '#5a3a92',
  'held-wash': '#e6deef',
  caution: '#5c4300',
  'caution-wash': '#f1e7cd',
  mark: '#ffffff',
  'mark-ground': '#101214',
};

/** Beside a radiograph: nothing larger than a letter is bright, ink a third of white's luminance. */
const readingRoom: Palette = {
  surface: '#0d1012',
  raised: '#14181b',
  sunken: '#080a0b',
  ink: '#a2a6a9',
  'ink-soft': '#868c90',
  line: '#272d31',
  'line-strong': '#697076',
  accent: '#7aa5d2',
  'accent-hover': '#93b7dc',
  'on-accent': '#0a1017',
  'accent-wash': '#16232f',
  focus: '#8fbcf0',
  accept: '#4fae9f',
  'accept-wash': '#0f2623',
  reject: '#e0806f',
  'reject-wash': '#2e1714',
  'on-reject': '#170806',
  unsure: '#c79a4b',
  'unsure-wash': '#2a200e',
  held: '#a993d6',
  'held-wash': '#211a30',
  caution: '#bfa266',
  'caution-wash': '#211c10',
  mark: '#c2c4c6',
  'mark-ground': '#050607',
};

/** For fluorescent work: black, and ink from red to amber only, since the eye is adapted to the dark. */
const booth: Palette = {
  surface: '#000000',
  raised: '#0a0300',
  sunken: '#000000',
  ink: '#cb7d30',
  'ink-soft': '#bd6f27',
  line: '#331a06',
  'line-strong': '#955620',
  accent: '#c2731f',
  'accent-hover': '#d0822c',
  'on-accent': '#0a0300',
  'accent-wash': '#160a01',
  focus: '#dc8a2e',
  accept: '#bd7a2a',
  'accept-wash': '#120901',
  reject: '#dc4a2c',
  'reject-wash': '#180502',
  'on-reject': '#0a0100',
  unsure: '#c96f1c',
  'unsure-wash': '#140901',
  held: '#cf5f30',
  'held-wash': '#160803',
  caution: '#c4691e',
  'caution-wash': '#100701',
  mark: '#d0822c',
  'mark-ground': '#000000',
};

/** What a printer gets, whatever the screen shows. */
const paper: Palette = {
  ...floor,
  surface: '#ffffff',
  raised: '#ffffff',
  sunken: '#f2f1ed',
  ink: '#000000',
};

export const palettes: Record<PaletteName, Palette> = { floor, 'reading-room': readingRoom, booth };
export const printPalette = paper;

/** Whether the browser's own controls are drawn for a light or a dark ground. */
export const paletteScheme: Record<PaletteName, 'light' | 'dark'> = { floor: 'light', 'reading-room': 'dark', booth: 'dark' };

/** The palette named by a cookie or setting, or the floor when the name is unknown. */
export function paletteFrom(name: string | undefined): PaletteName {
  return paletteNames.find((known) => known === name) ?? 'floor';
}

/** Text on ground: every one of these is measured at 4.5 to 1 or better. */
export const textPairs: readonly (readonly [TokenName, TokenName])[] = [
  ...(['ink', 'ink-soft', 'accent', 'accent-hover', 'accept', 'reject', 'unsure', 'held', 'caution'] as const).flatMap((text) =>
    (['surface', 'raised', 'sunken'] as const).map((ground) => [text, ground] as const),
  ),
  ...(['accent', 'accept', 'reject', 'unsure', 'held', 'caution'] as const).flatMap(
    (meaning) =>
      [
        [meaning, `${meaning}-wash`],
        ['ink', `${meaning}-wash`],
        ['ink-soft', `${meaning}-wash`],
      ] as const,
  ),
  ['accent-hover', 'accent-wash'],
  ['on-accent', 'accent'],
  ['on-accent', 'accent-hover'],
  ['on-reject', 'reject'],
  ['mark', 'mark-ground'],
];

/** Edges of controls, focus and the shapes that carry a state: 3 to 1 or better (WCAG 2.2, 1.4.11). */
export const shapePairs: readonly (readonly [TokenName, TokenName])[] = (['line-strong', 'focus'] as const).flatMap((shape) =>
  (['surface', 'raised', 'sunken', 'accent-wash'] as const).map((ground) => [shape, ground] as const),
);

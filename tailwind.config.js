/** Colours are named by meaning and resolve to the palette of the workstation; the values are in components/theme/palettes.ts. */
const meanings = [
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
];

/** @type {import('tailwindcss').Config} */
const config = {
  content: ['./app/**/*.{ts,tsx}', './components/**/*.{ts,tsx}'],
  theme: {
    colors: {
      ...Object.fromEntries(meanings.map((name) => [name, `var(--${name})`])),
      transparent: 'transparent',
      current: 'currentColor',
      inherit: 'inherit',
    },
    // No size under 14 px exists, so that none can be used.
    fontSize: {
      sm: ['0.875rem', '1.25rem'],
      base: ['1rem', '1.5rem'],
      lg: ['1.125rem', '1.625rem'],
      xl: ['1.375rem', '1.75rem'],
      '2xl': ['1.75rem', '2.125rem'],
      '3xl': ['2.25rem', '2.5rem'],
    },
    fontFamily: {
      sans: ['var(--font-text)', 'system-ui', 'sans-serif'],
      mono: ['var(--font-mono)', 'ui-monospace', 'monospace'],
    },
    borderRadius: { none: '0', DEFAULT: '2px', full: '9999px' },
    extend: {
      // The height of anything touched with a glove.
      spacing: { capture: '3rem' },
      minHeight: { capture: '3rem' },
      minWidth: { capture: '3rem' },
    },
  },
};

export default config;

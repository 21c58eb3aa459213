import localFont from 'next/font/local';

/** Text. Its zero, one, l and I cannot be confused. */
export const textFace = localFont({
  src: [
    { path: '../../fonts/atkinson-hyperlegible-next-latin-400-normal.woff2', weight: '400', style: 'normal' },
    { path: '../../fonts/atkinson-hyperlegible-next-latin-600-normal.woff2', weight: '600', style: 'normal' },
    { path: '../../fonts/atkinson-hyperlegible-next-latin-700-normal.woff2', weight: '700', style: 'normal' },
  ],
  variable: '--font-text',
  display: 'block',
  fallback: ['system-ui', 'sans-serif'],
});

/** Serials, readings, lot numbers, digests. */
export const monoFace = localFont({
  src: [
    { path: '../../fonts/atkinson-hyperlegible-mono-latin-400-normal.woff2', weight: '400', style: 'normal' },
    { path: '../../fonts/atkinson-hyperlegible-mono-latin-600-normal.woff2', weight: '600', style: 'normal' },
  ],
  variable: '--font-mono',
  display: 'block',
  fallback: ['ui-monospace', 'monospace'],
});

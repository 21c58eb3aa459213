import type { ReactNode } from 'react';

const stroke = { fill: 'none', stroke: 'currentColor', strokeWidth: 2 } as const;
const arc = 'M3 12.5A7.5 7.5 0 0 1 13 3';

/** Small shapes on a 16 × 16 grid, each told from the others without colour. Those of requirements are pieces of the ring. */
const drawings = {
  thin: <path d={arc} {...stroke} strokeWidth={1.4} />,
  half: <path d={arc} {...stroke} strokeWidth={3} />,
  full: <path d="M3 12.5A7.5 7.5 0 0 1 13 3" {...stroke} strokeWidth={5.6} />,
  detached: (
    <>
      <path d="M1.8 10A8.6 8.6 0 0 1 10 1.8" {...stroke} strokeWidth={3.6} />
      <circle cx="12" cy="12" r="1.6" fill="currentColor" />
    </>
  ),
  notched: (
    <path
      d="M1 14 1 11.2A10.5 10.5 0 0 1 3.6 5.4L7.4 8.6 5.4 3.6A10.5 10.5 0 0 1 11.2 1L14 1 14 5.4A8.6 8.6 0 0 0 5.4 14Z"
      fill="currentColor"
    />
  ),
  ticked: (
    <>
      <path d={arc} {...stroke} strokeWidth={1.4} />
      <path d="m13 3-1 7-3-3" {...stroke} strokeWidth={1.8} />
    </>
  ),
  dotted: <circle cx="8" cy="8" r="5.6" {...stroke} strokeDasharray="1.6 2.8" />,
  ring: <circle cx="8" cy="8" r="5.6" {...stroke} strokeWidth={1.6} />,
  'half-disc': (
    <>
      <circle cx="8" cy="8" r="5.6" {...stroke} strokeWidth={1.6} />
      <path d="M8 2.4a5.6 5.6 0 0 1 0 11.2Z" fill="currentColor" />
    </>
  ),
  target: (
    <>
      <circle cx="8" cy="8" r="6" {...stroke} strokeWidth={1.6} />
      <circle cx="8" cy="8" r="2.8" fill="currentColor" />
    </>
  ),
  closed: <circle cx="8" cy="8" r="5" {...stroke} strokeWidth={4} />,
  leaving: (
    <>
      <path d="M10.4 12.6A5.4 5.4 0 1 1 9.6 3.2" {...stroke} />
      <path d="M7 8h8M12 5l3 3-3 3" {...stroke} strokeWidth={1.8} />
    </>
  ),
  back: <path d="M4 2v5h5M4.4 6.8A5.2 5.2 0 1 1 3.6 11" {...stroke} />,
  cross: <path d="m3 3 10 10M13 3 3 13" {...stroke} strokeWidth={2.4} />,
  'cross-solid': (
    <path
      d="M1 1h14v14H1Zm3.5 1.9L2.9 4.5 6.4 8l-3.5 3.5 1.6 1.6L8 9.6l3.5 3.5 1.6-1.6L9.6 8l3.5-3.5-1.6-1.6L8 6.4Z"
      fill="currentColor"
      fillRule="evenodd"
    />
  ),
  dot: <circle cx="8" cy="8" r="3" fill="currentColor" />,
  hatch: <path d="M1.5 6 6 1.5M1.5 11 11 1.5M3 14.5 14.5 3M8 14.5 14.5 8M13 14.5l1.5-1.5" {...stroke} strokeWidth={1.8} />,
  // verdicts
  accept: (
    <>
      <circle cx="8" cy="8" r="7" {...stroke} strokeWidth={1.8} />
      <path d="m4.6 8.3 2.4 2.5 4.5-5.3" {...stroke} />
    </>
  ),
  reject: (
    <path
      d="M4.8.8h6.4l4 4v6.4l-4 4H4.8l-4-4V4.8ZM5.6 4 4 5.6 6.4 8 4 10.4 5.6 12 8 9.6 10.4 12 12 10.4 9.6 8 12 5.6 10.4 4 8 6.4Z"
      fill="currentColor"
      fillRule="evenodd"
    />
  ),
  indeterminate: (
    <>
      <path d="M8 1 15 8 8 15 1 8Z" {...stroke} strokeWidth={1.8} strokeLinejoin="round" />
      <path d="M8 1v14L1 8Z" fill="currentColor" />
    </>
  ),
  'not-evaluable': (
    <>
      <rect x="1.5" y="1.5" width="13" height="13" {...stroke} strokeWidth={1.8} strokeDasharray="3 2.2" />
      <path d="M5 8h6" {...stroke} />
    </>
  ),
  // notices
  caution: (
    <>
      <path d="M8 1.5 15.2 14.5H.8Z" {...stroke} strokeWidth={1.8} strokeLinejoin="round" />
      <path d="M8 6v4.2M8 11.4v1.6" {...stroke} strokeWidth={1.8} />
    </>
  ),
  information: (
    <>
      <circle cx="8" cy="8" r="7" {...stroke} strokeWidth={1.6} />
      <path d="M8 7v5M8 3.8v1.8" {...stroke} />
    </>
  ),
  // controls
  search: (
    <>
      <circle cx="6.8" cy="6.8" r="4.8" {...stroke} strokeWidth={1.8} />
      <path d="m10.4 10.4 4.4 4.4" {...stroke} />
    </>
  ),
  menu: <path d="M1.5 3.5h13M1.5 8h13M1.5 12.5h8" {...stroke} strokeWidth={1.8} />,
  down: <path d="m3.5 6 4.5 4.5L12.5 6" {...stroke} strokeWidth={1.8} />,
  copy: <path d="M5.5 4.5h9v10h-9ZM2 11V1.5h9" {...stroke} strokeWidth={1.6} />,
  away: <path d="m3 3 10 10M13 3 3 13" {...stroke} strokeWidth={1.6} />,
} as const satisfies Record<string, ReactNode>;

export type GlyphName = keyof typeof drawings;

export interface GlyphProps {
  name: GlyphName;
  /** Side in pixels; 16 unless told. */
  pixels?: number;
}

/** A shape in the colour of the text around it. It is never alone: a word always stands beside it. */
export function Glyph({ name, pixels = 16 }: GlyphProps) {
  return (
    <svg viewBox="0 0 16 16" width={pixels} height={pixels} aria-hidden className="inline-block shrink-0 align-[-0.125em]">
      {drawings[name]}
    </svg>
  );
}

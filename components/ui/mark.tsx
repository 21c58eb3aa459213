export interface MarkProps {
  /** Height in pixels. */
  pixels?: number;
}

/** The mark: a ring with one short gap that has just closed – the last segment a hair away from the rest. */
export function Mark({ pixels = 28 }: MarkProps) {
  return (
    <svg viewBox="0 0 64 64" width={pixels} height={pixels} aria-hidden className="shrink-0">
      <path d="M41.3 12.05A22 22 0 1 0 53.1 25.92" fill="none" stroke="currentColor" strokeWidth="9" />
      <path d="M43.4 13.15A22 22 0 0 1 52.3 23.67" fill="none" className="stroke-accept" strokeWidth="9" />
    </svg>
  );
}

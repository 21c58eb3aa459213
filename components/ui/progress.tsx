export interface ProgressProps {
  label: string;
  /** Done so far; null when it is not known how much there is. */
  done: number | null;
  total?: number;
  /** In words beside the bar: '3 of 12 files'. */
  words?: string;
}

/** How far a long work is. */
export function Progress({ label, done, total = 100, words }: ProgressProps) {
  const share = done === null ? null : Math.max(0, Math.min(1, total === 0 ? 1 : done / total));
  return (
    <div className="flex flex-col gap-1">
      <div className="flex justify-between gap-4">
        <span>{label}</span>
        <span className="font-mono text-ink-soft">{words ?? (share === null ? '' : `${Math.floor(share * 100)} %`)}</span>
      </div>
      <div
        role="progressbar"
        aria-label={label}
        aria-valuemin={0}
        aria-valuemax={total}
        aria-valuenow={done ?? undefined}
        aria-valuetext={words}
        className="h-3 border border-line-strong bg-sunken"
      >
        {share === null ? (
          <div className="hatched h-full text-accent" />
        ) : (
          <div className="h-full bg-accent" style={{ width: `${share * 100}%` }} />
        )}
      </div>
    </div>
  );
}

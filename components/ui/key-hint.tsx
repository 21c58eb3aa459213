export interface KeyHintProps {
  /** One key or several pressed together: ['Ctrl', 'Enter']. */
  keys: readonly string[];
}

/** The keys that do it. */
export function KeyHint({ keys }: KeyHintProps) {
  return (
    <span className="inline-flex gap-1 whitespace-nowrap">
      {keys.map((key) => (
        <kbd
          key={key}
          className="inline-block min-w-6 rounded border border-b-2 border-line-strong bg-raised px-1.5 text-center text-sm leading-5 text-ink"
        >
          {key}
        </kbd>
      ))}
    </span>
  );
}

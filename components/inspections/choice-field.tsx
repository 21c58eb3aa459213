export interface ChoiceFieldProps {
  readonly label: string;
  readonly value: string;
  readonly options: readonly { readonly value: string; readonly text: string }[];
  readonly onChoose: (value: string) => void;
  /** Read out only, where a column head already says it. */
  readonly hideLabel?: boolean;
  readonly disabled?: boolean;
  readonly id?: string;
}

/** A choice from a short list. */
export function ChoiceField({ label, value, options, onChoose, hideLabel = false, disabled = false, id }: ChoiceFieldProps) {
  return (
    <label className="flex min-w-0 flex-col gap-0.5">
      <span className={hideLabel ? 'sr-only' : ''}>{label}</span>
      <select
        id={id}
        className="field w-auto max-w-full"
        disabled={disabled}
        value={value}
        onChange={(event) => onChoose(event.target.value)}
      >
        {options.map((one) => (
          <option key={one.value} value={one.value}>
            {one.text}
          </option>
        ))}
      </select>
    </label>
  );
}

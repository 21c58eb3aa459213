'use client';

import { useId, useState, type ReactNode } from 'react';
import { Glyph } from '@/components/ui/glyph';
import { readValue, textOfValue, valueOfText, type EntryKind, type Option } from './entry-values';
import { usePlanEditing } from './plan-editing';

export interface PlanFieldProps {
  /** Dotted path in the plan's content. */
  readonly path: string;
  readonly label: string;
  readonly kind: EntryKind;
  readonly options?: readonly Option[];
  /** The label is read out only, where a column head says it already. */
  readonly quiet?: boolean;
}

interface FrameProps {
  readonly id: string;
  readonly label: string;
  readonly quiet: boolean;
  readonly error: string | undefined;
  readonly children: ReactNode;
}

function Frame({ id, label, quiet, error, children }: FrameProps) {
  return (
    <div className="flex min-w-0 flex-col gap-0.5">
      <label htmlFor={id} className={quiet ? 'sr-only' : 'text-sm font-semibold'}>
        {label}
      </label>
      {children}
      <PlanFault id={`${id}-error`} text={error} />
    </div>
  );
}

/** What is wrong at a place, beside it; nothing where nothing is. */
export function PlanFault({ id, text }: { readonly id?: string; readonly text: string | undefined }) {
  return text === undefined ? null : (
    <p id={id} className="flex items-baseline gap-1.5 text-sm font-semibold text-reject">
      <Glyph name="reject" pixels={14} />
      {text}
    </p>
  );
}

function wiring(id: string, path: string, error: string | undefined) {
  return {
    id,
    'data-path': path,
    'aria-invalid': error === undefined ? undefined : true,
    'aria-describedby': error === undefined ? undefined : `${id}-error`,
  } as const;
}

function Marks({ path, label, options = [] }: PlanFieldProps) {
  const { at, set, faultAt, rows } = usePlanEditing();
  const chosen = rows(path);
  const errors = [faultAt(path), ...chosen.map((_, place) => faultAt(`${path}.${String(place)}`))];
  const toggle = (value: string, on: boolean) => {
    const kept = options.map((one) => one.value).filter((one) => (one === value ? on : chosen.includes(one)));
    set(path, kept.length === 0 && at(path) === undefined ? undefined : kept);
  };
  return (
    <fieldset data-path={path} tabIndex={-1} className="min-w-0">
      <legend className="text-sm font-semibold">{label}</legend>
      <div className="flex flex-wrap gap-x-4">
        {options.map((one) => (
          <label key={one.value} className="flex min-h-9 items-center gap-2">
            <input
              type="checkbox"
              className="size-5"
              checked={chosen.includes(one.value)}
              onChange={(event) => toggle(one.value, event.target.checked)}
            />
            {one.text}
          </label>
        ))}
        {options.length === 0 ? <span className="text-ink-soft">–</span> : null}
      </div>
      {errors.map((text, place) => (
        <PlanFault key={place} text={text} />
      ))}
    </fieldset>
  );
}

function Choice({ path, label, options = [], quiet = false }: PlanFieldProps) {
  const { at, set, faultAt } = usePlanEditing();
  const id = useId();
  const error = faultAt(path);
  return (
    <Frame {...{ id, label, quiet, error }}>
      <select
        {...wiring(id, path, error)}
        className="field"
        value={textOfValue(at(path))}
        onChange={(event) => set(path, event.target.value === '' ? undefined : event.target.value)}
      >
        <option value="">–</option>
        {options.map((one) => (
          <option key={one.value} value={one.value}>
            {one.text}
          </option>
        ))}
      </select>
    </Frame>
  );
}

function Typed({ path, label, kind, quiet = false }: PlanFieldProps) {
  const { at, set, faultAt } = usePlanEditing();
  const id = useId();
  const error = faultAt(path);
  // What is typed stays as typed until the field is left: `gas-pore, ` is not yet two words.
  const [typed, setTyped] = useState<string | null>(null);
  const number = kind === 'decimal' || kind === 'whole';
  return (
    <Frame {...{ id, label, quiet, error }}>
      <input
        {...wiring(id, path, error)}
        className={`field ${number ? 'text-right font-mono' : ''}`}
        inputMode={number ? 'decimal' : undefined}
        autoComplete="off"
        value={typed ?? textOfValue(at(path))}
        onBlur={() => setTyped(null)}
        onChange={(event) => {
          setTyped(event.target.value);
          set(path, valueOfText(kind, event.target.value));
        }}
      />
    </Frame>
  );
}

function Yes({ path, label, quiet = false }: PlanFieldProps) {
  const { at, set } = usePlanEditing();
  return (
    <label className="flex min-h-10 items-center gap-2">
      <input
        data-path={path}
        type="checkbox"
        className="size-5"
        checked={at(path) === true}
        onChange={(event) => set(path, event.target.checked)}
      />
      <span className={quiet ? 'sr-only' : ''}>{label}</span>
    </label>
  );
}

function Read({ path, label, options = [], quiet = false }: PlanFieldProps) {
  const { at } = usePlanEditing();
  const value = at(path);
  return (
    <div className="min-w-0">
      <span className={quiet ? 'sr-only' : 'text-sm text-ink-soft'}>{label}</span>{' '}
      <span className={quiet ? '' : 'block'}>{readValue(value === true ? '✓' : value, options)}</span>
    </div>
  );
}

/** One entry of a plan issue: read as words, or edited with its fault beside it. */
export function PlanField(props: PlanFieldProps) {
  const { readOnly } = usePlanEditing();
  if (readOnly) return <Read {...props} />;
  if (props.kind === 'marks') return <Marks {...props} />;
  if (props.kind === 'choice') return <Choice {...props} />;
  return props.kind === 'yes' ? <Yes {...props} /> : <Typed {...props} />;
}

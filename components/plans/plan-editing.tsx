'use client';

import { getIn, setIn } from 'formik';
import { createContext, useContext, useMemo, type ReactNode } from 'react';
import type { PlanContent } from '@/services/contracts/plan-content';
import type { Fault } from '@/services/engine/evaluate/fault';

export interface PlanEditing {
  readonly content: PlanContent;
  readonly readOnly: boolean;
  /** What stands at a dotted path of the content. */
  readonly at: (path: string) => unknown;
  /** Puts a value at a path; undefined takes the key away. */
  readonly set: (path: string, value: unknown) => void;
  readonly faultAt: (path: string) => string | undefined;
  readonly rows: (path: string) => readonly unknown[];
  readonly add: (path: string, row: unknown) => void;
  readonly remove: (path: string, place: number) => void;
  readonly move: (path: string, place: number, by: 1 | -1) => void;
}

const Editing = createContext<PlanEditing | null>(null);

/** The plan issue being read or edited, to the fields inside. Throws outside a plan. */
export function usePlanEditing(): PlanEditing {
  const editing = useContext(Editing);
  if (!editing) throw new Error('a field of a plan stands outside of one');
  return editing;
}

function withValue(content: PlanContent, path: string, value: unknown): PlanContent {
  const next = setIn(content, path, value) as PlanContent;
  const above = path.slice(0, path.lastIndexOf('.'));
  const left = getIn(next, above) as unknown;
  // The last entry of a group takes the group with it: an indicator that is not named is not asked.
  const emptied = value === undefined && /\.[a-zA-Z]+$/.test(above) && typeof left === 'object' && left !== null;
  return emptied && !Array.isArray(left) && Object.keys(left).length === 0
    ? (setIn(next, above, undefined) as PlanContent)
    : next;
}

export interface PlanEditingProviderProps {
  readonly content: PlanContent;
  readonly faults: readonly Fault[];
  readonly readOnly: boolean;
  readonly onChange: (next: PlanContent) => void;
  readonly children: ReactNode;
}

export function PlanEditingProvider({ content, faults, readOnly, onChange, children }: PlanEditingProviderProps) {
  const editing = useMemo((): PlanEditing => {
    const at = (path: string) => getIn(content, path) as unknown;
    const rows = (path: string) => (Array.isArray(at(path)) ? (at(path) as unknown[]) : []);
    const set = (path: string, value: unknown) => onChange(withValue(content, path, value));
    return {
      content,
      readOnly,
      at,
      set,
      rows,
      faultAt: (path) => faults.find((one) => one.path === path)?.message,
      add: (path, row) => set(path, [...rows(path), row]),
      remove: (path, place) =>
        set(
          path,
          rows(path).filter((_, at) => at !== place),
        ),
      move: (path, place, by) => {
        const next = [...rows(path)];
        const [row] = next.splice(place, 1);
        next.splice(place + by, 0, row);
        set(path, next);
      },
    };
  }, [content, faults, readOnly, onChange]);
  return <Editing value={editing}>{children}</Editing>;
}
